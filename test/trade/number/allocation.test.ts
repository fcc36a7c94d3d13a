import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { allocate } from '../../../src/trade/number/allocation.ts';
import { decimal, ZERO } from '../../../src/trade/number/decimal.ts';
import { ratio, sum } from '../../../src/trade/number/exact.ts';
import { round } from '../../../src/trade/number/rounding.ts';

const cent = decimal('0.01');

describe('printed parts', () => {
	it('splits ten into thirds with the cent on the first', () => {
		const third = ratio(10n, 3n);
		expect(allocate([third, third, third], decimal('10.00'), cent).map((part) => part.toFixed(2))).toEqual(['3.34', '3.33', '3.33']);
	});

	it('gives the missing cent to the largest remainder', () => {
		const parts = [ratio(decimal('1.001'), 1n), ratio(decimal('1.006'), 1n), ratio(decimal('1.003'), 1n)];
		expect(allocate(parts, decimal('3.01'), cent).map((part) => part.toFixed(2))).toEqual(['1.00', '1.01', '1.00']);
	});

	it('adds up to the printed total, each part within one step of itself, signs mixed', () => {
		const part = fc.tuple(fc.bigInt({ min: -(10n ** 9n), max: 10n ** 9n }), fc.bigInt({ min: 1n, max: 9_999n })).map(([n, d]) => ({ n, d }));
		fc.assert(
			fc.property(fc.array(part, { minLength: 1, maxLength: 30 }), (parts) => {
				const total = round(sum(parts), cent, 'half-even');
				const printed = allocate(parts, total, cent);
				expect(printed.reduce((a, b) => a.plus(b), ZERO).equals(total)).toBe(true);
				printed.forEach((value, index) => {
					const off = value.minus(round(parts[index]!, cent, 'floor'));
					expect(off.isZero() || off.equals(cent)).toBe(true);
				});
			}),
			{ numRuns: 1_000 }
		);
	});

	it('refuses a total that the parts do not make', () => {
		expect(() => allocate([ratio(1n, 1n)], decimal('5'), cent)).toThrow(/do not belong/);
	});
});
