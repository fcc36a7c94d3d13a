import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactToText } from '../../../../src/trade/number/exact.ts';
import { freeLetter, purchaseNumber, readPurchaseNumber } from '../../../../src/trade/record/kinds/purchase.ts';
import { decodeBody } from '../../../../src/trade/record/kind.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('a purchase', () => {
	it('reads version 1 as it was written', () => {
		const { paid, offer, share, totals, prices, second, ...rest } = frozenBody('purchase');
		expect(rest).toEqual({
			number: 'A-0001',
			lot: 'lot-1',
			boughtAt: 1_790_000_000_001,
			seller: { name: 'Maren Holt', document: 'passport 12', note: '' },
			means: 'cash',
			sheet: 'sheet-1',
			entries: 1,
			pieces: 3
		});
		expect([paid.amount.toFixed(2), paid.currency, offer.amount.toFixed(2), share.toFixed()]).toEqual(['350.05', 'EUR', '350.00', '0.82']);
		expect([totals.gross.toFixed(), totals.net.toFixed(), exactToText(totals.fine.Au!), exactToText(totals.value)]).toEqual([
			'11.9',
			'11.5',
			'161/24',
			'75713/100'
		]);
		expect(prices.quotes).toHaveLength(2);
		expect(second?.reading.toFixed()).toBe('11.91');
	});
	it('is checked field by field', () => expectEveryFieldChecked('purchase'));
	it('keeps money as its currency counts it', () => {
		const { body } = frozen('purchase');
		expect(decodeBody('purchase', 1, changedAt(body, ['paid', 'amount'], '350.055')).ok).toBe(false);
		expect(decodeBody('purchase', 1, changedAt(body, ['paid', 'amount'], '-1')).ok).toBe(false);
	});
});

describe('purchase numbers', () => {
	it('read back', () => {
		fc.assert(
			fc.property(fc.constantFrom('A', 'B', 'Z', 'AA', 'QX'), fc.integer({ min: 1, max: 999_999_999 }), (letter, count) => {
				expect(readPurchaseNumber(purchaseNumber(letter, count))).toEqual({ letter, count });
			}),
			{ numRuns: 1_000 }
		);
		expect(purchaseNumber('A', 7)).toBe('A-0007');
		expect(purchaseNumber('B', 12_345)).toBe('B-12345');
	});
	it.each(['', 'A-1', 'a-0001', 'A0001', 'AAA-0001', 'A-0001 ', 'null'])('%j is none', (text) => {
		expect(readPurchaseNumber(text)).toBeNull();
	});
	it('take the first letter that nobody has', () => {
		expect(freeLetter(new Set())).toBe('A');
		expect(freeLetter(new Set(['A', 'C']))).toBe('B');
		expect(freeLetter(new Set([...'ABCDEFGHIJKLMNOPQRSTUVWXYZ']))).toBe('AA');
	});
});
