import { describe, expect, it } from 'vitest';
import { assert, Decimal, decimal } from '../../../src/trade/number/decimal.ts';

describe('the one decimal', () => {
	it('has forty digits, half-even, and no exponents', () => {
		expect(Decimal.precision).toBe(40);
		expect(Decimal.rounding).toBe(Decimal.ROUND_HALF_EVEN);
		expect(decimal('0.00000000000000000001').toString()).toBe('0.00000000000000000001');
		expect(decimal('123456789012345678901234567890').toString()).toBe('123456789012345678901234567890');
	});

	it('is built from plain text only', () => {
		for (const text of ['', '1e3', '1,5', ' 1', 'NaN', '0x1', '.5', '1.']) expect(() => decimal(text)).toThrow(/not a plain decimal/);
	});

	it('stops with the reason where only we can be wrong', () => {
		expect(() => assert(false, 'the sky fell')).toThrow('Meltbook is wrong: the sky fell');
	});
});
