import { weighAgain } from '$trade/lot/weigh-again.ts';
import type { Scale } from '$trade/mass/scale.ts';
import type { Weighing } from '$trade/mass/weighing.ts';
import { metals, type MetalId } from '$trade/metal/metals.ts';
import { compareExact } from '$trade/number/exact.ts';
import { askedFor } from '$trade/price/asked.ts';
import { printedValue, valueOf } from '$trade/price/value.ts';
import type { PurchaseBody } from '$trade/record/kinds/purchase.ts';
import type { Entry } from '$storage/rows.ts';
import { GRAMS_SHOWN, type Format } from '$ui/format.ts';
import { sentence } from '$ui/sentences.ts';

type Fact = { readonly name: string; readonly value: string; readonly note?: string; readonly strong?: boolean };

/** Seller, money and masses of a purchase, as they were. */
export function moneyFacts(body: PurchaseBody, format: Format): readonly Fact[] {
	const { seller, totals, prices, paid, offer, share, means } = body;
	const paidShare = paid.amount.gt(0) ? askedFor(totals.value, paid).share : null;
	const ofValue = paidShare === null ? '' : `${format.share(paidShare, 1)} of the melt value`;
	return [
		{ name: 'Seller', value: seller.name || 'no name', note: [seller.document, seller.note].filter((part) => part !== '').join(' · ') },
		{ name: 'Melt value', value: format.worth(totals.value, prices.currency) },
		{ name: `Offer, ${format.share(share)}`, value: format.money(offer) },
		{ name: means === '' ? 'Paid' : `Paid, ${means}`, value: format.money(paid), note: ofValue, strong: true },
		{
			name: 'Gross mass',
			value: format.mass(totals.gross, 'g', GRAMS_SHOWN),
			...(totals.net.equals(totals.gross) ? {} : { note: `${format.mass(totals.net, 'g', GRAMS_SHOWN)} net of what is not metal` })
		}
	];
}

/** Each metal with its fine mass, the price it was bought at, and its value; the values add up to the printed melt value. */
export function metalFacts({ totals, prices }: PurchaseBody, format: Format): readonly Fact[] {
	const value = valueOf(totals.fine, prices);
	const { byMetal } = printedValue(value, prices.currency);
	const found = (Object.entries(totals.fine) as [MetalId, (typeof totals.fine)[MetalId]][]).flatMap(([metal, grams]) =>
		grams === undefined ? [] : [{ metal, grams }]
	);
	return [
		...found
			.sort((a, b) => compareExact(b.grams, a.grams))
			.map(({ metal, grams }) => {
				const quote = prices.quotes.find((each) => each.metal === metal);
				const worth = byMetal[metal];
				return {
					name: capital(metals[metal].name),
					value: [format.fine(metal, grams), worth === undefined ? '' : format.amount({ amount: worth, currency: prices.currency })]
						.filter((part) => part !== '')
						.join(' · '),
					note: quote === undefined ? 'no price, counted as nothing' : `${format.price(quote.amount, prices.currency)} ${format.per(quote.per)}`
				};
			}),
		{
			name: 'Prices of',
			value: format.moment(prices.at),
			...(prices.source === '' ? {} : { note: prices.source })
		}
	];
}

/** A name at the start of a line. */
function capital(name: string): string {
	return name.slice(0, 1).toUpperCase() + name.slice(1);
}

/** What the weighing at the payment says about the pieces that were weighed one by one. */
export function weighedAgain(second: Weighing, pieces: readonly Entry<'piece'>[], scales: readonly Scale[], format: Format): string {
	const weighed = pieces.flatMap(({ body }) => body?.piece.weighing ?? []);
	const compared = weighAgain(weighed, second, scales);
	const text = `Weighed again at the payment: ${format.weighing(second)}`;
	return compared.ok ? `${text}, as the pieces together.` : `${text}. ${sentence(compared.problem, format)}`;
}
