import { describe, expect, it } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { testValue, type Possible } from '../../../src/trade/evidence/next-test.ts';
import { atOdds, casesOf, swing, worthOfCertainty } from '../../../src/trade/evidence/stake.ts';
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
		expect(swing(half(), stake)).toEqual({ lost: 125, won: 75 });
		expect(worthOfCertainty({ lost: 125, won: 75 })).toBe(75);
		expect(worthOfCertainty({ lost: 20, won: 75 })).toBe(20);
	});
	it('is parted into the layered piece and any other, and put together again at any odds', () => {
		const under = new Float64Array(1001);
		under[0] = 1;
		const cases = casesOf(half(), 0.25, under, stake);
		expect(cases.layered).toEqual({ lost: 500, won: 0 });
		expect(cases.sound.lost).toBe(0);
		expect(cases.sound.won).toBeCloseTo(100, 9);
		expect(atOdds(cases, 0.25).lost).toBeCloseTo(125, 9);
		expect(atOdds(cases, 0).won).toBeCloseTo(100, 9);
	});
	it('is worth at least what any test is worth', () => {
		const start = startOf(chain14);
		const findings = [touch(), reading(588), water(8.75)];
		const now = assess(start, findings);
		const most = worthOfCertainty(swing(now.bulk, stake));
		const tests: Possible[] = [
			{ kind: 'core', u: 5, gross: 0.005 }, { kind: 'assay', u: 1, gross: 0.002 }, { kind: 'touch', how: 'notch', u: 15, gross: 0.02 }
		];
		for (const test of tests) expect(testValue(start, findings, test, stake, 0).gain).toBeLessThanOrEqual(most * (1 + 1e-9) + 1e-9);
		// parting it by the bulk before any test changes hardly anything
		const parted = atOdds(casesOf(now.bulk, now.odds.layered, start.prior.bulk.layered, stake), now.odds.layered);
		expect(Math.abs(parted.lost / swing(now.bulk, stake).lost - 1)).toBeLessThan(0.02);
	});
});
