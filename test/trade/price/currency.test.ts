import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import {
	cashStep, currencyCodes, isCurrencyCode, minorUnit, parseCurrency, placesOf, usualCashStep
} from '../../../src/trade/price/currency.ts';

describe('currencies', () => {
	it('holds each code once, three capitals', () => {
		expect(new Set(currencyCodes).size).toBe(currencyCodes.length);
		expect(currencyCodes.length).toBeGreaterThan(140);
		for (const code of currencyCodes) expect(code).toMatch(/^[A-Z]{3}$/);
	});

	it('reads a code in any case and nothing else', () => {
		expect(parseCurrency(' chf ')).toEqual({ ok: true, value: 'CHF' });
		for (const text of ['', 'EURO', '€', 'XAU', 'XXX', '__proto__', 'constructor']) expect(parseCurrency(text).ok).toBe(false);
		expect(isCurrencyCode('toString')).toBe(false);
	});

	it('gives the minor unit as a step', () => {
		expect(minorUnit('JPY').toString()).toBe('1');
		expect(minorUnit('EUR').toString()).toBe('0.01');
		expect(minorUnit('KWD').toString()).toBe('0.001');
	});

	it('suggests only cash steps that it would accept', () => {
		for (const code of currencyCodes) expect(cashStep(usualCashStep(code), code).ok).toBe(true);
		expect(usualCashStep('CHF').toString()).toBe('0.05');
		expect(usualCashStep('USD').toString()).toBe('0.01');
	});

	it('accepts a step exactly when it is a whole number of minor units', () => {
		fc.assert(
			fc.property(fc.constantFrom(...currencyCodes), fc.integer({ min: 1, max: 100_000 }), (code, thousandths) => {
				const step = decimal(String(thousandths)).div(1000);
				const unit = 10 ** (3 - placesOf(code));
				expect(cashStep(step, code).ok).toBe(thousandths % unit === 0);
			}),
			{ numRuns: 1_000 }
		);
	});
});
