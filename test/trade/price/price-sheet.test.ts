import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, exactToText, ratio, times } from '../../../src/trade/number/exact.ts';
import { massUnits, type MassUnitId } from '../../../src/trade/mass/units.ts';
import {
	parseQuote, priceIn, pricePerGram, priceSheet, quotePerGram, withQuote, type PriceSheet
} from '../../../src/trade/price/price-sheet.ts';

const units = Object.keys(massUnits) as MassUnitId[];
const sheet: PriceSheet = {
	currency: 'USD',
	quotes: [
		{ metal: 'Au', amount: decimal('4102.50'), per: 'ozt' },
		{ metal: 'Cu', amount: decimal('9.85'), per: 'kg' }
	],
	at: 1_760_000_000_000,
	source: 'board by the door'
};

describe('price sheet', () => {
	it('takes each metal once', () => {
		expect(priceSheet(sheet)).toEqual({ ok: true, value: sheet });
		const twice = priceSheet({ ...sheet, quotes: [...sheet.quotes, sheet.quotes[0]!] });
		expect(twice).toEqual({ ok: false, problem: { kind: 'price-twice', metal: 'Au' } });
		expect(priceSheet({ ...sheet, quotes: [] })).toEqual({ ok: false, problem: { kind: 'price-sheet-empty' } });
	});

	it('is never made with a price of nothing or at half a millisecond', () => {
		expect(() => priceSheet({ ...sheet, quotes: [{ metal: 'Au', amount: decimal('0'), per: 'g' }] })).toThrow(/price of 0/);
		expect(() => priceSheet({ ...sheet, at: 0.5 })).toThrow(/whole milliseconds/);
	});

	it('says the price of a gram as a fraction, and null for a metal without a price', () => {
		expect(compareExact(pricePerGram(sheet, 'Au')!, ratio(decimal('4102.50'), decimal('31.1034768')))).toBe(0);
		expect(exactToText(pricePerGram(sheet, 'Cu')!)).toBe('197/20000');
		expect(pricePerGram(sheet, 'Ag')).toBeNull();
	});

	it('replaces or adds one price and leaves the others the same objects', () => {
		const dearer = withQuote(sheet, { metal: 'Au', amount: decimal('4103'), per: 'ozt' }, sheet.at + 1);
		expect(dearer.quotes.map(({ metal, amount }) => `${metal} ${amount.toString()}`)).toEqual(['Au 4103', 'Cu 9.85']);
		expect(dearer.quotes[1]).toBe(sheet.quotes[1]);
		expect(dearer).toMatchObject({ at: sheet.at + 1, source: 'board by the door' });
		const more = withQuote(sheet, { metal: 'Ag', amount: decimal('49'), per: 'ozt' }, sheet.at, 'told by phone');
		expect(more.quotes.map(({ metal }) => metal)).toEqual(['Au', 'Cu', 'Ag']);
		expect(more.source).toBe('told by phone');
		expect(sheet.quotes).toHaveLength(2);
	});

	it('reads a typed price and asks about an unclear one', () => {
		expect(parseQuote('Ag', '49,5', 'ozt')).toMatchObject({ ok: true, value: { metal: 'Ag', per: 'ozt' } });
		expect(parseQuote('Ag', '4,102', 'ozt')).toMatchObject({ ok: false, problem: { kind: 'number-ambiguous' } });
		expect(parseQuote('Ag', '0', 'ozt')).toMatchObject({ ok: false, problem: { kind: 'number-not-positive' } });
	});

	it('says one price the same in every unit', () => {
		const amount = fc.integer({ min: 1, max: 10 ** 9 }).map((hundredths) => decimal(String(hundredths)).div(100));
		fc.assert(
			fc.property(amount, fc.constantFrom(...units), fc.constantFrom(...units), (value, from, to) => {
				const quote = { metal: 'Au', amount: value, per: from } as const;
				const there = priceIn(quote, to);
				// back from the other unit: price per gram again
				const perGram = times(there, ratio(1n, massUnits[to].grams));
				expect(compareExact(perGram, quotePerGram(quote))).toBe(0);
				expect(compareExact(priceIn(quote, from), exact(value))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});
});
