import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, minus, ratio } from '../../../src/trade/number/exact.ts';
import type { CurrencyCode } from '../../../src/trade/price/currency.ts';
import { exactMoney, minusMoney, money, plusMoney, roundMoney, type Money } from '../../../src/trade/price/money.ts';

describe('money', () => {
	it('adds and subtracts amounts of one currency', () => {
		expect(plusMoney(money(decimal('0.10'), 'EUR'), money(decimal('0.20'), 'EUR')).amount.toString()).toBe('0.3');
		expect(minusMoney(money(decimal('0.10'), 'EUR'), money(decimal('0.20'), 'EUR')).amount.toString()).toBe('-0.1');
	});

	it('refuses two currencies that only the running program knows', () => {
		const some: readonly Money<CurrencyCode>[] = [money(decimal('1'), 'EUR'), money(decimal('1'), 'USD')];
		expect(() => plusMoney(some[0]!, some[1]!)).toThrow(/EUR and USD do not add/);
		expect(() => minusMoney(some[0]!, some[1]!)).toThrow(/EUR and USD do not subtract/);
	});

	it('is never a fraction of the minor unit', () => {
		expect(() => money(decimal('0.005'), 'USD')).toThrow(/no amount of USD/);
		expect(() => money(decimal('0.5'), 'JPY')).toThrow(/no amount of JPY/);
		expect(money(decimal('0.005'), 'KWD').amount.toString()).toBe('0.005');
	});

	it('rounds once, to the minor unit or to the cash step, in the direction named', () => {
		expect(roundMoney(ratio(1n, 3n), 'EUR', 'half-even').amount.toString()).toBe('0.33');
		expect(roundMoney(decimal('2.675'), 'USD', 'half-even').amount.toString()).toBe('2.68');
		expect(roundMoney(decimal('2.665'), 'USD', 'half-even').amount.toString()).toBe('2.66');
		expect(roundMoney(decimal('2.665'), 'USD', 'half-up').amount.toString()).toBe('2.67');
		expect(roundMoney(decimal('12.34'), 'CHF', 'down', decimal('0.05')).amount.toString()).toBe('12.3');
		expect(roundMoney(decimal('1234.6'), 'HUF', 'half-even', decimal('5')).amount.toString()).toBe('1235');
	});

	it('moves a value by less than a step, and money not at all', () => {
		fc.assert(
			fc.property(fc.bigInt({ min: -(10n ** 15n), max: 10n ** 15n }), fc.bigInt({ min: 1n, max: 10n ** 7n }), (n, d) => {
				const once = roundMoney({ n, d }, 'EUR', 'floor');
				const off = minus({ n, d }, exactMoney(once));
				expect(off.n >= 0n && compareExact(off, exact(decimal('0.01'))) < 0).toBe(true);
				expect(roundMoney(exactMoney(once), 'EUR', 'ceiling').amount.equals(once.amount)).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
});
