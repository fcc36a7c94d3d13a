import { assert } from '../number/decimal.ts';
import { toNumber } from '../number/exact.ts';
import { uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { MetalId } from '../metal/metals.ts';
import { pricePerGram, type PriceProblem, type PriceSheet } from './price-sheet.ts';

const DAY = 86_400_000;
const YEAR_DAYS = 365;

/** Yearly volatility by metal: the standard deviation of the logarithm of the price over one year. */
export type Volatility = Partial<Record<MetalId, number>>;

/** Working defaults, editable and shown as such; from memory of ordinary years. A metal not named moves like silver. */
export const defaultVolatility = {
	Au: 0.16, Ag: 0.3, Pt: 0.25, Pd: 0.35, Rh: 0.5, Ir: 0.35, Ru: 0.35, Cu: 0.22, Zn: 0.26, Ni: 0.32, Sn: 0.26
} as const satisfies Volatility;

export function volatilityOf(metal: MetalId, own: Volatility = {}): number {
	const usual: Volatility = defaultVolatility;
	const sigma = own[metal] ?? usual[metal] ?? defaultVolatility.Ag;
	assert(Number.isFinite(sigma) && sigma >= 0, `a volatility of ${sigma}`);
	return sigma;
}

/**
 * How old the prices are. A sheet from a moment that has not come yet (a clock set back) counts as new; `sheetWarnings` says so.
 * formula: age = (now − moment of the sheet) ÷ 86 400 000 ms (days), not under 0
 * rounding: none.
 * source: arithmetic.
 */
export function ageOf(sheet: PriceSheet, now: number): number {
	return Math.max(0, (now - sheet.at) / DAY);
}

/**
 * How far a price may have moved since it was read, as a share of itself.
 * formula: u = σ × √(age in days ÷ 365)
 * rounding: none, an estimate.
 * source: common practice, no source (a price moves as a random walk, so its spread grows with the root of time).
 */
export function widen(volatility: number, days: number): number {
	assert(volatility >= 0 && days >= 0, `volatility ${volatility} over ${days} days`);
	return volatility * Math.sqrt(days / YEAR_DAYS);
}

/**
 * The price of a gram with the spread that its age gives it; null when the sheet does not quote the metal.
 * formula: price per gram ± price per gram × σ √(age ÷ 365) (currency per gram), one source `price:<metal>`
 * rounding: none, an estimate.
 * source: common practice, no source.
 */
export function agedPrice(sheet: PriceSheet, metal: MetalId, now: number, own: Volatility = {}): Uncertain | null {
	const perGram = pricePerGram(sheet, metal);
	if (perGram === null) return null;
	const value = toNumber(perGram);
	return uncertain(value, `price:${metal}`, value * widen(volatilityOf(metal, own), ageOf(sheet, now)));
}

/** A clock that differs by less than this is not worth a word. */
const AHEAD_MS = 5 * 60_000;

/** What to say about a sheet before an offer is made from it: older than `mostDays`, or from a moment after now. */
export function sheetWarnings(sheet: PriceSheet, now: number, mostDays: number): PriceProblem[] {
	const ahead = sheet.at - now;
	if (ahead > AHEAD_MS) return [{ kind: 'price-sheet-ahead', at: sheet.at, now, minutes: Math.round(ahead / 60_000) }];
	const days = ageOf(sheet, now);
	return days > mostDays ? [{ kind: 'price-sheet-old', at: sheet.at, now, days, most: mostDays }] : [];
}
