import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bagPlan, BAG_WEIGHT, toldByOpened, type BagPiece } from '../../../src/trade/lot/bag.ts';

/** Worth 600 if it is sound and nothing if it is layered; 500 are asked for it. */
const piece = (key: string, odds: number, scale = 1, opened = false): BagPiece => ({
	key,
	odds,
	opened,
	stake: { whole: 1_000 * scale, price: 500 * scale },
	cases: { layered: { lost: 500 * scale, won: 0 }, sound: { lost: 0, won: 100 * scale } }
});

describe('a bag at a fair', () => {
	it('has the pieces opened for which knowing is worth more than it costs, the most worth it first', () => {
		const bag = [piece('ring', 0.01), piece('chain', 0.1), piece('large chain', 0.1, 3), piece('small', 0.1, 0.1)];
		const plan = bagPlan(bag, 0.05, 12);
		// knowing: 5, 50, 150 and 5
		expect(plan.test.map(({ key }) => key)).toEqual(['large chain', 'chain']);
		expect(plan.test.map(({ gain }) => gain)).toEqual([150, 50].map((value) => expect.closeTo(value, 9)));
		expect(plan.cost).toBe(24);
		expect(plan.gain).toBeCloseTo(200, 9);
		expect(plan.rest.pieces).toBe(2);
		expect(plan.rest.price).toBe(550);
		expect(plan.rest.lost).toBeCloseTo(0.01 * 500 + 0.1 * 50, 9);
		expect(plan.rest.worth).toBeCloseTo(550 + 0.99 * 100 - 5 + 0.9 * 10 - 5, 9);
		expect(plan.rest.anyLayered).toBeCloseTo(1 - 0.99 * 0.9, 12);
	});

	it('learns of the others from those that were opened', () => {
		expect(toldByOpened(0.05, 0, 0)).toBe(1);
		// weight 4 at 5 %: 0.2 layered of 4; one more layered makes 1.2 of 5, that is 24 %: odds 0.3158 against 0.0526
		expect(toldByOpened(0.05, 1, 1)).toBeCloseTo((0.24 / 0.76) / (0.05 / 0.95), 9);
		expect(toldByOpened(0.05, 3, 0)).toBeLessThan(1);
		expect(toldByOpened(0.05, 3, 1)).toBeGreaterThan(1);
		const bag = [piece('opened', 0.999, 1, true), piece('other', 0.02)];
		const plan = bagPlan(bag, 0.05, 12);
		expect(plan.opened).toEqual({ pieces: 1, layered: 1 });
		expect(plan.test.map(({ key }) => key)).toEqual(['other']);
		expect(plan.test[0]!.odds).toBeGreaterThan(0.1);
		expect(bagPlan(bag.slice(1), 0.05, 12).test).toEqual([]);
	});

	it('predicts the next piece as the beta-binomial does', () => {
		fc.assert(
			fc.property(fc.double({ min: 0.001, max: 0.9, noNaN: true }), fc.integer({ min: 1, max: 50 }), fc.double({ min: 0, max: 1, noNaN: true }), (rate, opened, share) => {
				const layered = Math.round(opened * share);
				const [a, b] = [BAG_WEIGHT * rate, BAG_WEIGHT * (1 - rate)];
				const next = (a + layered) / (a + b + opened);
				const odds = (rate / (1 - rate)) * toldByOpened(rate, opened, layered);
				expect(Math.abs(odds / (1 + odds) - next)).toBeLessThan(1e-9);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is nothing without pieces, and leaves nothing out', () => {
		expect(bagPlan([], 0, 12)).toMatchObject({ test: [], cost: 0, gain: 0, rest: { pieces: 0, anyLayered: 0 } });
		fc.assert(
			fc.property(fc.array(fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.boolean()), { maxLength: 40 }), (list) => {
				const bag = list.map(([odds, opened], at) => piece(`p${at}`, odds, 1, opened));
				const { test, rest, opened } = bagPlan(bag, 0.05, 12);
				expect(test.length + rest.pieces + opened.pieces).toBe(bag.length);
				expect(rest.anyLayered >= 0 && rest.anyLayered <= 1).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
});
