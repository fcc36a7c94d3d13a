import { ageOf } from '$trade/price/age.ts';
import { metalName } from '$ui/metal-name.ts';
import type { Shop } from './shop.svelte.ts';

/** From this age in days on a price is called old. */
export const OLD_DAYS = 1;

/** The latest sheet as the strip at the top shows it. */
export function stripQuotes({ sheet, now, format }: Shop) {
	if (sheet === null) return [];
	const { quotes, at, currency } = sheet.body;
	const age = format.age(at, now);
	const old = ageOf(sheet.body, now) > OLD_DAYS;
	return quotes.map(({ metal, amount, per }) => ({
		metal,
		name: metalName(metal),
		amount: format.price(amount, currency),
		per: format.per(per),
		age,
		old
	}));
}
