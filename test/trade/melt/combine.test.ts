import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { complement, product, quotient } from '../../../src/trade/melt/combine.ts';
import { certain, standardUncertainty, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';

describe('products and quotients of estimates', () => {
	it('add relative doubts of one source and square those of two', () => {
		expect(standardUncertainty(product(uncertain(2, 'a', 0.2), uncertain(5, 'a', 0.5)))).toBeCloseTo(2, 12);
		expect(standardUncertainty(product(uncertain(2, 'a', 0.2), uncertain(5, 'b', 0.5)))).toBeCloseTo(Math.SQRT2, 12);
		expect(standardUncertainty(quotient(uncertain(2, 'a', 0.2), uncertain(5, 'a', 0.5)))).toBeCloseTo(0, 12);
	});

	it('turn a share round with the opposite sign', () => {
		expect(complement(uncertain(0.2, 'dirt', 0.05))).toEqual({ value: 0.8, contributions: { dirt: -0.05 } });
	});

	it('stop at a division by nothing', () => {
		expect(() => quotient(certain(1), certain(0))).toThrow(/divided by zero/);
	});

	it('agree with the slope measured by a small step', () => {
		const size = fc.double({ min: 0.5, max: 50, noNaN: true });
		const u = fc.double({ min: -0.4, max: 0.4, noNaN: true });
		fc.assert(
			fc.property(size, size, u, u, (a, b, ua, ub) => {
				const step = 1e-6;
				const slope = (f: (t: number) => number) => (f(step) - f(-step)) / (2 * step);
				const [x, y] = [uncertain(a, 's', ua), uncertain(b, 's', ub)];
				expect(product(x, y).contributions['s']).toBeCloseTo(slope((t) => (a + t * ua) * (b + t * ub)), 5);
				const ratio = slope((t) => (a + t * ua) / (b + t * ub));
				expect(quotient(x, y).contributions['s']! - ratio).toBeLessThan(1e-5 * Math.max(1, Math.abs(ratio)));
				expect(quotient(x, y).contributions['s']! - ratio).toBeGreaterThan(-1e-5 * Math.max(1, Math.abs(ratio)));
			}),
			{ numRuns: 1_000 }
		);
	});
});
