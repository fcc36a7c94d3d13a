import { assert, decimal, ONE, type Decimal } from '../number/decimal.ts';
import { fail, ok, type Result } from '../number/result.ts';

// Active ISO 4217 codes by the places of their minor unit. Funds, metals and test codes are no money here.
const WHOLE = [
	'BIF', 'CLP', 'DJF', 'GNF', 'ISK', 'JPY', 'KMF', 'KRW', 'PYG', 'RWF', 'UGX', 'VND', 'VUV', 'XAF', 'XOF', 'XPF'
] as const;
const HUNDREDTHS = [
	'AED', 'AFN', 'ALL', 'AMD', 'AOA', 'ARS', 'AUD', 'AWG', 'AZN', 'BAM', 'BBD', 'BDT', 'BMD', 'BND', 'BOB', 'BRL', 'BSD', 'BTN',
	'BWP', 'BYN', 'BZD', 'CAD', 'CDF', 'CHF', 'CNY', 'COP', 'CRC', 'CUP', 'CVE', 'CZK', 'DKK', 'DOP', 'DZD', 'EGP', 'ERN', 'ETB',
	'EUR', 'FJD', 'FKP', 'GBP', 'GEL', 'GHS', 'GIP', 'GMD', 'GTQ', 'GYD', 'HKD', 'HNL', 'HTG', 'HUF', 'IDR', 'ILS', 'INR', 'IRR',
	'JMD', 'KES', 'KGS', 'KHR', 'KPW', 'KYD', 'KZT', 'LAK', 'LBP', 'LKR', 'LRD', 'LSL', 'MAD', 'MDL', 'MGA', 'MKD', 'MMK', 'MNT',
	'MOP', 'MRU', 'MUR', 'MVR', 'MWK', 'MXN', 'MYR', 'MZN', 'NAD', 'NGN', 'NIO', 'NOK', 'NPR', 'NZD', 'PAB', 'PEN', 'PGK', 'PHP',
	'PKR', 'PLN', 'QAR', 'RON', 'RSD', 'RUB', 'SAR', 'SBD', 'SCR', 'SDG', 'SEK', 'SGD', 'SHP', 'SLE', 'SOS', 'SRD', 'SSP', 'STN',
	'SVC', 'SYP', 'SZL', 'THB', 'TJS', 'TMT', 'TOP', 'TRY', 'TTD', 'TWD', 'TZS', 'UAH', 'USD', 'UYU', 'UZS', 'VES', 'WST', 'XCD',
	'YER', 'ZAR', 'ZMW', 'ZWG'
] as const;
const THOUSANDTHS = [
	'BHD', 'IQD', 'JOD', 'KWD', 'LYD', 'OMR', 'TND'
] as const;

export type CurrencyCode = (typeof WHOLE)[number] | (typeof HUNDREDTHS)[number] | (typeof THOUSANDTHS)[number];

export type CurrencyProblem =
	| { readonly kind: 'currency-unknown'; readonly text: string }
	| { readonly kind: 'currency-cash-step'; readonly currency: CurrencyCode; readonly step: Decimal; readonly minorUnit: Decimal };

const PLACES = new Map<string, number>();
for (const code of WHOLE) PLACES.set(code, 0);
for (const code of HUNDREDTHS) PLACES.set(code, 2);
for (const code of THOUSANDTHS) PLACES.set(code, 3);

/** Every code, in alphabetical order. */
export const currencyCodes: readonly CurrencyCode[] = [...WHOLE, ...HUNDREDTHS, ...THOUSANDTHS].sort();

export function isCurrencyCode(text: string): text is CurrencyCode {
	return PLACES.has(text);
}

/** A currency as typed: three letters, upper or lower case. */
export function parseCurrency(text: string): Result<CurrencyCode, CurrencyProblem> {
	const code = text.trim().toUpperCase();
	return isCurrencyCode(code) ? ok(code) : fail({ kind: 'currency-unknown', text: text.trim().slice(0, 40) });
}

/** How many places money of this currency has. */
export function placesOf(currency: CurrencyCode): number {
	const places = PLACES.get(currency);
	assert(places !== undefined, `no minor unit of ${currency}`);
	return places;
}

const STEPS: readonly Decimal[] = [ONE, decimal('0.1'), decimal('0.01'), decimal('0.001')];

/**
 * The smallest amount of a currency: the step to which money is rounded.
 * formula: minor unit = 1 / 10^places (in units of the currency)
 * rounding: none.
 * source: ISO 4217, table A.1, column "minor unit"; transcribed from memory, checked against a second list in the tests.
 */
export function minorUnit(currency: CurrencyCode): Decimal {
	return STEPS[placesOf(currency)]!;
}

/**
 * Steps that cash is handed over in where the smallest coins are gone. A suggestion for the settings, never applied unasked.
 * Common practice, from memory.
 */
const CASH: Partial<Record<CurrencyCode, Decimal>> = {
	AUD: decimal('0.05'),
	CAD: decimal('0.05'),
	CHF: decimal('0.05'),
	CZK: ONE,
	DKK: decimal('0.5'),
	HUF: decimal('5'),
	NOK: ONE,
	NZD: decimal('0.1'),
	SEK: ONE
};

export function usualCashStep(currency: CurrencyCode): Decimal {
	return CASH[currency] ?? minorUnit(currency);
}

/** A cash step as set by the buyer: at least one minor unit and a whole number of them. */
export function cashStep(step: Decimal, currency: CurrencyCode): Result<Decimal, CurrencyProblem> {
	const unit = minorUnit(currency);
	if (step.isFinite() && step.gt(0) && step.div(unit).isInteger()) return ok(step);
	return fail({ kind: 'currency-cash-step', currency, step, minorUnit: unit });
}
