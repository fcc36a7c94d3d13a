import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { densityByWater, waterDoubts } from '../../../src/trade/evidence/water-weighing.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { waterDensity } from '../../../src/trade/evidence/water.ts';
import { seeded, water } from './some-findings.ts';

function of(...args: Parameters<typeof water>) {
	const found = densityByWater(water(...args));
	if (!found.ok) throw new Error(JSON.stringify(found.problem));
	return found.value;
}
const hung = (air: string, inWater: string, parts: object = {}) =>
	densityByWater({ method: 'suspended', air: decimal(air), water: decimal(inWater), division: decimal('0.01'), temperature: decimal('20'), ...parts });

describe('weighing in water', () => {
	it('finds the density that the readings were made from', () => {
		for (const density of [8.6, 10.36, 13.1, 19.3]) expect(of(density, 200).density.value).toBeCloseTo(density, 2);
	});

	it('finds the same by the gain of a beaker', () => {
		const hanging = hung('20.00', '18.47');
		const beaker = densityByWater({ method: 'beaker', air: decimal('20'), water: decimal('1.53'), division: decimal('0.01'), temperature: decimal('20') });
		expect(hanging.ok && beaker.ok && hanging.value.density.value).toBe(beaker.ok && beaker.value.density.value);
	});

	it('is useless for a ring of 2 g and for 5 g at 13 g/cm³ on a scale of 0.01 g, and says what would help', () => {
		const ring = of(13.1, 2);
		expect(ring.useful).toBe(false);
		// a relative doubt of 1 % needs a lift of about half a gram: 6 g of 14 kt
		expect(ring.leastGrams).toBeGreaterThan(5);
		expect(ring.leastGrams).toBeLessThan(8);
		expect(ring.leastDivision).toBe(0.002);
		expect(of(13.1, 2, { division: decimal('0.001') }).useful).toBe(true);
		expect(of(13, 5).useful).toBe(false);
		expect(of(13.1, 5).useful).toBe(false);
		expect(of(13.1, 20).useful).toBe(true);
		expect(of(13.1, ring.leastGrams * 1.05).useful).toBe(true);
		expect(of(13.1, ring.leastGrams * 0.95).useful).toBe(false);
		// no scale helps where a bubble is more than all the doubt there may be
		expect(of(13.1, 0.3, { division: decimal('0.0001') }).leastDivision).toBe(0);
	});

	it.each(['suspended', 'beaker'] as const)('agrees with the scatter of twenty thousand simulated weighings, %s', (method) => {
		const [grams, truth, division] = [6, 13.1, 0.01];
		const dice = seeded(method === 'beaker' ? 11 : 7);
		const bell = () => Math.sqrt(-2 * Math.log(1 - dice())) * Math.cos(2 * Math.PI * dice());
		const step = () => division * (dice() - 0.5);
		const liquid = (celsius: number) => {
			const found = waterDensity(celsius);
			if (!found.ok) throw new Error(found.problem.kind);
			return found.value;
		};
		const lift = (grams * (liquid(20) - 0.0012)) / (truth - 0.0012);
		const found: number[] = [];
		for (let round = 0; round < 20_000; round += 1) {
			const bubble = bell() * waterDoubts.bubble * 0.001;
			const inAir = grams + step();
			const up = lift + bubble * liquid(20) + (method === 'beaker' ? step() - step() : inAir - grams - step());
			found.push((inAir * (liquid(20 + bell() * waterDoubts.temperatureU) - 0.0012)) / up + 0.0012);
		}
		const mean = found.reduce((sum, x) => sum + x, 0) / found.length;
		const scatter = Math.sqrt(found.reduce((sum, x) => sum + (x - mean) ** 2, 0) / (found.length - 1));
		const reading = method === 'beaker' ? lift : grams - lift;
		const exact = densityByWater({
			method, air: decimal('6'), water: decimal(reading.toFixed(9)), division: decimal('0.01'), temperature: decimal('20')
		});
		if (!exact.ok) throw new Error(exact.problem.kind);
		expect(exact.value.density.value).toBeCloseTo(truth, 6);
		expect(Object.keys(exact.value.density.contributions).sort()).toEqual(['air', 'bubble', 'temperature', 'water']);
		expect(Math.abs(standardUncertainty(exact.value.density) / scatter - 1)).toBeLessThan(0.02);
	});

	it('takes the doubts that it is given, each for itself', () => {
		const twice = densityByWater(water(13.1, 20), { temperatureU: 2 * waterDoubts.temperatureU, bubble: 2 * waterDoubts.bubble });
		const once = of(13.1, 20).density.contributions;
		if (!twice.ok) throw new Error(twice.problem.kind);
		expect(twice.value.density.contributions.bubble).toBeCloseTo(2 * once.bubble!, 12);
		expect(twice.value.density.contributions.temperature).toBeCloseTo(2 * once.temperature!, 12);
		expect(twice.value.density.contributions.water).toBe(once.water);
		const none = densityByWater(water(13.1, 20), { temperatureU: 0, bubble: 0 });
		expect(none.ok && Math.abs(none.value.density.contributions.bubble!)).toBe(0);
	});

	it('carries the temperature with its whole slope and its sign, at the ends of the table as within', () => {
		const at = (celsius: string) => {
			const found = hung('20', '18.47', { temperature: decimal(celsius) });
			if (!found.ok) throw new Error(found.problem.kind);
			return found.value.density.contributions.temperature! / found.value.density.value;
		};
		// water at 40 °C loses 0.38 parts in a thousand per degree, at 20 °C 0.21; below 4 °C it gains
		expect(at('40')).toBeCloseTo(-0.000385, 5);
		expect(at('20')).toBeCloseTo(-0.000207, 5);
		expect(at('0')).toBeCloseTo(0.000068, 5);
	});

	it('refuses what cannot be', () => {
		expect(hung('20', '20')).toMatchObject({ ok: false, problem: { kind: 'water-no-loss' } });
		expect(hung('0', '0')).toMatchObject({ ok: false, problem: { kind: 'water-mass-not-positive' } });
		expect(hung('20', '-1')).toMatchObject({ ok: false, problem: { kind: 'water-mass-not-positive' } });
		expect(hung('20', '19.9')).toMatchObject({ ok: false, problem: { kind: 'water-density-unlikely' } });
		expect(hung('20', '18', { temperature: decimal('55') })).toMatchObject({ ok: false, problem: { kind: 'water-temperature', celsius: 55 } });
	});

	it('gives a density or a reason for any readings', () => {
		const grams = fc.integer({ min: -100, max: 100_000 }).map((n) => decimal((n / 100).toFixed(2)));
		fc.assert(
			fc.property(fc.constantFrom('suspended' as const, 'beaker' as const), grams, grams, fc.integer({ min: -10, max: 60 }), (method, air, inWater, t) => {
				const found = densityByWater({ method, air, water: inWater, division: decimal('0.01'), temperature: decimal(String(t)) });
				if (!found.ok) return;
				const { density, leastGrams } = found.value;
				expect(density.value >= 1 && density.value <= 25 && standardUncertainty(density) > 0 && leastGrams > 0).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
});
