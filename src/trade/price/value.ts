import type { Decimal } from '../number/decimal.ts';
import { allocate } from '../number/allocation.ts';
import { EXACT_ZERO, isZero, plus, type Exact } from '../number/exact.ts';
import { certain, plusUncertain, propagate, type Uncertain } from '../uncertainty/uncertain.ts';
import type { MetalId } from '../metal/metals.ts';
import { agedPrice, type Volatility } from './age.ts';
import { minorUnit, type CurrencyCode } from './currency.ts';
import { roundMoney, type Money } from './money.ts';
import { quotePerGram, type PriceSheet } from './price-sheet.ts';

/** Fine grams by metal, as a piece, a parcel or a lot keeps them. */
export type FineGrams = Partial<Record<MetalId, Exact>>;

/** What fine metal is worth at a sheet, undivided: in units of the sheet's currency. */
export type Value = {
	readonly total: Exact;
	readonly byMetal: FineGrams;
	/** Metals that are there and have no price: they are named, and they count nothing. */
	readonly unpriced: readonly MetalId[];
};

/** A sheet made ready: each price is a whole number over one denominator that all share, so that a value needs no common divisor. */
type PriceTable = { readonly numerators: ReadonlyMap<MetalId, bigint>; readonly denominator: bigint };

/** The table of the sheet used last: a sheet never changes, and a screen values everything at one. */
let last: { readonly sheet: PriceSheet; readonly table: PriceTable } | null = null;

function tableOf(sheet: PriceSheet): PriceTable {
	if (last !== null && Object.is(last.sheet, sheet)) return last.table;
	// adding zero over a denominator leaves the least common one
	let common: Exact = EXACT_ZERO;
	for (const quote of sheet.quotes) {
		const { d } = quotePerGram(quote);
		if (d !== common.d) common = plus(common, { n: 0n, d });
	}
	const denominator = common.d;
	const numerators = new Map<MetalId, bigint>();
	for (const quote of sheet.quotes) {
		const { n, d } = quotePerGram(quote);
		numerators.set(quote.metal, d === denominator ? n : n * (denominator / d));
	}
	const table = { numerators, denominator };
	last = { sheet, table };
	return table;
}

/**
 * What fine metal is worth at the prices of a sheet. The cost grows with the metals, not with the pieces they came from.
 * formula: value = Σ over metals of fine grams × price per gram (currency)
 * rounding: none, a fraction; it is divided once, where it is printed (printedValue, roundMoney).
 * source: arithmetic.
 */
export function valueOf(fine: FineGrams, sheet: PriceSheet): Value {
	const { numerators, denominator } = tableOf(sheet);
	const byMetal: FineGrams = {};
	const unpriced: MetalId[] = [];
	let total: Exact = EXACT_ZERO;
	for (const key in fine) {
		const metal = key as MetalId;
		const grams = fine[metal];
		if (grams === undefined || isZero(grams)) continue;
		const price = numerators.get(metal);
		if (price === undefined) {
			unpriced.push(metal);
			continue;
		}
		const n = grams.n * price;
		byMetal[metal] = { n, d: grams.d * denominator };
		total = plus(total, { n, d: grams.d });
	}
	return { total: { n: total.n, d: total.d * denominator }, byMetal, unpriced };
}

/**
 * A value as it is printed: the total to the minor unit, and parts by metal that add up to it.
 * formula: total rounded; parts rounded down, the missing minor units to the largest remainders
 * rounding: the total half-even to the minor unit, once; the parts by the largest remainder.
 * source: common practice, no source.
 */
export function printedValue(value: Value, currency: CurrencyCode): { total: Money; byMetal: Partial<Record<MetalId, Decimal>> } {
	const total = roundMoney(value.total, currency, 'half-even');
	const parts = Object.entries(value.byMetal) as [MetalId, Exact][];
	if (parts.length === 0) return { total, byMetal: {} };
	const printed = allocate(parts.map(([, part]) => part), total.amount, minorUnit(currency));
	const byMetal: Partial<Record<MetalId, Decimal>> = {};
	parts.forEach(([metal], index) => {
		byMetal[metal] = printed[index]!;
	});
	return { total, byMetal };
}

/**
 * The value with what is not known about it: about the metal (per metal, with shared sources) and about the age of the prices.
 * formula: Σ fine × price (currency); sensitivities: the price for a fine mass, the fine mass for a price
 * rounding: none, an estimate.
 * source: JCGM 100:2008 (GUM) 5.2.2, sources kept apart so that shared ones add up; from memory.
 */
export function uncertainValue(
	fine: Partial<Record<MetalId, Uncertain>>,
	sheet: PriceSheet,
	now: number,
	volatility: Volatility = {}
): Uncertain {
	let total = certain(0);
	for (const [metal, grams] of Object.entries(fine) as [MetalId, Uncertain][]) {
		const price = agedPrice(sheet, metal, now, volatility);
		if (price === null) continue;
		const part = propagate(grams.value * price.value, [
			{ input: grams, sensitivity: price.value },
			{ input: price, sensitivity: grams.value }
		]);
		total = plusUncertain(total, part);
	}
	return total;
}
