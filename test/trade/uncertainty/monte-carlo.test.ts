import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { interval } from '../../../src/trade/uncertainty/coverage.ts';
import { monteCarlo, type Input } from '../../../src/trade/uncertainty/monte-carlo.ts';
import { propagate, standardUncertainty, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';

/** Numbers that look random and can be repeated: a 32-bit mixing generator with the given seed. */
function seeded(seed: number): () => number {
	let state = seed >>> 0;
	return () => {
		state = (state + 0x6d2b79f5) >>> 0;
		let t = Math.imul(state ^ (state >>> 15), state | 1);
		t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
		return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
	};
}

const sum = (inputs: readonly number[]) => inputs.reduce((a, b) => a + b, 0);

describe('drawing many times', () => {
	it('is the same for the same seed and another for another', () => {
		const inputs: Input[] = [{ distribution: 'normal', mean: 1, u: 0.1 }];
		expect(monteCarlo(sum, inputs, 100, seeded(1))).toEqual(monteCarlo(sum, inputs, 100, seeded(1)));
		expect(monteCarlo(sum, inputs, 100, seeded(1)).mean).not.toBe(monteCarlo(sum, inputs, 100, seeded(2)).mean);
	});

	it('agrees with propagation for linear models of normal inputs (1 000 models)', { timeout: 60_000 }, () => {
		const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
		const term = fc.tuple(between(-10, 10), between(0.1, 2), between(0.2, 3));
		let worst = 0;
		fc.assert(
			fc.property(fc.array(term, { minLength: 1, maxLength: 4 }), fc.nat(), (terms, seed) => {
				const inputs = terms.map(([mean, u]): Input => ({ distribution: 'normal', mean, u }));
				const model = (x: readonly number[]) => x.reduce((total, value, i) => total + terms[i]![2] * value, 0);
				const drawn = monteCarlo(model, inputs, 1_000, seeded(seed), 0.9);
				const value = terms.reduce((total, [mean, , c]) => total + c * mean, 0);
				const exactly = propagate(value, terms.map(([mean, u, c], i) => ({ input: uncertain(mean, `x:${i}`, u), sensitivity: c })));
				const u = standardUncertainty(exactly);
				const wanted = interval(exactly, 0.9);
				// errors of 1 000 draws in their own standard errors: mean u/root n, u itself u/root 2n, ends about 2.1 u/root n
				const off = [
					Math.abs(drawn.mean - value) / (u / Math.sqrt(1_000)),
					Math.abs(drawn.u - u) / (u / Math.sqrt(2_000)),
					Math.abs(drawn.low - wanted.low) / ((2.12 * u) / Math.sqrt(1_000)),
					Math.abs(drawn.high - wanted.high) / ((2.12 * u) / Math.sqrt(1_000))
				];
				worst = Math.max(worst, ...off);
				for (const z of off) expect(z).toBeLessThan(7);
			}),
			{ numRuns: 1_000 }
		);
		// and it does scatter: an answer copied from the formula would not
		expect(worst).toBeGreaterThan(1);
	});

	it('keeps a rectangular input within its ends', () => {
		const drawn = monteCarlo(sum, [{ distribution: 'rectangular', low: 2, high: 4 }], 20_000, seeded(7), 0.5);
		expect(drawn.mean).toBeCloseTo(3, 1);
		expect(drawn.u).toBeCloseTo(1 / Math.sqrt(3), 1);
		expect(drawn.low).toBeCloseTo(2.5, 1);
		expect(drawn.high).toBeCloseTo(3.5, 1);
		expect(drawn.coverage).toBe(0.5);
	});

	it('leaves as many values below as above', () => {
		let next = 0;
		// 100 evenly spaced shares: ranks can be counted by hand
		const drawn = monteCarlo(sum, [{ distribution: 'rectangular', low: 0, high: 100 }], 100, () => (next++ % 100) / 100, 0.9);
		expect(drawn.low).toBeCloseTo(4, 9);
		expect(drawn.high).toBeCloseTo(94, 9);
	});

	it('bears the lowest random share', () => {
		const drawn = monteCarlo(sum, [{ distribution: 'normal', mean: 0, u: 1 }], 2, () => 0);
		expect(drawn.mean).toBeLessThan(-8);
		expect(Number.isFinite(drawn.mean)).toBe(true);
	});

	it('refuses too few draws, a broken model and a broken source of randomness', () => {
		const inputs: Input[] = [{ distribution: 'normal', mean: 0, u: 1 }];
		expect(() => monteCarlo(sum, inputs, 1, seeded(1))).toThrow(/at least two draws/);
		expect(() => monteCarlo(() => Number.NaN, inputs, 10, seeded(1))).toThrow(/draw 1 of the model/);
		expect(() => monteCarlo(sum, inputs, 10, () => 1)).toThrow(/random share/);
		expect(() => monteCarlo(sum, inputs, 10, seeded(1), 1)).toThrow(/a coverage must lie/);
	});
});
