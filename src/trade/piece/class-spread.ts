import type { Origin } from '../evidence/origin.ts';

/**
 * How far pieces run from the fineness they are taken at, as relative standard uncertainties:
 * `shared` is the error of the whole class, the same in every piece of it; `own` is one piece's scatter about its class.
 */
export type Spread = { readonly shared: number; readonly own: number };

/** What decides the spread: where the piece comes from, or a make whose metal is only a layer or a shell. */
export type SpreadId = Origin | 'layered' | 'weighted';

/**
 * Working defaults, to be replaced by the buyer's own settlements.
 * rounding: none.
 * source: common practice, no source; the order follows how far each market controls its marks.
 */
export const defaultSpreads: Readonly<Record<SpreadId, Spread>> = {
	hallmarked: { shared: 0.002, own: 0.004 },
	'us-modern': { shared: 0.006, own: 0.011 },
	'us-before-1981': { shared: 0.015, own: 0.025 },
	uncontrolled: { shared: 0.03, own: 0.05 },
	unmarked: { shared: 0.02, own: 0.04 },
	'stranger-bar': { shared: 0.003, own: 0.006 },
	layered: { shared: 0.15, own: 0.15 },
	weighted: { shared: 0.15, own: 0.05 }
};

export function isSpreadId(text: string): text is SpreadId {
	return Object.hasOwn(defaultSpreads, text);
}

/** Which spread a piece has: a filled mark ("1/20 14 kt") and a weighted one speak louder than the origin. */
export function spreadIdFor(mark: string, origin: Origin): SpreadId {
	const stamp = mark.toLowerCase();
	if (stamp.includes('weighted')) return 'weighted';
	return /^1\/\d/.test(stamp) || /\b(?:gf|filled|rolled|rgp|plated|vermeil)\b/.test(stamp) ? 'layered' : origin;
}

export function spreadFor(
	mark: string,
	origin: Origin,
	overrides: Partial<Readonly<Record<SpreadId, Spread>>> = {}
): Spread {
	const id = spreadIdFor(mark, origin);
	return overrides[id] ?? defaultSpreads[id];
}
