import { assert, type Decimal } from '../number/decimal.ts';
import { exact, type Exact } from '../number/exact.ts';
import { round, type Direction } from '../number/rounding.ts';
import { minorUnit, type CurrencyCode } from './currency.ts';

/** An amount of one currency, a whole number of its minor units. */
export type Money<C extends CurrencyCode = CurrencyCode> = { readonly amount: Decimal; readonly currency: C };

/** Money from an amount that already is a whole number of minor units. */
export function money<C extends CurrencyCode>(amount: Decimal, currency: C): Money<C> {
	assert(amount.isFinite() && amount.div(minorUnit(currency)).isInteger(), `${amount.toString()} is no amount of ${currency}`);
	return { amount, currency };
}

/**
 * The sum of two amounts of one currency; two currencies do not compile, and stop here when the code is only known at run time.
 * formula: a + b (units of the currency)
 * rounding: none.
 * source: arithmetic.
 */
export function plusMoney<C extends CurrencyCode>(a: Money<C>, b: Money<NoInfer<C>>): Money<C> {
	assert(a.currency === b.currency, `${a.currency} and ${b.currency} do not add`);
	return { amount: a.amount.plus(b.amount), currency: a.currency };
}

/**
 * The difference of two amounts of one currency.
 * formula: a − b (units of the currency)
 * rounding: none.
 * source: arithmetic.
 */
export function minusMoney<C extends CurrencyCode>(a: Money<C>, b: Money<NoInfer<C>>): Money<C> {
	assert(a.currency === b.currency, `${a.currency} and ${b.currency} do not subtract`);
	return { amount: a.amount.minus(b.amount), currency: a.currency };
}

/**
 * An exact value as money: the one rounding of a printed sum.
 * formula: the multiple of the step (the minor unit, or a cash step of whole minor units) next to the value in the direction
 * rounding: here, once, to `step`, in `direction`.
 * source: ISO 4217 minor units; the direction is the caller's and is named at the call.
 */
export function roundMoney<C extends CurrencyCode>(value: Exact | Decimal, currency: C, direction: Direction, step?: Decimal): Money<C> {
	return money(round(value, step ?? minorUnit(currency), direction), currency);
}

/** Money as the exact value it is. */
export function exactMoney(of: Money): Exact {
	return exact(of.amount);
}
