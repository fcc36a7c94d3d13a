import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readingU, testerDefaults } from '../../../src/trade/evidence/tester-figures.ts';
import type { TesterRow } from '../../../src/trade/evidence/tester.ts';

const { rows } = testerDefaults.fluorescence;

describe('how well a tester reads', () => {
	it('is what its rows say, and white rows count for white alloys', () => {
		expect([417, 585, 750, 990, 999].map((perMille) => readingU(rows, 'Au', perMille))).toEqual([18, 16, 6, 5, 1]);
		expect([417, 585, 750, 990].map((perMille) => readingU(rows, 'Au', perMille, true))).toEqual([18, 16, 13, 5]);
		expect([readingU(rows, 'Ag', 925), readingU(rows, 'Ag', 925, true), readingU(rows, 'Pt', 950), readingU(rows, 'Pd', 500)]).toEqual([5, 5, 5, 8]);
	});
	it('lies on a straight line between two rows', () => {
		// a third of the way from 585 to 750: 16 less a third of 10
		expect(readingU(rows, 'Au', 640)).toBeCloseTo(16 - 10 / 3, 12);
		// half way from 750 to 990 of a white alloy: between 13 and 5
		expect(readingU(rows, 'Au', 870, true)).toBeCloseTo(9, 12);
		expect(readingU(rows, 'Pd', 725)).toBeCloseTo(7, 12);
	});
	it('is that of the end rows beyond them', () => {
		expect([readingU(rows, 'Au', 0), readingU(rows, 'Au', 375), readingU(rows, 'Au', 999.9), readingU(rows, 'Pt', 600)]).toEqual([18, 18, 1, 5]);
	});
	it('of a metal without a row is the worst there is', () => {
		expect(readingU(rows, 'Rh', 500)).toBe(18);
		expect(readingU(testerDefaults.acids.rows, 'Cu', 500)).toBe(25);
	});
	it('of a tester that was tried on white alloys only is theirs', () => {
		expect(readingU([{ metal: 'Au', colour: 'white', perMille: 750, u: 12 }], 'Au', 585)).toBe(12);
	});
	it('never leaves the rows of the metal, whatever order they stand in (1 000 cases)', () => {
		const row = fc.record<TesterRow>({
			metal: fc.constantFrom('Au', 'Ag'),
			colour: fc.constantFrom('any', 'white'),
			perMille: fc.integer({ min: 0, max: 1000 }),
			u: fc.integer({ min: 1, max: 300 })
		});
		const alloys = fc.uniqueArray(row, { minLength: 1, maxLength: 8, selector: (each) => `${each.metal} ${each.colour} ${each.perMille}` });
		fc.assert(
			fc.property(alloys, fc.integer({ min: 0, max: 1000 }), fc.boolean(), (list, perMille, white) => {
				const found = readingU(list, 'Au', perMille, white);
				const own = list.filter(({ metal }) => metal === 'Au');
				const us = (own.length > 0 ? own : list).map(({ u }) => u);
				expect(found).toBeGreaterThanOrEqual(Math.min(...us) - 1e-9);
				expect(found).toBeLessThanOrEqual(Math.max(...us) + 1e-9);
				expect(readingU([...list].reverse(), 'Au', perMille, white)).toBe(found);
			}),
			{ numRuns: 1_000 }
		);
	});
});
