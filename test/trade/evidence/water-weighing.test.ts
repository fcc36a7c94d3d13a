import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { densityByWater } from '../../../src/trade/evidence/water-weighing.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { water } from './some-findings.ts';

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
		expect(of(13.1, 4.9).useful).toBe(false);
		expect(of(13.1, 20).useful).toBe(true);
		expect(of(13.1, ring.leastGrams * 1.05).useful).toBe(true);
		expect(of(13.1, ring.leastGrams * 0.95).useful).toBe(false);
		// no scale helps where a bubble is more than all the doubt there may be
		expect(of(13.1, 0.3, { division: decimal('0.0001') }).leastDivision).toBe(0);
	});

	it('agrees with the doubt of a thousand weighings by dice', () => {
		const { density } = of(13.1, 20);
		const u = standardUncertainty(density);
		// lift 1.5226 g: √(1/12)/100 twice of it, and 0.5 mm³; mostly the lift's own relative doubt
		const lift = 20 * (0.998207 - 0.0012) / (13.1 - 0.0012);
		const expected = 13.1 * Math.hypot(0.01 / Math.sqrt(6) / lift, 0.0005 / lift);
		expect(Math.abs(u / expected - 1)).toBeLessThan(0.06);
		expect(Object.keys(density.contributions).sort()).toEqual(['air', 'bubble', 'temperature', 'water']);
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
