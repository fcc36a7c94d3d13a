import { describe, expect, it } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { nextTests, testValue, type Possible } from '../../../src/trade/evidence/next-test.ts';
import { bar999, chain14, core, reading, stamped14, touch, water } from './some-findings.ts';

const tests: readonly Possible[] = [
	{ kind: 'core', u: 12, gross: 0.005 }, { kind: 'fluorescence', u: 16, gross: 0.03 }, { kind: 'touch', how: 'notch', u: 15, gross: 0.02 },
	{ kind: 'water', u: 0.05 }, { kind: 'magnet' }, { kind: 'assay', u: 1, gross: 0.002 }
];
const costs = { core: 12, fluorescence: 2, touch: 1, water: 2, magnet: 0.2, assay: 60, coin: 0.5 };
const stake = { whole: 1_000, price: 500 };

describe('the next test', () => {
	it('is to cut the hollow chain that the water doubts', () => {
		const found = [touch(), reading(588), water(8.75)];
		const ranked = nextTests(startOf(chain14), found, tests, stake, costs);
		expect(ranked[0]!.test.kind).toBe('core');
		expect(ranked[0]!.net).toBeGreaterThan(50);
		// what was done is not offered again
		expect(ranked.map(({ test }) => test.kind).sort()).toEqual(['assay', 'core', 'magnet', 'touch']);
		// a fire assay tells little more than a cut, for five times the cost
		expect(ranked.find(({ test }) => test.kind === 'assay')!.net).toBeLessThan(ranked[0]!.net);
	});

	it('is worth no more than knowing for certain', () => {
		const start = startOf(chain14);
		const found = [touch(), reading(588), water(8.75)];
		const now = assess(start, found);
		// bought as things stand a loss would be the price less what the piece is worth; known for certain, all of that is saved
		const certain = now.bulk.reduce((sum, chance, cell) => sum + chance * Math.max(0, stake.price - (stake.whole * cell) / 1000), 0);
		const keeps = (stake.whole * now.mean) / 1000 - stake.price;
		expect(keeps).toBeLessThan(0);
		const best = now.bulk.reduce((sum, chance, cell) => sum + chance * Math.max(0, (stake.whole * cell) / 1000 - stake.price), 0);
		for (const test of tests.filter(({ kind }) => kind !== 'water')) expect(testValue(start, found, test, stake, 0).gain).toBeLessThanOrEqual(best * 1.01 + 1e-9);
		expect(certain - best).toBeCloseTo(-keeps, 6);
		// a cut tells nearly everything
		expect(testValue(start, found, tests[0]!, stake, 0).gain).toBeGreaterThan(0.9 * best);
	});

	it('is none when the piece is settled or the price leaves nothing to lose', () => {
		const settled = nextTests(startOf(stamped14), [touch(), reading(588), water(13.2), core(580)], tests, stake, costs);
		expect(settled.every(({ net }) => net < 0)).toBe(true);
		const given = nextTests(startOf(chain14), [], tests, { whole: 1_000, price: 0 }, costs);
		expect(given.every(({ gain }) => gain === 0)).toBe(true);
	});

	it('is to drill a stranger\'s bar that is large enough', () => {
		const found = [reading(998, { u: 1 }), water(19.28, 100)];
		const large = nextTests(startOf(bar999), found, tests, { whole: 12_000, price: 11_500 }, costs);
		expect(large[0]!.test.kind).toBe('core');
		expect(large[0]!.net).toBeGreaterThan(100);
		// water cannot see what a drill does
		const unweighed = nextTests(startOf(bar999), [reading(998, { u: 1 })], tests, { whole: 12_000, price: 11_500 }, costs);
		const gain = (kind: string) => unweighed.find(({ test }) => test.kind === kind)!.gain;
		expect(gain('water')).toBeLessThan(0.3 * gain('core'));
	});
});
