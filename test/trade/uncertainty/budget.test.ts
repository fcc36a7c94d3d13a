import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { budget } from '../../../src/trade/uncertainty/budget.ts';
import { certain, standardUncertainty, type Uncertain } from '../../../src/trade/uncertainty/uncertain.ts';

describe('the budget', () => {
	it('names the largest doubt first, without its sign', () => {
		const rows = budget({ value: 1, contributions: { 'reading:1': 3, 'scale:s': -4, none: 0 } });
		expect(rows).toEqual([
			{ source: 'scale:s', u: 4, share: 0.64 },
			{ source: 'reading:1', u: 3, share: 0.36 }
		]);
	});

	it('is empty for a certain value', () => {
		expect(budget(certain(5))).toEqual([]);
	});

	it('keeps shares of doubts far below one', () => {
		expect(budget({ value: 0, contributions: { a: 1e-200, b: 1e-200 } }).map((row) => row.share)).toEqual([0.5, 0.5]);
	});

	it('shares add to one, sorted, and rebuild the standard uncertainty (1 000 cases)', () => {
		const parts = fc.dictionary(fc.string({ minLength: 1, maxLength: 4 }), fc.double({ min: -100, max: 100, noNaN: true }), { maxKeys: 8 });
		fc.assert(
			fc.property(parts, (contributions) => {
				const a: Uncertain = { value: 1, contributions: { ...contributions } };
				const rows = budget(a);
				for (let i = 1; i < rows.length; i += 1) expect(rows[i - 1]!.u).toBeGreaterThanOrEqual(rows[i]!.u);
				if (rows.length > 0) expect(rows.reduce((total, row) => total + row.share, 0)).toBeCloseTo(1, 12);
				const u = standardUncertainty(a);
				expect(Math.abs(Math.sqrt(rows.reduce((total, row) => total + row.u ** 2, 0)) - u)).toBeLessThanOrEqual(1e-12 * (1 + u));
			}),
			{ numRuns: 1_000 }
		);
	});
});
