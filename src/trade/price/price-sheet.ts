import { assert, type Decimal } from '../number/decimal.ts';
import { divide, exact, times, type Exact } from '../number/exact.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { massUnits, type MassUnitId } from '../mass/units.ts';
import type { MetalId } from '../metal/metals.ts';
import type { CurrencyCode } from './currency.ts';

/** What one metal costs, as typed: an amount for one unit of mass of the fine metal. */
export type Quote = { readonly metal: MetalId; readonly amount: Decimal; readonly per: MassUnitId };

/** Prices of one moment in one currency, typed by the buyer; `source` says in his words where from. Never changed, only replaced. */
export type PriceSheet = {
	readonly currency: CurrencyCode;
	readonly quotes: readonly Quote[];
	/** Milliseconds since 1970, passed in from the edge. */
	readonly at: number;
	readonly source: string;
};

export type PriceProblem =
	| { readonly kind: 'price-twice'; readonly metal: MetalId }
	| { readonly kind: 'price-sheet-empty' }
	| { readonly kind: 'price-sheet-ahead'; readonly at: number; readonly now: number; readonly minutes: number }
	| { readonly kind: 'price-sheet-old'; readonly at: number; readonly now: number; readonly days: number; readonly most: number };

/** A price as typed in its field. Nothing typed means no price for that metal, which is the caller's to tell apart. */
export function parseQuote(metal: MetalId, text: string, per: MassUnitId, mark: DecimalMark = 'dot'): Result<Quote, NumberProblem> {
	const amount = parseNumber(text, { mark, positive: true, most: '999999999' });
	return amount.ok ? ok({ metal, amount: amount.value, per }) : amount;
}

/** A sheet whose metals are each quoted once. */
export function priceSheet(sheet: PriceSheet): Result<PriceSheet, PriceProblem> {
	assert(Number.isSafeInteger(sheet.at), `the moment of a price sheet is whole milliseconds, not ${sheet.at}`);
	if (sheet.quotes.length === 0) return fail({ kind: 'price-sheet-empty' });
	const seen = new Set<MetalId>();
	for (const { metal, amount } of sheet.quotes) {
		assert(amount.isFinite() && amount.gt(0), `a price of ${amount.toString()} for ${metal}`);
		if (seen.has(metal)) return fail({ kind: 'price-twice', metal });
		seen.add(metal);
	}
	return ok(sheet);
}

/** The same sheet with one metal's price replaced or added, from a later moment. The other quotes stay the same objects. */
export function withQuote(sheet: PriceSheet, quote: Quote, at: number, source = sheet.source): PriceSheet {
	const place = sheet.quotes.findIndex((each) => each.metal === quote.metal);
	const quotes = place < 0 ? [...sheet.quotes, quote] : sheet.quotes.map((each, index) => (index === place ? quote : each));
	return { currency: sheet.currency, quotes, at, source };
}

const GRAMS = new Map<MassUnitId, Exact>();

function gramsIn(unit: MassUnitId): Exact {
	const kept = GRAMS.get(unit);
	if (kept !== undefined) return kept;
	const grams = exact(massUnits[unit].grams);
	GRAMS.set(unit, grams);
	return grams;
}

/**
 * A quote never changes, so the price per gram of each metal's last quote is kept; changing one price leaves the others' as they
 * are. One entry a metal: a weak map of all quotes costs more than the division it saves.
 */
const PER_GRAM = new Map<MetalId, { readonly quote: Quote; readonly perGram: Exact }>();

/**
 * What one gram of the fine metal costs.
 * formula: price per gram = amount per unit ÷ grams in the unit (currency per gram)
 * rounding: none, a fraction.
 * source: arithmetic on the exact units of mass/units.ts; example of Oregon Department of Agriculture: $100/ozt = $3.215/g.
 */
export function quotePerGram(quote: Quote): Exact {
	const kept = PER_GRAM.get(quote.metal);
	if (kept !== undefined && Object.is(kept.quote, quote)) return kept.perGram;
	const perGram = divide(exact(quote.amount), gramsIn(quote.per));
	PER_GRAM.set(quote.metal, { quote, perGram });
	return perGram;
}

/**
 * What one gram of a metal costs on a sheet; null when the sheet does not quote it.
 * formula: as quotePerGram (currency per gram)
 * rounding: none, a fraction.
 * source: arithmetic.
 */
export function pricePerGram(sheet: PriceSheet, metal: MetalId): Exact | null {
	const quote = sheet.quotes.find((each) => each.metal === metal);
	return quote === undefined ? null : quotePerGram(quote);
}

/**
 * A price said in another unit of mass.
 * formula: price per unit = price per gram × grams in the unit (currency per unit)
 * rounding: none, a fraction.
 * source: arithmetic; example of Oregon Department of Agriculture: $100/ozt = $5/dwt.
 */
export function priceIn(quote: Quote, per: MassUnitId): Exact {
	return times(quotePerGram(quote), gramsIn(per));
}
