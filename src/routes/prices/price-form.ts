import { metals, type MetalId } from '$trade/metal/metals.ts';
import type { MassUnitId } from '$trade/mass/units.ts';
import { compareExact, divide, exact, minus, ratio, type Exact } from '$trade/number/exact.ts';
import type { DecimalMark, NumberProblem } from '$trade/number/field.ts';
import { fail, type Result } from '$trade/number/result.ts';
import { placesOf, type CurrencyCode } from '$trade/price/currency.ts';
import { sheetWarnings } from '$trade/price/age.ts';
import { parseQuote, priceSheet, quotePerGram, type PriceProblem, type PriceSheet, type Quote } from '$trade/price/price-sheet.ts';
import { typedNumber } from '$ui/format/typed-text.ts';

/** One price as it stands in its field. */
export type TypedQuote = { readonly metal: MetalId; readonly text: string; readonly per: MassUnitId };

/** A price sheet while it is typed. */
export type TypedSheet = {
	readonly currency: CurrencyCode;
	readonly source: string;
	/** Day and time as a date field writes them ("2026-05-03T14:05"); null: the moment of saving. */
	readonly moment: string | null;
	readonly quotes: readonly TypedQuote[];
};

const FIRST: readonly MetalId[] = ['Au', 'Ag', 'Pt', 'Pd'];

/** The unit that a metal's price is usually quoted in. */
export function usualUnit(metal: MetalId): MassUnitId {
	return metals[metal].precious ? 'ozt' : 'kg';
}

/** The form before anything is typed: the last sheet's figures to be typed over, or the usual four metals without a price. */
export function freshForm(last: PriceSheet | null, currency: CurrencyCode, mark: DecimalMark): TypedSheet {
	if (last === null) {
		return { currency, source: '', moment: null, quotes: FIRST.map((metal) => ({ metal, text: '', per: usualUnit(metal) })) };
	}
	const places = placesOf(last.currency);
	return {
		currency: last.currency,
		source: last.source,
		moment: null,
		quotes: last.quotes.map(({ metal, amount, per }) => ({ metal, text: typedNumber(amount, mark, places), per }))
	};
}

/** Each price that can be read so far. A field left empty is a metal without a price. */
export function readQuotes(form: TypedSheet, mark: DecimalMark): ReadonlyMap<MetalId, Result<Quote, NumberProblem>> {
	const typed = form.quotes.filter(({ text }) => text.trim() !== '');
	return new Map(typed.map(({ metal, text, per }) => [metal, parseQuote(metal, text, per, mark)]));
}

/** The moment of the sheet in milliseconds; null for a date field that is not filled in. */
export function readMoment(moment: string | null, now: number): number | null {
	if (moment === null) return now;
	const at = new Date(moment).getTime();
	return moment === '' || Number.isNaN(at) ? null : at;
}

/** A moment as a date field writes it, in the clock's own time. */
export function momentText(at: number): string {
	const zone = new Date(at).getTimezoneOffset() * 60_000;
	return new Date(at - zone).toISOString().slice(0, 16);
}

/** The whole sheet, or the first thing that is wrong with it. Prices of a moment that has not come yet are refused. */
export function readSheet(form: TypedSheet, at: number, now: number, mark: DecimalMark): Result<PriceSheet, NumberProblem | PriceProblem> {
	const quotes: Quote[] = [];
	for (const read of readQuotes(form, mark).values()) {
		if (!read.ok) return read;
		quotes.push(read.value);
	}
	const sheet = priceSheet({ currency: form.currency, quotes, at, source: form.source.trim() });
	if (!sheet.ok) return sheet;
	const ahead = sheetWarnings(sheet.value, now, Infinity)[0];
	return ahead === undefined ? sheet : fail(ahead);
}

/** How far a price is from an earlier one of the same metal and currency, as a share of the earlier; null without one. */
export function changeFrom(earlier: PriceSheet | null, currency: CurrencyCode, quote: Quote): Exact | null {
	if (earlier === null || earlier.currency !== currency) return null;
	const before = earlier.quotes.find(({ metal }) => metal === quote.metal);
	return before === undefined ? null : minus(divide(quotePerGram(quote), quotePerGram(before)), exact(1n));
}

const UP = ratio(1n, 4n);
const DOWN = ratio(-1n, 5n);

/** No market moves by a quarter between two sheets of a buyer: a slip of the hand or another unit is likelier. */
export function unlikely(change: Exact | null): boolean {
	return change !== null && (compareExact(change, UP) > 0 || compareExact(change, DOWN) < 0);
}
