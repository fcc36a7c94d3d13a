import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { anyIfAlike, bagPlan, BAG_WEIGHT, toldByOpened, type BagPiece } from '../../../src/trade/lot/bag.ts';

/** Worth 600 if it is sound and nothing if it is layered; 500 are asked for it. */
const piece = (key: string, odds: number, scale = 1, opened = false): BagPiece => ({
	key,
	count: 1,
	odds,
	opened,
	stake: { whole: 1_000 * scale, price: 500 * scale },
	cases: { layered: { lost: 500 * scale, won: 0, atLoss: 1 }, sound: { lost: 0, won: 100 * scale, atLoss: 0 } }
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
		expect(plan.rest.atLoss).toBeCloseTo(0.01 + 0.1, 12);
		expect(plan.rest.anyLayered.alone).toBeCloseTo(1 - 0.99 * 0.9, 12);
		// four pieces' worth of knowledge at 5.5 %: 3.78 of 4 sound, then 4.78 of 5
		expect(plan.rest.anyLayered.alike).toBeCloseTo(1 - (3.78 / 4) * (4.78 / 5), 12);
	});

	it('takes pieces that were weighed together as so many pieces', () => {
		const entries = [piece('chain', 0.1), piece('ring', 0.01), piece('ring too', 0.01), piece('chain too', 0.1)];
		const apart = bagPlan(entries, 0.05, 12);
		const together = bagPlan([{ ...piece('chain', 0.1), count: 2 }, { ...piece('ring', 0.01), count: 2 }], 0.05, 12);
		expect(together.test).toEqual([{ key: 'chain', count: 2, odds: 0.1, gain: expect.closeTo(50, 9) }]);
		expect([together.tests, together.cost, together.pieces]).toEqual([2, 24, 4]);
		expect([apart.tests, apart.cost, apart.pieces]).toEqual([2, 24, 4]);
		expect(together.gain).toBeCloseTo(apart.gain, 9);
		for (const name of ['pieces', 'worth', 'price', 'lost', 'atLoss'] as const) expect(together.rest[name]).toBeCloseTo(apart.rest[name], 9);
		for (const name of ['alone', 'alike'] as const) expect(together.rest.anyLayered[name]).toBeCloseTo(apart.rest.anyLayered[name], 12);
	});

	it('finds a layer in any of them less likely when they are alike than when each stands alone', () => {
		// weight 4 at 5 %: nothing in fifty has a chance of B(0.2, 53.8) over B(0.2, 3.8)
		expect(anyIfAlike(1, 0.05, 4)).toBeCloseTo(0.05, 12);
		expect(anyIfAlike(2, 0.05, 4)).toBeCloseTo(1 - 0.95 * (4.8 / 5), 12);
		expect([anyIfAlike(0, 0.05, 4), anyIfAlike(50, 0, 4), anyIfAlike(3, 1, 4)]).toEqual([0, 0, 1]);
		fc.assert(
			fc.property(fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 60 }), fc.integer({ min: 0, max: 5 }), (list, opened) => {
				const bag = [...list.map((odds, at) => piece(`p${at}`, odds)), ...Array.from({ length: opened }, (_, at) => piece(`o${at}`, 0, 1, true))];
				const { alone, alike } = bagPlan(bag, 0.05, 1e9).rest.anyLayered;
				expect(alike).toBeLessThanOrEqual(alone + 1e-12);
				expect(alike).toBeGreaterThanOrEqual(-1e-12);
			}),
			{ numRuns: 1_000 }
		);
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
		expect(bagPlan([], 0, 12)).toMatchObject({ test: [], cost: 0, gain: 0, pieces: 0, tests: 0, rest: { pieces: 0, anyLayered: { alone: 0, alike: 0 } } });
		fc.assert(
			fc.property(fc.array(fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.boolean(), fc.integer({ min: 1, max: 9 })), { maxLength: 40 }), (list) => {
				const bag = list.map(([odds, opened, count], at) => ({ ...piece(`p${at}`, odds, 1, opened), count }));
				const { pieces, tests, rest, opened } = bagPlan(bag, 0.05, 12);
				const shut = bag.filter((each) => !each.opened).reduce((sum, { count }) => sum + count, 0);
				expect([tests + rest.pieces, pieces, opened.pieces]).toEqual([shut, shut, bag.filter((each) => each.opened).length]);
				for (const any of Object.values(rest.anyLayered)) expect(any >= -1e-12 && any <= 1).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
});
