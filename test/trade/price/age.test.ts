import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';
import { agedPrice, ageOf, defaultVolatility, sheetWarnings, volatilityOf, widen } from '../../../src/trade/price/age.ts';
import type { PriceSheet } from '../../../src/trade/price/price-sheet.ts';

const DAY = 86_400_000;
const sheet: PriceSheet = {
	currency: 'EUR',
	quotes: [{ metal: 'Au', amount: decimal('100'), per: 'g' }],
	at: 1_760_000_000_000,
	source: 'invented'
};

describe('the age of prices', () => {
	it('is counted in days and never under nothing', () => {
		expect(ageOf(sheet, sheet.at + 1.5 * DAY)).toBe(1.5);
		expect(ageOf(sheet, sheet.at - DAY)).toBe(0);
	});

	it('widens with the root of time', () => {
		expect(widen(0.25, 365)).toBe(0.25);
		expect(widen(0.2, 365 / 4)).toBeCloseTo(0.1, 15);
		expect(widen(0.3, 4) / widen(0.3, 1)).toBeCloseTo(2, 14);
		expect(widen(0.3, 0)).toBe(0);
		expect(() => widen(-0.1, 1)).toThrow(/volatility/);
	});

	it('gives a price its spread under its own source', () => {
		const aged = agedPrice(sheet, 'Au', sheet.at + 365 * DAY, { Au: 0.2 })!;
		expect(aged.value).toBe(100);
		expect(Object.keys(aged.contributions)).toEqual(['price:Au']);
		expect(standardUncertainty(aged)).toBeCloseTo(20, 12);
		expect(agedPrice(sheet, 'Ag', sheet.at)).toBeNull();
		expect(standardUncertainty(agedPrice(sheet, 'Au', sheet.at)!)).toBe(0);
	});

	it('takes the own figure before the default, and silver for a metal nobody named', () => {
		expect(volatilityOf('Au', { Au: 0.5 })).toBe(0.5);
		expect(volatilityOf('Au', { Ag: 0.5 })).toBe(defaultVolatility.Au);
		expect(volatilityOf('Co')).toBe(defaultVolatility.Ag);
		expect(() => volatilityOf('Au', { Au: Number.NaN })).toThrow(/volatility/);
	});

	it('warns of old prices and of a clock that was set back, not of a few minutes', () => {
		expect(sheetWarnings(sheet, sheet.at + DAY, 1)).toEqual([]);
		expect(sheetWarnings(sheet, sheet.at + 2 * DAY, 1)).toMatchObject([{ kind: 'price-sheet-old', days: 2, most: 1 }]);
		expect(sheetWarnings(sheet, sheet.at - 60_000, 1)).toEqual([]);
		expect(sheetWarnings(sheet, sheet.at - 3_600_000, 1)).toMatchObject([{ kind: 'price-sheet-ahead', minutes: 60 }]);
	});
});
