import { describe, expect, it } from 'vitest';
import { decimal } from '../../src/trade/number/decimal.ts';
import { compareExact, exact, ratio } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';
import type { MassUnitId } from '../../src/trade/mass/units.ts';
import { chanceOfLoss } from '../../src/trade/price/asked.ts';
import { currencyCodes, placesOf, type CurrencyCode } from '../../src/trade/price/currency.ts';
import { priceIn, type Quote } from '../../src/trade/price/price-sheet.ts';
import { valueOf } from '../../src/trade/price/value.ts';

const gold = (amount: string, per: MassUnitId): Quote => ({ metal: 'Au', amount: decimal(amount), per });
const printed = (quote: Quote, per: MassUnitId, step: string) => round(priceIn(quote, per), decimal(step), 'half-even').toString();

// Source: Oregon Department of Agriculture, Measurement Standards, precious-metal scales: price equivalences
describe('Oregon Department of Agriculture: one price in three units', () => {
	it('$100 per troy ounce is $3.215 per gram', () => {
		expect(printed(gold('100', 'ozt'), 'g', '0.001')).toBe('3.215');
	});
	it('$100 per troy ounce is $5 per pennyweight, exactly', () => {
		expect(compareExact(priceIn(gold('100', 'ozt'), 'dwt'), exact(5n))).toBe(0);
	});
	it('$10 per pennyweight is $6.43 per gram', () => {
		expect(printed(gold('10', 'dwt'), 'g', '0.01')).toBe('6.43');
	});
	it('$10 per pennyweight is $200 per troy ounce: second route to the same table', () => {
		expect(compareExact(priceIn(gold('10', 'dwt'), 'ozt'), exact(200n))).toBe(0);
	});
});

// Source: agreed table of small bars (LBMA): a bar of 1000 g at 999.9 ‰ is 32.148 ozt, 100 g at 999.9 ‰ is 3.215 ozt fine
describe('the agreed table of small bars, at a price of 1 per troy ounce', () => {
	it.each([
		['1000', '999.9', '32.148'],
		['1000', '995', '31.990'],
		['500', '999', '16.059'],
		['100', '999.9', '3.215']
	])('%s g at %s ‰ is worth %s', (grams, perMille, ounces) => {
		const sheet = { currency: 'USD', quotes: [gold('1', 'ozt')], at: 0, source: 'table' } as const;
		const value = valueOf({ Au: ratio(decimal(grams).times(decimal(perMille)), 1000n) }, sheet);
		expect(round(value.total, decimal('0.001'), 'half-even').toFixed(3)).toBe(ounces);
	});
});

// Source: ISO 4217, table A.1, column "minor unit", from memory
describe('ISO 4217, table A.1: minor units, from memory', () => {
	it.each<[number, string]>([
		[0, 'JPY KRW VND ISK CLP PYG UGX XAF XOF XPF RWF GNF KMF DJF BIF VUV'],
		[2, 'EUR USD GBP CHF CAD AUD NZD CNY HKD INR TRY ZAR BRL MXN SEK NOK DKK CZK PLN HUF THB SGD AED SAR ILS'],
		[3, 'BHD IQD JOD KWD LYD OMR TND']
	])('%i places: %s', (places, codes) => {
		for (const code of codes.split(' ')) expect(placesOf(code as CurrencyCode), code).toBe(places);
	});

	it('agrees with the second list that this platform carries, for all but currencies whose small coins are out of use', () => {
		const differing = currencyCodes.filter((currency) => {
			const digits = new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits;
			return digits !== placesOf(currency);
		});
		// such a list may say how prices are written, not how the currency is divided; it never has more places than the standard
		for (const currency of differing) {
			const digits = new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits;
			expect(digits, currency).toBeLessThan(placesOf(currency));
		}
		expect(currencyCodes.length - differing.length).toBeGreaterThan(110);
	});
});

// Source: common practice, a worked example of a holding period from memory: "30 days on hold at 8 % and 25 % a year is a 14 % chance of loss"
describe('the chance of loss over a holding period', () => {
	it('30 days, margin 8 %, volatility 25 %: 14 %', () => {
		expect(Math.round(100 * chanceOfLoss(0.08, 0.25, 30))).toBe(14);
	});

	// Source: standard normal table (Abramowitz & Stegun, table 26.1, from memory): Φ(−1) = 0.158655, Φ(−2) = 0.022750, Φ(−3) = 0.001350
	it.each([
		[1, 0.158655],
		[2, 0.02275],
		[3, 0.00135]
	])('a cushion of %i standard deviations over a year loses with %f', (deviations, chance) => {
		expect(chanceOfLoss(Math.expm1(deviations * 0.2), 0.2, 365)).toBeCloseTo(chance, 6);
	});
});
