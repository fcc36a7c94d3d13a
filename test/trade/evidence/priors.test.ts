import { describe, expect, it } from 'vitest';
import { hypotheses } from '../../../src/trade/evidence/belief.ts';
import { momentsOf, quantileOf } from '../../../src/trade/evidence/grid.ts';
import { origins } from '../../../src/trade/evidence/origin.ts';
import { defaultPriors, priorOf } from '../../../src/trade/evidence/priors.ts';
import { bar999, stamped14, unmarked } from './some-findings.ts';

const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);

describe('what a piece is before any test', () => {
	it('has odds that sum to one, and distributions that do', () => {
		for (const origin of origins) {
			expect(hypotheses.reduce((total, id) => total + defaultPriors[origin][id], 0)).toBeCloseTo(1, 12);
			const prior = priorOf({ ...stamped14, origin });
			for (const id of hypotheses) expect(sum(prior.bulk[id])).toBeCloseTo(1, 9);
		}
	});
	it('puts the honest piece within what the law gives, and the short one below', () => {
		const { bulk } = priorOf(stamped14);
		const within = bulk.honest.reduce((total, chance, cell) => total + (cell >= 576 && cell <= 587 ? chance : 0), 0);
		expect(within).toBeGreaterThan(0.95);
		expect(quantileOf(bulk.under, 0.999)).toBeLessThan(577);
		expect(momentsOf(bulk.under).mean).toBeCloseTo(1750 / 3 - 7 - 12, 0);
		expect(momentsOf(bulk.layered).mean).toBeLessThan(16);
	});
	it('has no other karat at the mark itself, and any without a mark', () => {
		const { bulk } = priorOf(stamped14);
		expect(bulk.other[585]!).toBeLessThan(bulk.other[417]! / 10);
		expect(bulk.other[417]!).toBeGreaterThan(bulk.other[750]!);
		const free = priorOf(unmarked);
		expect(free.odds).toEqual({ honest: 0, under: 0, other: 0.9, layered: 0.1 });
		expect(free.bulk.other[585]!).toBeGreaterThan(free.bulk.other[750]!);
	});
	it('believes a stated composition without a stamp for the most part, as of dental alloys', () => {
		const { odds, bulk } = priorOf({ ...unmarked, claimed: 625, legal: 625 });
		expect(odds.other).toBeCloseTo(0.9, 12);
		expect(quantileOf(bulk.other, 0.5)).toBeGreaterThan(600);
		expect(quantileOf(bulk.other, 0.5)).toBeLessThan(640);
		expect(sum(bulk.other)).toBeCloseTo(1, 9);
	});
	it('takes the buyer\'s own odds, scaled to one', () => {
		const own = priorOf(bar999, { 'stranger-bar': { honest: 3, under: 0, other: 0, layered: 1 } });
		expect(own.odds).toEqual({ honest: 0.75, under: 0, other: 0, layered: 0.25 });
		expect(() => priorOf(bar999, { 'stranger-bar': { honest: 0, under: 0, other: 0, layered: 0 } })).toThrow('positive sum');
	});
});
