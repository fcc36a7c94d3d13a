import { assert } from '../number/decimal.ts';
import { compareExact, divide, EXACT_ZERO, isZero, minus, plus, sum, times, type Exact } from '../number/exact.ts';
import { metals, type MetalId } from '../metal/metals.ts';

/** The shares that a melt takes from metal of one loss class, as the balance is calculated with them. */
export type Shares = { readonly nonMetal: Exact; readonly metalLoss: Exact; readonly retention: Exact };

/** Where one metal's fine grams go. counted = notThere + lost + retained, exactly. */
export type MetalBalance = {
	readonly counted: Exact;
	/** Counted at the table as metal, but it was dirt, stone or flux. */
	readonly notThere: Exact;
	/** In slag, dust, fume or the crucible. */
	readonly lost: Exact;
	readonly retained: Exact;
};

/** Where the mass of one parcel goes. net = nonMetal + metalLoss + bar, exactly. */
export type Balance = {
	readonly net: Exact;
	readonly nonMetal: Exact;
	readonly metalLoss: Exact;
	readonly bar: Exact;
	readonly metals: Partial<Record<MetalId, MetalBalance>>;
	/** The class's metal loss does not fit: 'least' when the precious loss alone is more, 'most' when it would eat the base metal. */
	readonly limit: 'least' | 'most' | null;
};

const ONE: Exact = { n: 1n, d: 1n };
/** A melt takes at most half of the base metal, however little there is of it: our own working bound, no source. */
export const MOST_BASE_LOST: Exact = { n: 1n, d: 2n };

/**
 * What a melt makes of one parcel: precious metal is retained by its own share, base metal bears the rest of the metal loss.
 * formula: metal = net (1 − non-metal); precious retained = counted (1 − non-metal) × retention; metal loss = metal × loss, but not
 * less than the precious loss and not more than that and half the base metal; bar = metal − metal loss (grams)
 * rounding: none, fractions; what goes in comes out to the last digit.
 * source: M = Σ g(1−d)(1−ℓ), F = r Σ g(1−d)s: conservation of mass; the bounds are ours.
 */
export function balance(net: Exact, fine: Partial<Record<MetalId, Exact>>, shares: Shares): Balance {
	const keep = minus(ONE, shares.nonMetal);
	const metal = times(net, keep);
	const entries = Object.entries(fine) as [MetalId, Exact][];
	const precious = times(sum(entries.filter(([id]) => metals[id].precious).map(([, grams]) => grams)), keep);
	const base = minus(metal, precious);
	assert(base.n >= 0n, 'more precious metal than mass');
	const preciousLost = times(precious, minus(ONE, shares.retention));
	const wanted = minus(times(metal, shares.metalLoss), preciousLost);
	const most = times(base, MOST_BASE_LOST);
	const limit = wanted.n < 0n ? 'least' : compareExact(wanted, most) > 0 ? 'most' : null;
	const baseLost = limit === 'least' ? EXACT_ZERO : limit === 'most' ? most : wanted;
	const baseKept = isZero(base) ? ONE : minus(ONE, divide(baseLost, base));
	const byMetal: Partial<Record<MetalId, MetalBalance>> = {};
	for (const [id, counted] of entries) {
		const there = times(counted, keep);
		const retained = times(there, metals[id].precious ? shares.retention : baseKept);
		byMetal[id] = { counted, notThere: times(counted, shares.nonMetal), lost: minus(there, retained), retained };
	}
	const metalLoss = plus(preciousLost, baseLost);
	return { net, nonMetal: times(net, shares.nonMetal), metalLoss, bar: minus(metal, metalLoss), metals: byMetal, limit };
}
