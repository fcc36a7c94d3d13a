import { assert } from '../number/decimal.ts';
import { hypotheses, type HypothesisId } from './belief.ts';
import type { Enrichment } from './enrichment.ts';
import type { Vector } from './grid.ts';

/** One alloy all through: its odds and the distribution of its bulk. */
export type SolidCase = { readonly id: Exclude<HypothesisId, 'layered'>; readonly odds: number; readonly bulk: Vector };

/** How thick the layer is decides which streaks go through it; so each thickness has its own likelihoods. */
export type Stratum = {
	readonly chance: number;
	/** Likelihood of what was seen of the bulk through such a layer, by its fineness. */
	readonly bulk: Vector;
	/** Likelihood of all the rest, for each material under the layer. */
	readonly outside: readonly number[];
};

export type Cases = {
	readonly solids: readonly SolidCase[];
	readonly enrichment: Enrichment;
	/** Likelihoods of all findings for a solid piece, by surface and by bulk. */
	readonly surface: Vector;
	readonly bulk: Vector;
	readonly layered: {
		readonly odds: number;
		readonly bulk: Vector;
		readonly strata: readonly Stratum[];
		/** Chance of each material under the layer. */
		readonly cores: readonly number[];
	};
};

export type Joint = {
	/** How likely the findings were, over all hypotheses. */
	readonly evidence: number;
	readonly odds: Readonly<Record<HypothesisId, number>>;
	/** The distribution of the bulk, over all hypotheses. */
	readonly bulk: Vector;
	/** The odds of each material under a layer, in the order of the cases; they sum to the odds of "layered". */
	readonly cores: readonly number[];
};

/**
 * The likelihood of a solid piece's surface findings by its bulk: seen through the enrichment.
 * formula: for each bulk, sum over enrichments of chance x likelihood at bulk + enrichment, held within 0 to 1000.
 * rounding: none.
 * source: law of total probability.
 */
export function throughSurface(surface: Vector, { first, chances }: Enrichment): Vector {
	const top = surface.length - 1;
	const seen = new Float64Array(surface.length);
	for (let step = 0; step < chances.length; step += 1) {
		const chance = chances[step]!;
		const by = first + step;
		const from = Math.min(top + 1, Math.max(0, -by));
		const to = Math.max(-1, Math.min(top, top - by));
		for (let cell = 0; cell < from; cell += 1) seen[cell]! += chance * surface[0]!;
		for (let cell = from; cell <= to; cell += 1) seen[cell]! += chance * surface[cell + by]!;
		for (let cell = Math.max(from, to + 1); cell <= top; cell += 1) seen[cell]! += chance * surface[top]!;
	}
	return seen;
}

/**
 * Bayes' rule on two layers: what the bulk is, what lies on it, and which hypothesis holds.
 * formula: solid: weight of a bulk = odds x its chance x likelihood of the bulk x likelihood of the surface through the enrichment;
 * layered: odds x sum over thicknesses and materials of (chances x likelihood of the outside) x chance of the bulk x its likelihood; each
 * divided by the sum of all. The same as the double sum over all pairs of surface and bulk, because the surface depends on the bulk of a solid
 * piece only through the enrichment, and of a layered piece not at all.
 * rounding: none.
 * source: Bayes' rule; JCGM 101:2008, 6.1 for the states of knowledge it combines.
 */
export function joint(cases: Cases): Joint {
	const cells = cases.bulk.length;
	const seen = throughSurface(cases.surface, cases.enrichment);
	const weight = new Float64Array(cells);
	const sums: Record<HypothesisId, number> = { honest: 0, under: 0, other: 0, layered: 0 };
	for (const { id, odds, bulk } of cases.solids) {
		if (odds === 0) continue;
		let sum = 0;
		for (let cell = 0; cell < cells; cell += 1) {
			const part = odds * bulk[cell]! * cases.bulk[cell]! * seen[cell]!;
			weight[cell]! += part;
			sum += part;
		}
		sums[id] += sum;
	}
	const { layered } = cases;
	const cores = layered.cores.map(() => 0);
	for (const stratum of layered.strata) {
		let inside = 0;
		for (let cell = 0; cell < cells; cell += 1) inside += layered.bulk[cell]! * stratum.bulk[cell]!;
		let outside = 0;
		for (const [index, chance] of layered.cores.entries()) {
			const part = layered.odds * stratum.chance * chance * stratum.outside[index]!;
			outside += part;
			cores[index]! += part * inside;
		}
		for (let cell = 0; cell < cells; cell += 1) weight[cell]! += outside * layered.bulk[cell]! * stratum.bulk[cell]!;
		sums.layered += outside * inside;
	}
	const evidence = hypotheses.reduce((sum, id) => sum + sums[id], 0);
	assert(evidence > 0 && Number.isFinite(evidence), 'the findings leave nothing possible');
	return {
		evidence,
		odds: { honest: sums.honest / evidence, under: sums.under / evidence, other: sums.other / evidence, layered: sums.layered / evidence },
		bulk: weight.map((value) => value * (1 / evidence)),
		cores: cores.map((part) => part / evidence)
	};
}
