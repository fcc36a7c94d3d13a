import { describe, expect, it } from 'vitest';
import { bellPrior, CELLS, cellHigh, cellLow, flat, momentsOf, normalised, quantileOf, readingLikelihood } from '../../../src/trade/evidence/grid.ts';

const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);

describe('the grid of fineness', () => {
	it('has cells of one part per thousand, the outermost half as wide', () => {
		expect([cellLow(0), cellHigh(0), cellLow(585), cellHigh(585), cellHigh(1000)]).toEqual([0, 0.5, 584.5, 585.5, 1000]);
		expect(flat().every((value) => value === 1)).toBe(true);
	});

	it('spreads a reading as a bell with a small flat part', () => {
		const values = readingLikelihood(585, 5, 0.03);
		expect(values).toHaveLength(CELLS);
		// the bell's height at its middle, averaged over a cell, and a twentieth of it at 2.448 standard deviations
		expect(values[585]).toBeCloseTo(0.97 * 0.07966 + 0.03 / 1000, 4);
		expect(values[580]! / values[585]!).toBeCloseTo(Math.exp(-0.5), 2);
		expect(values[100]).toBeCloseTo(0.00003, 12);
		expect(sum(values)).toBeCloseTo(0.97 + 0.03 * 1.001, 9);
	});

	it('keeps a reading finer than a cell where it is', () => {
		const values = normalised(readingLikelihood(585.3, 0.2, 0));
		expect(momentsOf(values).mean).toBeCloseTo(585.16, 2);
		expect(values[585]).toBeCloseTo(0.8413, 4);
	});

	it('makes distributions that sum to one, what falls outside standing at the edge', () => {
		const bell = bellPrior(999.9, 1.2);
		expect(sum(bell)).toBeCloseTo(1, 12);
		expect(bell[1000]).toBeGreaterThan(0.6);
		expect(sum(bellPrior(-50, 3))).toBeCloseTo(1, 12);
		expect(bellPrior(-50, 3)[0]).toBeCloseTo(1, 12);
		expect(() => normalised(new Float64Array(3))).toThrow('positive sum');
	});

	it('finds quantiles between the edges of a cell', () => {
		const even = new Float64Array(CELLS);
		even[10] = 0.5;
		even[20] = 0.5;
		expect(quantileOf(even, 0.25)).toBeCloseTo(10, 12);
		expect(quantileOf(even, 0.5)).toBeCloseTo(10.5, 12);
		expect(quantileOf(even, 0.75)).toBeCloseTo(20, 12);
		expect(quantileOf(Float64Array.of(1, 0, 0), 0.5)).toBeCloseTo(0.25, 12);
		const { mean, sd } = momentsOf(bellPrior(585, 4));
		expect(mean).toBeCloseTo(585, 9);
		// a bell in cells of width 1 gains a twelfth of variance
		expect(sd).toBeCloseTo(Math.sqrt(16 + 1 / 12), 6);
	});
});
