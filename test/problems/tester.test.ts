import { describe, expect, it } from 'vitest';
import { checkOdds, type OddsProblem } from '../../src/trade/evidence/odds.ts';
import { checkPrudence, type PrudenceProblem } from '../../src/trade/evidence/prudence.ts';
import { checkTester, type Tester, type TesterProblem } from '../../src/trade/evidence/tester.ts';
import { testerDefaults } from '../../src/trade/evidence/tester-figures.ts';
import type { Result } from '../../src/trade/number/result.ts';
import { formatFor } from '../../src/ui/format.ts';
import { sentence } from '../../src/ui/sentences.ts';

const reader: Tester = { id: 't1', name: 'pocket reader', kind: 'fluorescence', ...testerDefaults.fluorescence, checkedOn: null };

function problemOf<P>(result: Result<unknown, P>): P {
	if (result.ok) throw new Error('no problem');
	return result.problem;
}

type Problem = TesterProblem | OddsProblem | PrudenceProblem;
const reproductions: { readonly [K in Problem['kind']]: () => Problem } = {
	'tester-no-name': () => problemOf(checkTester({ ...reader, name: '  ' })),
	'tester-no-rows': () => problemOf(checkTester({ ...reader, rows: [] })),
	'tester-u-not-possible': () => problemOf(checkTester({ ...reader, rows: [{ metal: 'Au', colour: 'any', perMille: 585, u: 0 }] })),
	'tester-bias-over-u': () => problemOf(checkTester({ ...reader, bias: 2.5 })),
	'tester-gross-too-often': () => problemOf(checkTester({ ...reader, gross: 0.6 })),
	'odds-outside': () => problemOf(checkOdds({ honest: 1.2, under: 0, other: 0, layered: 0 })),
	'odds-not-whole': () => problemOf(checkOdds({ honest: 0.9, under: 0.05, other: 0.02, layered: 0.01 })),
	'prudence-outside': () => problemOf(checkPrudence(0.4))
};

describe('problems of testers and of how findings are weighed', () => {
	it.each(Object.entries(reproductions))('%s is produced and said', (kind, make) => {
		const problem = make();
		expect(problem.kind).toBe(kind);
		expect(sentence(problem, formatFor('en')).length).toBeGreaterThan(30);
	});
	it('name the figures that are wrong', () => {
		const said = (kind: Problem['kind']) => sentence(reproductions[kind](), formatFor('de'));
		expect(said('tester-bias-over-u')).toMatch(/2,5\s‰.*±1\s‰/);
		expect(said('tester-u-not-possible')).toContain('gold of 585');
		expect(said('tester-gross-too-often')).toMatch(/60\s%.*50\s%/);
		expect(said('odds-not-whole')).toMatch(/98\s%/);
		expect(said('odds-outside')).toMatch(/120\s%.*as its mark says/);
		expect(said('prudence-outside')).toMatch(/40\s%.*50\s%.*99\s%/);
	});
});
