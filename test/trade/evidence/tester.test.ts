import { describe, expect, it } from 'vitest';
import { checkTester, testerKinds, type Tester } from '../../../src/trade/evidence/tester.ts';
import { testerDefaults } from '../../../src/trade/evidence/tester-figures.ts';

const tester: Tester = { id: 't1', name: 'pocket reader', kind: 'fluorescence', ...testerDefaults.fluorescence, checkedOn: null };

describe('a tester', () => {
	it.each(testerKinds)('of kind %s has working defaults that hold', (kind) => {
		const made: Tester = { id: 't', name: 'mine', kind, ...testerDefaults[kind], checkedOn: '2026-09-01' };
		expect(checkTester(made)).toEqual({ ok: true, value: made });
	});
	it('has a name and at least one figure', () => {
		expect(checkTester({ ...tester, name: ' ' })).toEqual({ ok: false, problem: { kind: 'tester-no-name' } });
		expect(checkTester({ ...tester, rows: [] })).toEqual({ ok: false, problem: { kind: 'tester-no-rows' } });
	});
	it.each([
		[585, 0],
		[585, -1],
		[585, 301],
		[585, Number.NaN],
		[-1, 5],
		[1001, 5]
	])('does not read %d to %d', (perMille, u) => {
		const rows = [...tester.rows, { metal: 'Au', colour: 'any', perMille, u } as const];
		expect(checkTester({ ...tester, rows })).toEqual({ ok: false, problem: { kind: 'tester-u-not-possible', metal: 'Au', perMille, u, most: 300 } });
	});
	it('has no more bias than the doubt that it is a part of', () => {
		expect(checkTester({ ...tester, bias: 1 }).ok).toBe(true);
		for (const bias of [1.001, -0.001, Number.NaN]) {
			expect(checkTester({ ...tester, bias })).toEqual({ ok: false, problem: { kind: 'tester-bias-over-u', bias, least: 1 } });
		}
	});
	it('is right more often than not', () => {
		expect([0, 0.5].map((gross) => checkTester({ ...tester, gross }).ok)).toEqual([true, true]);
		for (const gross of [0.501, -0.001, Number.NaN]) {
			expect(checkTester({ ...tester, gross })).toEqual({ ok: false, problem: { kind: 'tester-gross-too-often', gross, most: 0.5 } });
		}
	});
});
