import type { Weighing } from '../../mass/weighing.ts';
import type { MetalId } from '../../metal/metals.ts';
import type { Decimal } from '../../number/decimal.ts';
import type { Exact } from '../../number/exact.ts';
import type { Money } from '../../price/money.ts';
import type { PriceSheet } from '../../price/price-sheet.ts';
import { byKey, decimalText, exactText, moment, name, nullable, object, text, whole } from '../shape.ts';
import { metal, money, weighing } from './shared.ts';
import { pricesShape } from './prices.ts';

/** A lot that was paid for. Everything the slip shows is kept here as it was, and does not change when a price or a setting does. */
export type PurchaseBody = {
	/** "A-0001". Null only on the way in: the writer fills it in, without gaps for each device's letter. */
	readonly number: string | null;
	readonly lot: string;
	readonly boughtAt: number;
	readonly seller: { readonly name: string; readonly document: string; readonly note: string };
	readonly paid: Money;
	/** How it was paid, in the buyer's words: cash, transfer. */
	readonly means: string;
	readonly offer: Money;
	/** The share of the value that the offer was made at. */
	readonly share: Decimal;
	/** The price sheet's own subject, and what it said. */
	readonly sheet: string;
	readonly prices: PriceSheet;
	readonly totals: {
		readonly gross: Decimal;
		readonly net: Decimal;
		readonly fine: Partial<Record<MetalId, Exact>>;
		readonly value: Exact;
	};
	/** The lot weighed again at the payment; null: it was not. */
	readonly second: Weighing | null;
	readonly entries: number;
	readonly pieces: number;
};

export const purchaseShape = object<PurchaseBody>({
	number: nullable(text),
	lot: name,
	boughtAt: moment,
	seller: object<PurchaseBody['seller']>({ name: text, document: text, note: text }),
	paid: money,
	means: text,
	offer: money,
	share: decimalText,
	sheet: name,
	prices: pricesShape,
	totals: object<PurchaseBody['totals']>({
		gross: decimalText,
		net: decimalText,
		fine: byKey(metal, exactText),
		value: exactText
	}),
	second: nullable(weighing),
	entries: whole,
	pieces: whole
});

const NUMBER = /^([A-Z]{1,2})-(\d{4,9})$/;

/** "A-0007" of letter A and 7. */
export function purchaseNumber(letter: string, count: number): string {
	return `${letter}-${String(count).padStart(4, '0')}`;
}

/** Letter and count of a purchase number; null for anything else. */
export function readPurchaseNumber(text: string): { readonly letter: string; readonly count: number } | null {
	const found = NUMBER.exec(text);
	return found === null ? null : { letter: found[1]!, count: Number(found[2]) };
}

/** The first letter that no other device has numbered purchases with: A to Z, then AA to ZZ. */
export function freeLetter(taken: ReadonlySet<string>): string {
	const alphabet = [...'ABCDEFGHIJKLMNOPQRSTUVWXYZ'];
	for (const first of ['', ...alphabet]) {
		for (const second of alphabet) if (!taken.has(first + second)) return first + second;
	}
	return 'ZZ';
}
