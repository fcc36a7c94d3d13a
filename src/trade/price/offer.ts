import { assert, ONE, type Decimal } from '../number/decimal.ts';
import { compareExact, exact, times, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import type { Direction } from '../number/rounding.ts';
import type { CurrencyCode } from './currency.ts';
import { roundMoney, type Money } from './money.ts';

/** From this value of the lot on, this share of the value is paid (0.85 = 85 %). */
export type Tier = { readonly from: Decimal; readonly share: Decimal };

export type OfferProblem =
	| { readonly kind: 'offer-no-tiers' }
	| { readonly kind: 'offer-first-tier'; readonly from: Decimal }
	| { readonly kind: 'offer-tier-twice'; readonly from: Decimal }
	| { readonly kind: 'offer-tier-from'; readonly from: Decimal }
	| { readonly kind: 'offer-share'; readonly share: Decimal; readonly from: Decimal };

/** Tiers in order: the first from 0, each limit once, each share over 0 and at most 1 (nobody means to pay more than the metal). */
export function tiers(list: readonly Tier[]): Result<readonly Tier[], OfferProblem> {
	const ordered = [...list].sort((a, b) => a.from.comparedTo(b.from));
	const first = ordered[0];
	if (first === undefined) return fail({ kind: 'offer-no-tiers' });
	for (const [index, { from, share }] of ordered.entries()) {
		if (from.lt(0)) return fail({ kind: 'offer-tier-from', from });
		if (index > 0 && from.equals(ordered[index - 1]!.from)) return fail({ kind: 'offer-tier-twice', from });
		if (!share.gt(0) || share.gt(ONE)) return fail({ kind: 'offer-share', share, from });
	}
	return first.from.isZero() ? ok(ordered) : fail({ kind: 'offer-first-tier', from: first.from });
}

/**
 * The share of the value that is paid for a lot of this value.
 * formula: the share of the highest tier whose limit the value reaches (the limit itself belongs to the higher tier)
 * rounding: none.
 * source: common practice, no source.
 */
export function shareFor(value: Exact, list: readonly Tier[]): Decimal {
	let best: Tier | undefined;
	for (const tier of list) {
		if (compareExact(exact(tier.from), value) <= 0 && (best === undefined || tier.from.gt(best.from))) best = tier;
	}
	assert(best !== undefined, 'no tier reaches down to this value');
	return best.share;
}

export type Offer = {
	readonly share: Decimal;
	/** Share × value before the rounding. */
	readonly unrounded: Exact;
	readonly offer: Money;
};

/** How an offer is rounded: to the minor unit and downwards unless the buyer set a cash step or another direction. */
export type OfferRounding = { readonly step?: Decimal; readonly direction?: Direction };

/**
 * What is offered for a lot.
 * formula: offer = value × share of the tier (currency)
 * rounding: once, to the cash step (default the minor unit), downwards unless another direction is set.
 * source: common practice, no source.
 */
export function offerFor(value: Exact, currency: CurrencyCode, list: readonly Tier[], rounding: OfferRounding = {}): Offer {
	assert(value.n >= 0n, 'an offer for less than nothing');
	const share = shareFor(value, list);
	const unrounded = times(value, exact(share));
	return { share, unrounded, offer: roundMoney(unrounded, currency, rounding.direction ?? 'down', rounding.step) };
}
