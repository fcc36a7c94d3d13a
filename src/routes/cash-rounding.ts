import type { CurrencyCode } from '$trade/price/currency.ts';
import type { OfferRounding } from '$trade/price/offer.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';

/** The buyer's cash step is of his own currency: an offer at a sheet in another one goes to that one's minor unit. */
export function cashRounding({ cashStep, currency }: SettingsBody, offered: CurrencyCode): OfferRounding {
	return cashStep === null || currency !== offered ? {} : { step: cashStep };
}
