import type { PriceSheet, Quote } from '../../price/price-sheet.ts';
import { decimalText, list, moment, object, text } from '../shape.ts';
import { currency, massUnit, metal } from './shared.ts';

/** Each price sheet is a subject of its own: it is never changed, only followed by a newer one. */
export const pricesShape = object<PriceSheet>({
	currency,
	quotes: list(object<Quote>({ metal, amount: decimalText, per: massUnit })),
	at: moment,
	source: text
});
