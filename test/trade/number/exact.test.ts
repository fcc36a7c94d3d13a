import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import {
	compareExact, divide, exact, exactFromText, exactToText, EXACT_ZERO, isZero, minus, negate, plus, ratio, reduce, sum, times, toNumber, type Exact
} from '../../../src/trade/number/exact.ts';

const fraction = fc.tuple(fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n }), fc.bigInt({ min: 1n, max: 10n ** 6n })).map(([n, d]): Exact => ({ n, d }));
const same = (a: Exact, b: Exact) => expect(compareExact(a, b)).toBe(0);

describe('exact fractions', () => {
	it('takes a decimal digit for digit', () => {
		expect(exact(decimal('31.1034768'))).toEqual({ n: 311034768n, d: 10_000_000n });
		expect(exact(decimal('-0.05'))).toEqual({ n: -5n, d: 100n });
		expect(exact(7n)).toEqual({ n: 7n, d: 1n });
	});

	it('keeps 14/24 of 12.4 g whole until somebody divides', () => {
		const fine = times(exact(decimal('12.4')), ratio(14n, 24n));
		expect(exactToText(fine)).toBe('217/30');
	});

	it('follows the laws of a field', () => {
		fc.assert(
			fc.property(fraction, fraction, fraction, (a, b, c) => {
				same(plus(a, b), plus(b, a));
				same(plus(plus(a, b), c), plus(a, plus(b, c)));
				same(times(a, plus(b, c)), plus(times(a, b), times(a, c)));
				same(minus(plus(a, b), b), a);
				same(plus(a, negate(a)), EXACT_ZERO);
				if (!isZero(b)) same(times(divide(a, b), b), a);
				same(reduce(a), a);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('sums in any order to the same value', () => {
		fc.assert(
			fc.property(fc.array(fraction, { maxLength: 20 }), (values) => {
				same(sum(values), sum([...values].reverse()));
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is written and read back', () => {
		fc.assert(
			fc.property(fraction, (a) => {
				const back = exactFromText(exactToText(a));
				expect(back).not.toBeNull();
				same(back!, a);
			}),
			{ numRuns: 1_000 }
		);
		for (const text of ['', '1/0', '1.5', '1/-2', 'x', '1/2/3', ' 1']) expect(exactFromText(text)).toBeNull();
	});

	it('comes near as a float, also when the parts do not fit one', () => {
		expect(toNumber(ratio(1n, 3n))).toBeCloseTo(1 / 3, 15);
		expect(toNumber({ n: 3n * 10n ** 400n, d: 10n ** 400n })).toBeCloseTo(3, 12);
	});

	it('refuses to divide by zero', () => {
		expect(() => divide(exact(1n), EXACT_ZERO)).toThrow(/division by zero/);
	});
});
