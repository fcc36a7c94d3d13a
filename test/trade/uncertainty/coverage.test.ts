import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coverageFactor, interval } from '../../../src/trade/uncertainty/coverage.ts';
import { normalCdf } from '../../../src/trade/uncertainty/normal.ts';
import { certain, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';

describe('the coverage interval', () => {
	it('is a point for a certain value', () => {
		expect(interval(certain(3), 0.9)).toEqual({ low: 3, high: 3 });
	});

	it('lies evenly about the value and holds the share asked for (1 000 cases)', () => {
		const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
		fc.assert(
			fc.property(between(0.01, 0.999), between(-100, 100), between(0.001, 100), (p, value, u) => {
				const { low, high } = interval(uncertain(value, 'a', u), p);
				expect((low + high) / 2).toBeCloseTo(value, 9);
				expect(normalCdf((high - value) / u) - normalCdf((low - value) / u)).toBeCloseTo(p, 9);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('refuses a coverage that is not between 0 and 1', () => {
		for (const p of [0, 1, -1, 95, Number.NaN]) expect(() => coverageFactor(p)).toThrow(/a coverage must lie/);
	});
});
