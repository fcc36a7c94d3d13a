import { metals, type MetalId } from '$trade/metal/metals.ts';
import { massUnits, type MassUnitId } from '$trade/mass/units.ts';
import { toNumber } from '$trade/number/exact.ts';
import { placesOf } from '$trade/price/currency.ts';
import { priceIn, type PriceSheet } from '$trade/price/price-sheet.ts';
import type { Entry } from '$storage/rows.ts';
import type { Format } from '$ui/format.ts';
import { changeWords, titled } from '$ui/prices/price-words.ts';
import { changeFrom } from './price-form.ts';

/** Sheets, newest first, as the list shows them. The last of them has its changes only when the one before it is known too. */
export function listed(entries: readonly Entry<'prices'>[], shown: number, now: number, format: Format) {
	return entries.slice(0, shown).map((entry, index) => {
		const { subject: id, body } = entry;
		if (body === null) {
			const note = 'This sheet cannot be read.';
			return { id, when: format.moment(entry.at), currency: '', source: '', quotes: [], note, removable: false };
		}
		const earlier = entries.slice(index + 1).find((each) => each.body !== null)?.body ?? null;
		const quotes = body.quotes.map((quote) => {
			const change = changeFrom(earlier, body.currency, quote);
			return {
				metal: quote.metal,
				name: titled(metals[quote.metal].name),
				price: `${format.price(quote.amount, body.currency)} ${format.per(quote.per)}`,
				change: change === null ? '' : changeWords(change, format)
			};
		});
		const ahead = body.at - now > 5 * 60_000;
		const note = ahead ? 'Dated ahead of this clock: it counts as the newest until then. Remove it if the clock was wrong.' : '';
		return { id, when: format.moment(body.at), currency: body.currency, source: body.source, quotes, note, removable: true };
	});
}

/** The metals that have a price on any of these sheets, in the order of their first appearance. */
export function metalsOf(entries: readonly Entry<'prices'>[]): MetalId[] {
	return [...new Set(entries.flatMap(({ body }) => body?.quotes.map(({ metal }) => metal) ?? []))];
}

/** One metal's prices through the sheets in one currency, all in the unit of the newest, oldest first. */
export function priceCurve(entries: readonly Entry<'prices'>[], metal: MetalId, format: Format) {
	const priced = entries.flatMap(({ body }) => {
		const quote = body?.quotes.find((each) => each.metal === metal);
		return body === null || quote === undefined ? [] : [{ body, quote }];
	});
	const newest = priced[0];
	if (newest === undefined) return null;
	const { currency } = newest.body;
	const per = newest.quote.per;
	const points = priced
		.filter(({ body }) => body.currency === currency)
		.map(({ body, quote }) => {
			const price = priceIn(quote, per);
			const when = { when: format.moment(body.at), day: format.date(body.at) };
			return { at: body.at, value: toNumber(price), price: format.number(price, pricePlaces(body)), ...when };
		})
		.reverse();
	return { title: `${titled(metals[metal].name)}, ${currency} per ${massUnits[per].symbol}`, points, text: curveWords(points, per, format) };
}

function pricePlaces({ currency }: PriceSheet): { least: number; most: number } {
	const minor = placesOf(currency);
	return { least: minor, most: minor + 1 };
}

type Point = { readonly value: number; readonly price: string; readonly when: string; readonly day: string };

/** The picture in words. */
function curveWords(points: readonly Point[], per: MassUnitId, format: Format): string {
	const [first, last] = [points[0], points.at(-1)];
	if (first === undefined || last === undefined || points.length === 1) {
		return 'One sheet so far. The picture begins with the second.';
	}
	const high = points.reduce((best, each) => (each.value > best.value ? each : best));
	const low = points.reduce((best, each) => (each.value < best.value ? each : best));
	const unit = format.per(per);
	// within one day the hour tells sheets apart
	const on = (point: Point): string => `${point.price} on ${first.day === last.day ? point.when : point.day}`;
	const ends = `${format.count(points.length)} sheets, ${unit}: ${on(first)}; ${on(last)}.`;
	const between = points.length > 2 && high.value > low.value;
	return between ? `${ends} Lowest ${on(low)}; highest ${on(high)}.` : ends;
}
