import { assert, decimal, type Decimal } from '../number/decimal.ts';
import { compareExact, divide, exact, EXACT_ZERO, ratio, reduce, times, toNumber, type Exact } from '../number/exact.ts';
import { parseNumber, type NumberProblem } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';

/** Parts of a metal in a thousand parts of the whole, exact: 14 kt is 7000/12 and never 583.33. */
export type Fineness = { readonly perMille: Exact };

export type FinenessProblem =
	| NumberProblem
	/** A bare number that could be karats, percent or parts per thousand. */
	| { readonly kind: 'fineness-unit-missing'; readonly text: string; readonly choices: readonly string[] }
	| { readonly kind: 'fineness-over-whole'; readonly text: string; readonly most: string };

const THOUSAND = exact(1000n);

/**
 * A fineness written in parts per thousand.
 * formula: parts per thousand as given, 0 to 1000.
 * rounding: none.
 * source: ISO 9202 (fineness in parts per thousand by mass), from memory.
 */
export function fromPerMille(perMille: Decimal): Fineness {
	return fineness(exact(perMille));
}

/**
 * A fineness written in karats.
 * formula: parts per thousand = karats / 24 x 1000, kept as a fraction.
 * rounding: none.
 * source: common practice, no source (a karat is one part in twenty-four).
 */
export function fromKarat(karats: Decimal): Fineness {
	return fineness(reduce(times(ratio(karats, 24n), THOUSAND)));
}

/** A fineness from a share of the whole, 0 to 1, exact. */
export function fromShare(share: Exact): Fineness {
	return fineness(reduce(times(share, THOUSAND)));
}

function fineness(perMille: Exact): Fineness {
	assert(
		compareExact(perMille, EXACT_ZERO) >= 0 && compareExact(perMille, THOUSAND) <= 0,
		`a fineness lies between 0 and 1000 parts per thousand, not ${toNumber(perMille)}`
	);
	return { perMille };
}

/** The share of the whole, 0 to 1. */
export function shareOf(value: Fineness): Exact {
	return divide(value.perMille, THOUSAND);
}

/** The nearest float, for estimates and pictures only. */
export function perMilleNumber(value: Fineness): number {
	return toNumber(value.perMille);
}

/**
 * The karats of a fineness.
 * formula: karats = parts per thousand x 24 / 1000.
 * rounding: none.
 * source: common practice, no source (a karat is one part in twenty-four).
 */
export function karatsOf(value: Fineness): Exact {
	return reduce(times(value.perMille, ratio(24n, 1000n)));
}

export function compareFineness(a: Fineness, b: Fineness): -1 | 0 | 1 {
	return compareExact(a.perMille, b.perMille);
}

const WRITTEN = /^([\d.,]+)\s*(%|pct|percent|‰|ppt|per ?mille|kt?|ct|karats?|carats?)?$/;

/**
 * A fineness as people type it: "585", "58.5%", "14k", "999.9", "0.585", "9999". A comma is always a decimal comma here,
 * because no fineness is above a thousand. A bare number from 1 to 100 is asked about: "14" may be karats or parts per thousand.
 * formula: with a unit as written; bare and below 1 a share of the whole; bare from 100 to 1000 parts per thousand; "9999" is 999.9.
 * rounding: none.
 * source: common practice, no source.
 */
export function parseFineness(text: string): Result<Fineness, FinenessProblem> {
	const shown = text.trim();
	const match = WRITTEN.exec(shown.toLowerCase());
	if (match === null) return shown === '' ? fail({ kind: 'number-missing' }) : fail({ kind: 'number-unreadable', text: shown });
	const [, digits = '', unit = ''] = match;
	// "9999" and "99999" are how four and five nines fine are written
	const nines = unit === '' && /^9{4,5}$/.test(digits) ? `999.${digits.slice(3)}` : digits;
	const number = parseNumber(nines.replace(',', '.'));
	if (!number.ok) return number;
	const value = number.value;
	const within = (most: string, make: () => Fineness): Result<Fineness, FinenessProblem> =>
		value.gt(decimal(most)) ? fail({ kind: 'fineness-over-whole', text: shown, most }) : ok(make());
	if (/^[kc]/.test(unit)) return within('24', () => fromKarat(value));
	if (/^(?:%|pct|percent)$/.test(unit)) return within('100', () => fromPerMille(value.times(10)));
	if (unit !== '') return within('1000', () => fromPerMille(value));
	if (value.lt(1)) return ok(fromPerMille(value.times(1000)));
	if (value.lt(100)) {
		const plain = value.toString();
		const choices = value.lte(24) ? [`${plain} kt`, `${plain} %`, `${plain} ‰`] : [`${plain} %`, `${plain} ‰`];
		return fail({ kind: 'fineness-unit-missing', text: shown, choices });
	}
	return within('1000', () => fromPerMille(value));
}
