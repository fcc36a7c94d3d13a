import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	certain, correlation, covariance, fromRepeats, minusUncertain, plusUncertain, propagate, standardUncertainty, sumUncertain, timesUncertain,
	uncertain, type Uncertain
} from '../../../src/trade/uncertainty/uncertain.ts';

const size = fc.double({ min: -1_000, max: 1_000, noNaN: true });
const source = fc.constantFrom('scale:a', 'scale:b', 'class:x', 'class:y', 'reading:1', 'reading:2', '__proto__', 'constructor');
const estimate = fc
	.tuple(size, fc.uniqueArray(fc.tuple(source, size), { selector: ([name]) => name, maxLength: 6 }))
	.map(([value, parts]): Uncertain => ({ value, contributions: Object.fromEntries(parts) }));
const close = (a: number, b: number, scale = 1) => expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(scale)));

describe('a value that remembers its doubts', () => {
	it('adds a shared error and squares an independent one', () => {
		const a = uncertain(10, 'scale:s', 0.3);
		const b = uncertain(20, 'scale:s', 0.4);
		expect(standardUncertainty(plusUncertain(a, b))).toBeCloseTo(0.7, 12);
		expect(standardUncertainty(plusUncertain(a, uncertain(20, 'scale:t', 0.4)))).toBeCloseTo(0.5, 12);
		expect(standardUncertainty(minusUncertain(b, a))).toBeCloseTo(0.1, 12);
		expect(plusUncertain(a, b).value).toBe(30);
	});

	it('does not average out: forty pieces on one scale share its error', () => {
		const shared = sumUncertain(Array.from({ length: 40 }, () => uncertain(5, 'scale:s', 0.01)));
		const own = sumUncertain(Array.from({ length: 40 }, (_, i) => uncertain(5, `reading:${i}`, 0.01)));
		expect(standardUncertainty(shared)).toBeCloseTo(0.4, 12);
		expect(standardUncertainty(own)).toBeCloseTo(0.01 * Math.sqrt(40), 12);
	});

	it('knows no doubt of a certain value', () => {
		expect(standardUncertainty(certain(7))).toBe(0);
		expect(correlation(certain(7), uncertain(1, 'a', 1))).toBe(0);
	});

	it('takes source names for names, whatever they are', () => {
		const odd = uncertain(1, '__proto__', 2);
		expect(standardUncertainty(odd)).toBe(2);
		expect(covariance(odd, certain(1))).toBe(0);
		expect(covariance(uncertain(1, 'toString', 2), uncertain(1, 'b', 3))).toBe(0);
		expect(standardUncertainty(plusUncertain(odd, odd))).toBe(4);
	});

	it('propagates as the formula by hand: variance = sum c_i c_j cov(i, j) (1 000 cases)', () => {
		fc.assert(
			fc.property(fc.array(fc.tuple(estimate, fc.double({ min: -5, max: 5, noNaN: true })), { maxLength: 6 }), (terms) => {
				const result = propagate(1, terms.map(([input, sensitivity]) => ({ input, sensitivity })));
				let variance = 0;
				for (const [a, ca] of terms) for (const [b, cb] of terms) variance += ca * cb * covariance(a, b);
				const scale = terms.reduce((total, [a, c]) => total + Math.abs(c) * standardUncertainty(a), 0);
				close(standardUncertainty(result) ** 2, variance, scale * scale);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('does not care in which order values are added (1 000 cases)', () => {
		const shuffled = fc.array(estimate, { minLength: 1, maxLength: 12 }).chain((list) =>
			fc.tuple(fc.constant(list), fc.shuffledSubarray(list.map((_, i) => i), { minLength: list.length, maxLength: list.length }))
		);
		fc.assert(
			fc.property(shuffled, ([list, order]) => {
				const straight = sumUncertain(list);
				const other = order.map((i) => list[i]!).reduce((a, b) => plusUncertain(a, b), certain(0));
				const scale = list.reduce((total, a) => total + Math.abs(a.value) + standardUncertainty(a), 0);
				close(straight.value, other.value, scale);
				close(standardUncertainty(straight), standardUncertainty(other), scale);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is linear, keeps correlation within bounds, and takes back what was added (1 000 cases)', () => {
		fc.assert(
			fc.property(estimate, estimate, size, (a, b, k) => {
				const r = correlation(a, b);
				expect(r).toBeGreaterThanOrEqual(-1);
				expect(r).toBeLessThanOrEqual(1);
				expect(covariance(a, b)).toBeCloseTo(covariance(b, a), 6);
				const scaled = timesUncertain(a, k);
				close(standardUncertainty(scaled), Math.abs(k) * standardUncertainty(a), k * standardUncertainty(a));
				const back = minusUncertain(plusUncertain(a, b), b);
				close(back.value, a.value, 1_000);
				close(standardUncertainty(back), standardUncertainty(a), 10_000);
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('repeated observations', () => {
	it('have the variance of the mean and the covariance of two means (1 000 cases)', () => {
		const pairs = fc.array(fc.tuple(size, size), { minLength: 2, maxLength: 20 });
		fc.assert(
			fc.property(pairs, (rows) => {
				const n = rows.length;
				const names = rows.map((_, i) => `run:${i}`);
				const [x, y] = [0, 1].map((column) => fromRepeats(rows.map((row) => row[column]!), names)) as [Uncertain, Uncertain];
				const mean = (column: 0 | 1) => rows.reduce((total, row) => total + row[column], 0) / n;
				const [mx, my] = [mean(0), mean(1)];
				close(x.value, mx, 1_000);
				const s2 = rows.reduce((total, row) => total + (row[0] - mx) ** 2, 0) / (n - 1);
				close(standardUncertainty(x) ** 2, s2 / n, 1e6);
				close(covariance(x, y), rows.reduce((total, row) => total + (row[0] - mx) * (row[1] - my), 0) / (n * (n - 1)), 1e6);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('keep their scatter beside a large common part', () => {
		const repeats = fromRepeats([1e9 + 0.25, 1e9 + 0.5, 1e9 + 0.75], ['a', 'b', 'c']);
		expect(repeats.value).toBe(1e9 + 0.5);
		expect(standardUncertainty(repeats)).toBeCloseTo(0.25 / Math.sqrt(3), 12);
	});
});

describe('our own mistakes', () => {
	it('stop at once', () => {
		expect(() => certain(Number.NaN)).toThrow(/must be a number/);
		expect(() => uncertain(1, 'a', Infinity)).toThrow(/the doubt from a/);
		expect(() => fromRepeats([1], ['a'])).toThrow(/not known/);
		expect(() => fromRepeats([1, 2], ['a', 'a'])).toThrow(/different sources/);
		expect(() => fromRepeats([1, 2], ['a'])).toThrow(/different sources/);
	});
});
