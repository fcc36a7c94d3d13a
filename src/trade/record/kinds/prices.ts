import { priceSheet, type PriceSheet, type Quote } from '../../price/price-sheet.ts';
import { list, moment, object, positiveText, refined, text } from '../shape.ts';
import { currency, massUnit, metal } from './shared.ts';

/** Each price sheet is a subject of its own: it is never changed, only followed by a newer one. */
export const pricesShape = refined(
	object<PriceSheet>({
		currency,
		quotes: list(object<Quote>({ metal, amount: positiveText, per: massUnit })),
		at: moment,
		source: text
	}),
	(sheet) => {
		const checked = priceSheet(sheet);
		return checked.ok ? null : `a price sheet (${checked.problem.kind})`;
	}
);
