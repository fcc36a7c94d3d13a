import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { normalCdf, normalDensity, normalQuantile } from '../../../src/trade/uncertainty/normal.ts';

/** A second route: 1/2 + density x (z + z^3/3 + z^5/15 + ...), every term of one sign, so nothing cancels. */
function bySeries(z: number): number {
	let term = z;
	let total = z;
	for (let k = 3; k < 401; k += 2) {
		term *= (z * z) / k;
		total += term;
	}
	return 0.5 + (total * Math.exp((-z * z) / 2)) / Math.sqrt(2 * Math.PI);
}

describe('the normal distribution', () => {
	it('agrees with its power series (1 000 cases)', () => {
		fc.assert(
			fc.property(fc.double({ min: -6, max: 6, noNaN: true }), (z) => {
				expect(Math.abs(normalCdf(z) - bySeries(z))).toBeLessThan(2e-15);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is symmetric, and the density is its slope (1 000 cases)', () => {
		fc.assert(
			fc.property(fc.double({ min: -8, max: 8, noNaN: true }), (z) => {
				expect(Math.abs(normalCdf(z) + normalCdf(-z) - 1)).toBeLessThan(2e-16 * 2);
				expect(normalDensity(z)).toBe(normalDensity(-z));
				const h = 1e-4;
				expect(Math.abs((normalCdf(z + h) - normalCdf(z - h)) / (2 * h) - normalDensity(z))).toBeLessThan(5e-9);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('quantile and distribution undo each other, also far in the tail (1 000 cases)', () => {
		fc.assert(
			fc.property(fc.double({ min: -300, max: -0.302, noNaN: true }), (power) => {
				const p = 10 ** power;
				const z = normalQuantile(p);
				// the share changes by |z| density / p for a relative step of z: that is the precision to ask for
				expect(Math.abs(normalCdf(z) / p - 1)).toBeLessThan(1e-15 * (2 + z * z));
				if (power > -15) expect(normalQuantile(1 - p)).toBeCloseTo(-z, power > -5 ? 9 : 0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is continuous where one approximation hands over to the next', () => {
		for (const z of [0.67448975, Math.sqrt(32), -0.67448975, -Math.sqrt(32)]) {
			const [a, b] = [normalCdf(z - 1e-13), normalCdf(z + 1e-13)];
			expect(Math.abs(b / a - 1)).toBeLessThan(2e-12);
		}
		for (const p of [0.075, 0.925, Math.exp(-25)]) {
			const [a, b] = [normalQuantile(p * (1 - 1e-14)), normalQuantile(p * (1 + 1e-14))];
			expect(Math.abs(b - a)).toBeLessThan(1e-12);
		}
	});

	it('ends where double precision ends', () => {
		expect(normalCdf(-40)).toBe(0);
		expect(normalCdf(40)).toBe(1);
		expect(normalCdf(-Infinity)).toBe(0);
		expect(normalCdf(Infinity)).toBe(1);
		expect(normalDensity(50)).toBe(0);
		expect(normalQuantile(0.5)).toBe(0);
		expect(normalCdf(-38)).toBeGreaterThan(0);
	});

	it('refuses what is not a share', () => {
		for (const p of [0, 1, -0.1, 1.1, Number.NaN]) expect(() => normalQuantile(p)).toThrow(/a share must lie/);
		expect(() => normalCdf(Number.NaN)).toThrow(/not-a-number/);
	});
});
