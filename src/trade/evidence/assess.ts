import type { HypothesisId } from './belief.ts';
import { strata, type CoreChance } from './cores.ts';
import type { Finding } from './finding.ts';
import { CELLS, flat, momentsOf, quantileOf, type Vector } from './grid.ts';
import { joint, throughSurface } from './joint.ts';
import type { Observation } from './observation.ts';
import { observeAll } from './observe.ts';
import type { Start } from './start.ts';

export type CoreOdds = {
	readonly core: CoreChance['core'];
	readonly odds: number;
	/** How much likelier the findings are over this core than for an honest piece; 1 when nothing that was done can tell them apart. */
	readonly against: number;
};

function dot(a: Vector, b: Vector, c: Vector | null = null): number {
	let sum = 0;
	for (let cell = 0; cell < CELLS; cell += 1) sum += a[cell]! * b[cell]! * (c === null ? 1 : c[cell]!);
	return sum;
}

/** What is believed after the findings. Fineness in parts per thousand. */
export type Assessment = {
	/** The natural logarithm of how likely the findings were. */
	readonly logEvidence: number;
	readonly odds: Readonly<Record<HypothesisId, number>>;
	readonly bulk: Vector;
	readonly mean: number;
	readonly sd: number;
	readonly low: number;
	readonly median: number;
	readonly high: number;
	readonly cores: readonly CoreOdds[];
};

/** So little that it never counts, and still not nothing: many findings against a cell must not make the impossible. */
const LEAST = 1e-200;

/** Likelihoods multiplied, kept near one with the rest in a logarithm, so that many findings do not vanish in the smallest numbers. */
class Product {
	constructor(readonly values = flat(), public log = 0) {}
	copy(): Product {
		return new Product(this.values.slice(), this.log);
	}
	times(by: Vector | undefined): void {
		if (by === undefined) return;
		const { values } = this;
		let most = 0;
		for (let cell = 0; cell < CELLS; cell += 1) {
			const value = values[cell]! * by[cell]!;
			values[cell] = value;
			if (value > most) most = value;
		}
		const scale = 1 / most;
		for (let cell = 0; cell < CELLS; cell += 1) {
			const value = values[cell]! * scale;
			values[cell] = value > LEAST ? value : LEAST;
		}
		this.log += Math.log(most);
	}
}

/** Which streaks see the bulk, at each thickness of the layer; the others see the surface. */
const goesThrough = (how: 'rub' | 'notch', layer: 'thin' | 'notch' | 'thick') => layer === 'thin' || (layer === 'notch' && how === 'notch');

/** What each finding says of the outside of a layered piece: its surface, and the materials that may lie under it. */
type Outside = {
	readonly surface: Product;
	readonly bulk: Product;
	readonly logCores: number[];
	/** What a core that cannot be told from the honest piece shares with it. */
	readonly asSolid: Product;
	readonly matched: boolean[];
};

function add(into: Outside, start: Start, { surface, bulk, solid, core }: Observation): void {
	into.surface.times(surface);
	into.bulk.times(bulk);
	if (core === undefined) return;
	for (const [index, each] of start.cores.entries()) {
		const likelihood = core(each.core);
		if (likelihood !== 'as solid') into.logCores[index]! += Math.log(likelihood);
		else if (!into.matched[index]) into.matched[index] = true;
	}
	if (start.cores.some((each) => core(each.core) === 'as solid')) into.asSolid.times(solid);
}

/**
 * The joint estimate of a piece from observations, in any order.
 * formula: likelihoods multiply; a rub on a solid piece sees the surface and a notch the bulk; on a layered one each streak sees the bulk where
 * it goes through the layer and the surface elsewhere, the same layer for all of them; then Bayes' rule on the two layers (joint). The surface
 * of a layered piece is that of an honest one; a core that is trimmed to match has its density too.
 * rounding: none.
 * source: Bayes' rule; the chances of a streak going through (rub 0.4, notch 0.9) are working defaults, common practice, no source.
 */
export function assessObservations(start: Start, observations: readonly Observation[]): Assessment {
	const { subject, prior, cores, imitated, enrichment } = start;
	const surface = new Product();
	const bulk = new Product();
	const layer: Outside = {
		surface: new Product(), bulk: new Product(), logCores: cores.map(() => 0), asSolid: new Product(), matched: cores.map(() => false)
	};
	const streaks: NonNullable<Observation['streak']>[] = [];
	for (const observation of observations) {
		surface.times(observation.surface);
		bulk.times(observation.bulk);
		bulk.times(observation.solid);
		add(layer, start, observation);
		const { streak } = observation;
		if (streak === undefined) continue;
		(streak.how === 'rub' ? surface : bulk).times(streak.values);
		streaks.push(streak);
	}
	const layers = strata.map(({ id, chance }) => {
		const seen = { surface: layer.surface.copy(), bulk: layer.bulk.copy() };
		for (const { how, values } of streaks) (goesThrough(how, id) ? seen.bulk : seen.surface).times(values);
		const shown = dot(imitated, seen.surface.values);
		const matched = layer.matched.includes(true) ? dot(prior.bulk.honest, throughSurface(seen.surface.values, enrichment), layer.asSolid.values) : 0;
		const outside = cores.map((_, index) => (layer.matched[index] ? Math.log(matched) + layer.asSolid.log : Math.log(shown)) + layer.logCores[index]!);
		return { chance, bulk: seen.bulk.values, log: seen.surface.log + seen.bulk.log, outside };
	});
	// one common scale for solid and layered: the largest logarithm of all
	const solidLog = surface.log + bulk.log;
	const scale = Math.max(solidLog, ...layers.flatMap(({ log, outside }) => outside.map((each) => each + log)));
	const solidFactor = Math.exp(solidLog - scale);
	const found = joint({
		solids: (['honest', 'under', 'other'] as const).map((id) => ({ id, odds: prior.odds[id] * solidFactor, bulk: prior.bulk[id] })),
		enrichment,
		surface: surface.values,
		bulk: bulk.values,
		layered: {
			odds: prior.odds.layered,
			bulk: prior.bulk.layered,
			strata: layers.map(({ chance, bulk: seen, log, outside }) => ({ chance, bulk: seen, outside: outside.map((each) => Math.exp(each + log - scale)) })),
			cores: cores.map(({ chance }) => chance)
		}
	});
	const { mean, sd } = momentsOf(found.bulk);
	const reference = subject.claimed === null ? 'other' : 'honest';
	const before = prior.odds[reference];
	return {
		logEvidence: Math.log(found.evidence) + scale,
		odds: found.odds,
		bulk: found.bulk,
		mean,
		sd,
		low: quantileOf(found.bulk, 0.05),
		median: quantileOf(found.bulk, 0.5),
		high: quantileOf(found.bulk, 0.95),
		cores: cores.map(({ core, chance }, index) => {
			const odds = found.cores[index]!;
			const prior0 = prior.odds.layered * chance;
			// what nobody thinks possible is told apart from nothing
			const told = prior0 > 0 && before > 0;
			return { core, odds, against: told ? odds / prior0 / Math.max(Number.MIN_VALUE, found.odds[reference] / before) : 1 };
		})
	};
}

/** The joint estimate of a piece from its findings, in any order. */
export function assess(start: Start, findings: readonly Finding[]): Assessment {
	return assessObservations(start, observeAll(start, findings));
}

/** The fineness that the bulk reaches with the chance asked for, in parts per thousand. */
export function prudentFineness(assessment: Pick<Assessment, 'bulk'>, prudence: number): number {
	return quantileOf(assessment.bulk, 1 - prudence);
}
