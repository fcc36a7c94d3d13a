import { divide, EXACT_ZERO, exact, plus, times, toNumber, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { certain, plusUncertain, timesUncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import { metalIds, type MetalId } from '../metal/metals.ts';
import type { LossClassId } from '../piece/loss-class.ts';
import { balance, type MetalBalance } from './balance.ts';
import { quotient } from './combine.ts';
import { expected, lossesOf, type LossOverrides, type Losses } from './losses.ts';
import { spread, type MeltParcel } from './spread.ts';

export type MeltProblem = { readonly kind: 'melt-empty' };

export type MetalYield = MetalBalance & {
	/** Retained fine grams with their sources. */
	readonly grams: Uncertain;
	/** Expected fineness of the bar, ‰. */
	readonly perMille: Exact;
	readonly fineness: Uncertain;
};

/** What the bar will be. Exact parts add up to what went in; uncertain ones say how far off each may be, and from which source. */
export type MeltYield = {
	readonly net: Exact;
	readonly nonMetal: Exact;
	readonly metalLoss: Exact;
	readonly bar: Exact;
	readonly barMass: Uncertain;
	/** Grams that are lost in all: non-metal and metal. */
	readonly grossLoss: Uncertain;
	readonly metals: Partial<Record<MetalId, MetalYield>>;
	/** Classes whose metal loss did not fit the metal and was held within its bounds. */
	readonly limited: readonly LossClassId[];
};

const PER_MILLE: Exact = { n: 1000n, d: 1n };

/**
 * The bar that a melt is expected to give, with its fine metal and fineness.
 * formula: bar M = Σ net (1 − non-metal)(1 − metal loss); fine F = Σ retention × net (1 − non-metal) × fineness (grams);
 * fineness of the bar = 1000 F ÷ M (‰)
 * rounding: none of the expected figures, fractions; intervals are estimates.
 * source: conservation of mass; delta method, JCGM 100:2008 (GUM) 5.2.2 with shared sources, from memory; the losses by class
 * are working defaults.
 */
export function meltYield(parcels: readonly MeltParcel[], own: LossOverrides = {}): Result<MeltYield, MeltProblem> {
	const weighed = parcels.filter(({ net }) => net.gt(0));
	if (weighed.length === 0) return fail({ kind: 'melt-empty' });
	let totals = { net: EXACT_ZERO, nonMetal: EXACT_ZERO, metalLoss: EXACT_ZERO, bar: EXACT_ZERO };
	const limited = new Set<LossClassId>();
	const sums = new Map<MetalId, { part: MetalBalance; grams: Uncertain }>();
	let barMass = certain(0);
	let grossLoss = certain(0);
	for (const parcel of weighed) {
		const losses = lossesOf(parcel.lossClass, own);
		const part = balance(exact(parcel.net), parcel.fine, sharesOf(losses));
		const doubt = spread(parcel, losses, part.limit);
		totals = {
			net: plus(totals.net, part.net),
			nonMetal: plus(totals.nonMetal, part.nonMetal),
			metalLoss: plus(totals.metalLoss, part.metalLoss),
			bar: plus(totals.bar, part.bar)
		};
		if (part.limit !== null) limited.add(parcel.lossClass);
		barMass = plusUncertain(barMass, doubt.bar);
		grossLoss = plusUncertain(grossLoss, doubt.grossLoss);
		for (const [metal, each] of Object.entries(part.metals) as [MetalId, MetalBalance][]) {
			const before = sums.get(metal);
			const grams = doubt.retained[metal]!;
			if (before === undefined) sums.set(metal, { part: each, grams });
			else sums.set(metal, { part: add(before.part, each), grams: plusUncertain(before.grams, grams) });
		}
	}
	const metals: Partial<Record<MetalId, MetalYield>> = {};
	for (const metal of metalIds) {
		const found = sums.get(metal);
		if (found === undefined) continue;
		metals[metal] = {
			...found.part,
			grams: found.grams,
			perMille: divide(times(found.part.retained, PER_MILLE), totals.bar),
			fineness: timesUncertain(quotient(found.grams, barMass), 1000)
		};
	}
	return ok({ ...totals, barMass, grossLoss, metals, limited: [...limited] });
}

function sharesOf({ nonMetal, metalLoss, retention }: Losses) {
	return { nonMetal: expected(nonMetal), metalLoss: expected(metalLoss), retention: expected(retention) };
}

function add(a: MetalBalance, b: MetalBalance): MetalBalance {
	return {
		counted: plus(a.counted, b.counted),
		notThere: plus(a.notThere, b.notThere),
		lost: plus(a.lost, b.lost),
		retained: plus(a.retained, b.retained)
	};
}

/**
 * How much lighter the bar is than the metal that went in: what people call melt loss.
 * formula: 1 − bar ÷ net (a share)
 * rounding: none, for display.
 * source: common practice, no source.
 */
export function lossShare(result: MeltYield): number {
	return 1 - toNumber(divide(result.bar, result.net));
}
