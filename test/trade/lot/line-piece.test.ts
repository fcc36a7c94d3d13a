import { describe, expect, it } from 'vitest';
import { parseMark } from '../../../src/trade/metal/mark.ts';
import { contentsOf, LEGAL_MASS_NOTE, makePiece, usualOrigin, type Findings } from '../../../src/trade/lot/line-piece.ts';
import { exactToText } from '../../../src/trade/number/exact.ts';

const markOf = (text: string) => {
	const mark = parseMark(text);
	if (!mark.ok) throw new Error(mark.problem.kind);
	return mark.value;
};
const amount = { start: 4, end: 7, typed: '5', unit: 'g', off: false, what: null, from: 2, to: 3 } as const;
const findings: Findings = {
	line: '14k 5 g', article: 'ring', amounts: [amount], counts: [], unsure: null, mark: markOf('14k'), coin: null, options: {}
};

describe('what was found, made a piece', () => {
	it('with what a piece has when nobody says otherwise', () => {
		expect(makePiece(findings)).toMatchObject({
			ok: true,
			value: { article: 'ring', count: 1, mark: '14 kt', origin: 'us-modern', lossClass: 'clean', moreThanMelt: false, note: '', photos: [], deductions: [] }
		});
	});

	it('keeps contents in lowest terms', () => {
		expect(contentsOf(markOf('Au 62.5%'), null).map(({ taken }) => [taken.perMille.n, taken.perMille.d])).toEqual([[625n, 1n]]);
		expect(contentsOf(markOf('958.4'), null).map(({ taken }) => exactToText(taken.perMille))).toEqual(['4792/5']);
		expect(contentsOf(null, null)).toEqual([]);
	});

	it.each([
		['14k', 'ring', 'us-modern'], ['585', 'ring', 'uncontrolled'], ['sterling', 'spoon', 'us-modern'], ['999.9 gold', 'bar', 'stranger-bar'],
		['Au 625 Pd 180', 'thing', 'unmarked'], ['18k', 'dental crown', 'unmarked'], ['copper', 'wire', 'unmarked'], ['22k', 'coin', 'hallmarked']
	])('%s %s comes from: %s', (mark, article, origin) => expect(usualOrigin(markOf(mark), article)).toBe(origin));

	it('a filler by default only under a weighted mark, and not beside a typed one', () => {
		const weighted = { ...findings, mark: markOf('weighted sterling') };
		const off = (found: Findings) => {
			const made = makePiece(found);
			return made.ok ? made.value.deductions.map(({ what, mass }) => [what, mass.grams.toString()]) : made.problem.kind;
		};
		expect(off(weighted)).toEqual([['filler', '4.5']]);
		const typed = { ...amount, typed: '3', off: true, what: 'filler' } as const;
		expect(off({ ...weighted, amounts: [amount, typed] })).toEqual([['filler', '3']]);
		expect(off({ ...findings, amounts: [amount, typed] })).toEqual([['filler', '3']]);
		expect(LEGAL_MASS_NOTE).toContain('not weighed');
	});

	it('without a mark or a mass it is a problem', () => {
		const kind = (change: Partial<Findings>) => {
			const made = makePiece({ ...findings, ...change });
			return made.ok ? null : made.problem.kind;
		};
		expect([kind({ mark: null }), kind({ amounts: [] }), kind({ amounts: [amount, amount] })]).toEqual([
			'line-mark-missing', 'line-mass-missing', 'line-two-masses'
		]);
	});
});
