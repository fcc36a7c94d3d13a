import { assert, type Decimal } from '../number/decimal.ts';
import { divide, exact, isZero, minus, toNumber, type Exact } from '../number/exact.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { normalCdf } from '../uncertainty/normal.ts';
import type { MetalId } from '../metal/metals.ts';
import { volatilityOf, widen, type Volatility } from './age.ts';
import { minorUnit, type CurrencyCode } from './currency.ts';
import { money, type Money } from './money.ts';
import type { Value } from './value.ts';

export type AskedProblem = {
	readonly kind: 'asked-too-fine';
	readonly text: string;
	readonly currency: CurrencyCode;
	readonly minorUnit: Decimal;
};

/** What the seller asks, as typed: more than nothing, and no fraction of the minor unit. */
export function parseAsked(text: string, currency: CurrencyCode, mark: DecimalMark = 'dot'): Result<Money, NumberProblem | AskedProblem> {
	const amount = parseNumber(text, { mark, positive: true });
	if (!amount.ok) return amount;
	const unit = minorUnit(currency);
	if (!amount.value.div(unit).isInteger()) return fail({ kind: 'asked-too-fine', text: text.trim(), currency, minorUnit: unit });
	return ok(money(amount.value, currency));
}

export type Asked = {
	/** Value ÷ price − 1: what is left on the money laid out; negative when more is asked than the metal is worth. */
	readonly margin: Exact;
	/** Price ÷ value: the share of the value that is paid; null when there is no value. */
	readonly share: Exact | null;
};

/**
 * What a price that is asked leaves.
 * formula: margin on cost = value ÷ price − 1; share of value = price ÷ value
 * rounding: none, fractions.
 * source: common practice, no source.
 */
export function askedFor(value: Exact, price: Money): Asked {
	assert(price.amount.gt(0), 'a margin on nothing');
	const cost = exact(price.amount);
	return { margin: minus(divide(value, cost), exact(1n)), share: isZero(value) ? null : divide(cost, value) };
}

/**
 * The chance that the metal is worth less than was paid when it is sold after so many days.
 * formula: Φ(−ln(1 + margin) ÷ (σ √(days ÷ 365)))
 * rounding: none, an estimate.
 * source: the lognormal price of common practice, no source; worked example from memory: 30 days, 8 %, 25 % a year: 14 %.
 */
export function chanceOfLoss(margin: number, volatility: number, days: number): number {
	assert(margin >= -1, `a margin of ${margin} is a value under nothing`);
	if (margin === -1) return 1;
	const spread = widen(volatility, days);
	const cushion = Math.log1p(margin);
	if (spread === 0) return cushion < 0 ? 1 : 0;
	return normalCdf(-cushion / spread);
}

/**
 * The volatility of a value made of several metals.
 * formula: Σ (share of the value × σ of the metal): metals taken as moving together, so the figure is never too small
 * rounding: none, an estimate.
 * source: upper bound of a portfolio's standard deviation (all correlations 1); arithmetic.
 */
export function volatilityOfValue(value: Value, own: Volatility = {}): number {
	const total = toNumber(value.total);
	if (total === 0) return 0;
	let sigma = 0;
	for (const [metal, part] of Object.entries(value.byMetal) as [MetalId, Exact][]) {
		sigma += (toNumber(part) / total) * volatilityOf(metal, own);
	}
	return sigma;
}
