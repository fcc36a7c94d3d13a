import { decimal } from '../number/decimal.ts';
import { compareExact, exact, EXACT_ZERO, exactToText, ratio, sum, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { fromShare, type Fineness } from './fineness.ts';
import type { MetalId } from './metals.ts';

/** What a metal is made of: shares of the mass that sum to one, exactly. */
export type Alloy = { readonly name: string; readonly shares: readonly Share[] };
export type Share = { readonly metal: MetalId; readonly share: Exact };

export type AlloyProblem =
	| { readonly kind: 'alloy-empty'; readonly name: string }
	| { readonly kind: 'alloy-share-negative'; readonly name: string; readonly metal: MetalId; readonly share: string }
	| { readonly kind: 'alloy-metal-twice'; readonly name: string; readonly metal: MetalId }
	| { readonly kind: 'alloy-not-whole'; readonly name: string; readonly sum: string };

const WHOLE = exact(1n);

/**
 * An alloy from its shares of mass.
 * formula: no share negative, no metal twice, shares sum to exactly one.
 * rounding: none; a recipe that misses one is refused, never scaled in silence.
 * source: common practice, no source.
 */
export function alloy(name: string, shares: readonly Share[]): Result<Alloy, AlloyProblem> {
	const held = shares.filter(({ share }) => compareExact(share, EXACT_ZERO) !== 0);
	if (held.length === 0) return fail({ kind: 'alloy-empty', name });
	const seen = new Set<MetalId>();
	for (const { metal, share } of held) {
		if (compareExact(share, EXACT_ZERO) < 0) return fail({ kind: 'alloy-share-negative', name, metal, share: exactToText(share) });
		if (seen.has(metal)) return fail({ kind: 'alloy-metal-twice', name, metal });
		seen.add(metal);
	}
	const total = sum(held.map(({ share }) => share));
	if (compareExact(total, WHOLE) !== 0) return fail({ kind: 'alloy-not-whole', name, sum: exactToText(total) });
	return ok({ name, shares: held });
}

/** The fineness of one metal in an alloy; zero when it holds none. */
export function finenessIn(of: Alloy, metal: MetalId): Fineness {
	return fromShare(of.shares.find((part) => part.metal === metal)?.share ?? EXACT_ZERO);
}

const percent = (metal: MetalId, text: string): Share => ({ metal, share: ratio(decimal(text), 100n) });

/**
 * Alloys that come over the counter, by the name the trade uses.
 * formula: shares of mass.
 * rounding: as the trade states them.
 * source: common practice, no source; real recipes differ from maker to maker.
 */
export const commonAlloys = {
	sterling: { name: 'sterling silver', shares: [percent('Ag', '92.5'), percent('Cu', '7.5')] },
	coin: { name: 'coin silver', shares: [percent('Ag', '90'), percent('Cu', '10')] },
	brass: { name: 'brass', shares: [{ metal: 'Cu', share: ratio(2n, 3n) }, { metal: 'Zn', share: ratio(1n, 3n) }] },
	bronze: { name: 'bronze', shares: [percent('Cu', '88'), percent('Sn', '12')] },
	cupronickel: { name: 'cupronickel', shares: [percent('Cu', '75'), percent('Ni', '25')] },
	nickelSilver: { name: 'nickel silver', shares: [percent('Cu', '60'), percent('Zn', '20'), percent('Ni', '20')] },
	yellowGold: { name: 'yellow gold', shares: [percent('Au', '80'), percent('Ag', '20')] },
	crownGold: { name: 'crown gold', shares: [{ metal: 'Au', share: ratio(22n, 24n) }, { metal: 'Cu', share: ratio(2n, 24n) }] },
	stainless: {
		name: 'stainless steel',
		shares: [percent('Fe', '80.6'), percent('Cr', '18'), percent('Ni', '1'), percent('C', '0.4')]
	},
	copper: { name: 'copper', shares: [percent('Cu', '100')] }
} as const satisfies Record<string, Alloy>;

export type CommonAlloyId = keyof typeof commonAlloys;
