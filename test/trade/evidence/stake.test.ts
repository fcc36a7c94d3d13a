import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { testValue, type Possible } from '../../../src/trade/evidence/next-test.ts';
import { atOdds, casesOf, expectedWorth, swing, worthOfCertainty } from '../../../src/trade/evidence/stake.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { chain14, reading, touch, water } from './some-findings.ts';

const stake = { whole: 1_000, price: 500 };
const half = () => {
	const bulk = new Float64Array(1001);
	bulk[0] = 0.25;
	bulk[600] = 0.75;
	return bulk;
};

describe('what is at stake', () => {
	it('is lost and won where it happens', () => {
		// a quarter is worth nothing and costs 500; three quarters are worth 600
		expect(swing(half(), stake)).toEqual({ lost: 125, won: 75, atLoss: 0.25 });
		// on average three quarters of 600
		expect(expectedWorth(swing(half(), stake), stake)).toBe(450);
		expect(worthOfCertainty({ lost: 125, won: 75 })).toBe(75);
		expect(worthOfCertainty({ lost: 20, won: 75 })).toBe(20);
	});
	it('is parted into the layered piece and any other, and put together again at any odds', () => {
		const under = new Float64Array(1001);
		under[0] = 1;
		const cases = casesOf(half(), 0.25, under, stake);
		expect(cases.layered).toEqual({ lost: 500, won: 0, atLoss: 1 });
		expect(cases.sound.lost).toBe(0);
		expect(cases.sound.won).toBeCloseTo(100, 9);
		expect(atOdds(cases, 0.25).lost).toBeCloseTo(125, 9);
		expect(atOdds(cases, 0).won).toBeCloseTo(100, 9);
		expect(atOdds(cases, 0.25).atLoss).toBeCloseTo(0.25, 9);
		expect(casesOf(under, 1, under, stake).sound).toEqual({ lost: 0, won: 0, atLoss: 0 });
	});
	it('is what a buyer who knows would save or win, and the worth is the mean of the bulk', () => {
		const weights = fc.array(fc.tuple(fc.integer({ min: 0, max: 1000 }), fc.double({ min: 0.01, max: 1, noNaN: true })), { minLength: 1, maxLength: 12 });
		fc.assert(
			fc.property(weights, fc.double({ min: 0, max: 2_000, noNaN: true }), (cells, price) => {
				const bulk = new Float64Array(1001);
				const total = cells.reduce((sum, [, weight]) => sum + weight, 0);
				for (const [cell, weight] of cells) bulk[cell]! += weight / total;
				const found = swing(bulk, { whole: 1_000, price });
				const mean = bulk.reduce((sum, chance, cell) => sum + chance * cell, 0);
				// who knows buys exactly what is worth its price; who does not buys all of it or nothing
				const knows = bulk.reduce((sum, chance, cell) => sum + chance * Math.max(0, cell - price), 0);
				expect(Math.abs(expectedWorth(found, { whole: 1_000, price }) - mean)).toBeLessThan(1e-8);
				expect(Math.abs(worthOfCertainty(found) - (knows - Math.max(0, mean - price)))).toBeLessThan(1e-8);
				expect(found.atLoss).toBeGreaterThanOrEqual(0);
				expect(found.atLoss).toBeLessThanOrEqual(1 + 1e-9);
				if (found.lost > 0) expect(found.atLoss).toBeGreaterThan(0);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('is worth at least what any test is worth, at any price', () => {
		const start = startOf(chain14);
		const findings = [touch(), reading(588), water(8.75)];
		const now = assess(start, findings);
		const tests: Possible[] = [
			{ kind: 'core', u: 5, gross: 0.005 }, { kind: 'assay', u: 1, gross: 0.002 }, { kind: 'touch', how: 'notch', u: 15, gross: 0.02 }
		];
		const known = [assess(start, []), now] as const;
		for (const [index, each] of [[], findings].entries()) {
			for (const price of [50, 300, 500, 560, 620]) {
				const at = { whole: 1_000, price };
				const most = worthOfCertainty(swing(known[index]!.bulk, at));
				for (const test of tests) expect(testValue(start, each, test, at, 0).gain).toBeLessThanOrEqual(most * (1 + 1e-9) + 1e-9);
			}
		}
		// parting it by the bulk before any test changes hardly anything
		const parted = atOdds(casesOf(now.bulk, now.odds.layered, start.prior.bulk.layered, stake), now.odds.layered);
		expect(Math.abs(parted.lost / swing(now.bulk, stake).lost - 1)).toBeLessThan(0.02);
	});
});
