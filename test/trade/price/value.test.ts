import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal, ZERO, type Decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, plus, ratio, reduce, times, type Exact } from '../../../src/trade/number/exact.ts';
import { certain, standardUncertainty, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';
import { massUnits, type MassUnitId } from '../../../src/trade/mass/units.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import { roundMoney } from '../../../src/trade/price/money.ts';
import { withQuote, type PriceSheet } from '../../../src/trade/price/price-sheet.ts';
import { printedValue, uncertainValue, valueOf, type FineGrams } from '../../../src/trade/price/value.ts';

const sheet: PriceSheet = {
	currency: 'USD',
	quotes: [
		{ metal: 'Au', amount: decimal('4102.50'), per: 'ozt' },
		{ metal: 'Ag', amount: decimal('49.17'), per: 'ozt' },
		{ metal: 'Cu', amount: decimal('9.85'), per: 'kg' }
	],
	at: 0,
	source: 'invented'
};

describe('the value of fine metal', () => {
	it('is grams times price, with nothing rounded', () => {
		const fine: FineGrams = { Au: ratio(decimal('12.40').times(14), 24n) };
		const value = valueOf(fine, sheet);
		// 12.40 x 14/24 x 4102.50 / 31.1034768 = 954.0653...
		expect(compareExact(value.total, ratio(decimal('12.40').times(14).times('4102.50'), decimal('31.1034768').times(24)))).toBe(0);
		expect(roundMoney(value.total, 'USD', 'half-even').amount.toString()).toBe('954.07');
	});

	it('values copper and zinc with the same code and names what has no price', () => {
		const value = valueOf({ Cu: ratio(80n, 1n), Zn: ratio(40n, 1n), Pd: ratio(0n, 1n) }, sheet);
		expect(value.unpriced).toEqual(['Zn']);
		expect(roundMoney(value.total, 'USD', 'half-even').amount.toString()).toBe('0.79');
		expect(printedValue(valueOf({}, sheet), 'USD')).toEqual({ total: { amount: ZERO, currency: 'USD' }, byMetal: {} });
	});

	it('follows a new price', () => {
		const fine: FineGrams = { Au: ratio(decimal('31.1034768'), 1n) };
		expect(reduce(valueOf(fine, sheet).total)).toEqual({ n: 8205n, d: 2n });
		expect(reduce(valueOf(fine, withQuote(sheet, { metal: 'Au', amount: decimal('4000'), per: 'ozt' }, 1)).total)).toEqual({ n: 4000n, d: 1n });
	});

	const places = (most: number) => fc.integer({ min: 1, max: most }).map((hundredths) => decimal(String(hundredths)).div(100));
	const units = Object.keys(massUnits) as MassUnitId[];
	const ids = ['Au', 'Ag', 'Pt', 'Pd', 'Cu', 'Zn', 'Rh'] as const satisfies readonly MetalId[];
	const gramsOf = fc.tuple(places(10 ** 7), fc.integer({ min: 1, max: 24 })).map(([grams, k]) => ratio(grams.times(k), 24n));
	const someFine = fc.dictionary(fc.constantFrom(...ids), gramsOf).map((fine) => ({ ...fine }) as FineGrams);
	const someSheet = fc
		.tuple(...ids.map((metal) => fc.tuple(places(10 ** 7), fc.constantFrom(...units)).map(([amount, per]) => ({ metal, amount, per }))))
		.map((quotes): PriceSheet => ({ currency: 'EUR', quotes, at: 0, source: 'drawn' }));

	it('equals the sum taken metal by metal, and its printed parts make its printed total', () => {
		fc.assert(
			fc.property(someFine, someSheet, (fine, drawn) => {
				const value = valueOf(fine, drawn);
				let byHand: Exact = { n: 0n, d: 1n };
				for (const quote of drawn.quotes) {
					const grams = fine[quote.metal];
					if (grams !== undefined) byHand = plus(byHand, times(grams, ratio(quote.amount, massUnits[quote.per].grams)));
				}
				expect(compareExact(value.total, byHand)).toBe(0);
				const printed = printedValue(value, 'EUR');
				const parts = Object.values(printed.byMetal).reduce((total: Decimal, part) => total.plus(part), ZERO);
				expect(parts.equals(printed.total.amount)).toBe(true);
				expect(printed.total.amount.equals(roundMoney(byHand, 'EUR', 'half-even').amount)).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is linear: two parcels together are worth the sum of both', () => {
		fc.assert(
			fc.property(someFine, someFine, someSheet, (a, b, drawn) => {
				const both: FineGrams = { ...a };
				for (const [metal, grams] of Object.entries(b) as [MetalId, Exact][]) both[metal] = plus(both[metal] ?? exact(0n), grams);
				expect(compareExact(valueOf(both, drawn).total, plus(valueOf(a, drawn).total, valueOf(b, drawn).total))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('what is not known about a value', () => {
	const perGram: PriceSheet = { ...sheet, quotes: [{ metal: 'Au', amount: decimal('100'), per: 'g' }, { metal: 'Ag', amount: decimal('2'), per: 'g' }] };

	it('adds what metals share before it squares what they do not', () => {
		const fine = { Au: uncertain(10, 'scale:1', 0.03), Ag: uncertain(500, 'scale:1', 1) };
		// the scale: 0.03 x 100 + 1 x 2 = 5, not the root of 9 + 4
		expect(standardUncertainty(uncertainValue(fine, perGram, 0))).toBeCloseTo(5, 12);
		expect(uncertainValue(fine, perGram, 0).value).toBeCloseTo(2000, 12);
	});

	it('widens with the age of the sheet', () => {
		const year = 365 * 86_400_000;
		const value = uncertainValue({ Au: certain(10) }, perGram, year, { Au: 0.2 });
		expect(value.contributions['price:Au']).toBeCloseTo(200, 10);
		expect(uncertainValue({ Pt: certain(10) }, perGram, year).value).toBe(0);
	});
});
