import { coinById } from '../metal/coins.ts';
import type { HypothesisId } from './belief.ts';
import { coinObservation } from './coin-weight.ts';
import { coreObservation } from './core-test.ts';
import { coresOf, isFineGold, strata, type CoreChance } from './cores.ts';
import { enrichmentOf } from './enrichment.ts';
import type { Finding } from './finding.ts';
import { assayObservation } from './fire-assay.ts';
import { balanceOf, fluorescenceObservation, type Balance } from './fluorescence.ts';
import { CELLS, flat, momentsOf, quantileOf, type Vector } from './grid.ts';
import { joint } from './joint.ts';
import { magnetObservation } from './magnet.ts';
import type { Observation } from './observation.ts';
import { priorOf, type Prior, type Priors } from './priors.ts';
import type { Subject } from './subject.ts';
import { touchObservation } from './touch.ts';
import { waterObservation } from './water-reading.ts';

/** A piece before any test, made ready for its findings. */
export type Start = {
	readonly subject: Subject;
	readonly prior: Prior;
	readonly cores: readonly CoreChance[];
	/** What the surface of a layered piece is made to look like: that of the honest piece, or of any standard where there is no mark. */
	readonly imitated: Vector;
};

export function startOf(subject: Subject, priors: Priors = {}): Start {
	const prior = priorOf(subject, priors);
	return { subject, prior, cores: coresOf(subject), imitated: surfaceOf(prior.bulk[subject.claimed === null ? 'other' : 'honest'], subject) };
}

/** The surface of a solid piece: its bulk, each part moved by the enrichment. */
function surfaceOf(bulk: Vector, subject: Subject): Vector {
	const { first, chances } = enrichmentOf(subject);
	const surface = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) {
		const share = bulk[cell]!;
		// what weighs less than this by all its cells together is lost in the last digit
		if (share < 1e-18) continue;
		for (let step = 0; step < chances.length; step += 1) {
			surface[Math.min(CELLS - 1, Math.max(0, cell + first + step))]! += share * chances[step]!;
		}
	}
	return surface;
}

/** What one finding says of this piece; null when it says nothing (too light on the water scale, a coin that is not in the table). */
export function observe(start: Start, finding: Finding, balance: Balance | null): Observation | null {
	const { metal, build } = start.subject;
	switch (finding.kind) {
		case 'touch':
			return touchObservation(finding);
		case 'fluorescence':
			return fluorescenceObservation(finding, metal);
		case 'water':
			return waterObservation(finding, { metal, build, honest: start.prior.bulk.honest, matched: isFineGold(start.subject) }, balance);
		case 'magnet':
			return magnetObservation(finding.pull, metal);
		case 'core':
			return coreObservation(finding);
		case 'assay':
			return assayObservation(finding);
		case 'coin': {
			const coin = coinById(finding.coin);
			return coin === null ? null : coinObservation(finding, coin);
		}
	}
}

/** All that the findings say, each by itself; the balance that one reading shows serves the water weighing of another. */
export function observeAll(start: Start, findings: readonly Finding[]): readonly (Observation | null)[] {
	const balance = balanceOf(findings.filter((finding) => finding.kind === 'fluorescence'), start.subject.metal);
	return findings.map((finding) => observe(start, finding, balance));
}

export type CoreOdds = {
	readonly core: CoreChance['core'];
	readonly odds: number;
	/** How much likelier the findings are over this core than for an honest piece; 1 when nothing that was done can tell them apart. */
	readonly against: number;
};

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

/**
 * The joint estimate of a piece from observations, in any order.
 * formula: likelihoods multiply; a rub on a solid piece sees the surface and a notch the bulk; on a layered one each streak sees the bulk where
 * it goes through the layer and the surface elsewhere, the same layer for all of them; then Bayes' rule on the two layers (joint).
 * rounding: none.
 * source: Bayes' rule; the chances of a streak going through (rub 0.4, notch 0.9) are working defaults, common practice, no source.
 */
export function assessObservations(start: Start, observations: readonly (Observation | null)[]): Assessment {
	const { subject, prior, cores, imitated } = start;
	const surface = new Product();
	const bulk = new Product();
	const shared = { surface: new Product(), bulk: new Product() };
	const logCores = cores.map(() => 0);
	const streaks: NonNullable<Observation['streak']>[] = [];
	for (const observation of observations) {
		if (observation === null) continue;
		surface.times(observation.surface);
		shared.surface.times(observation.surface);
		bulk.times(observation.bulk);
		shared.bulk.times(observation.bulk);
		bulk.times(observation.solid);
		const { core, streak } = observation;
		if (core !== undefined) cores.forEach((each, index) => (logCores[index]! += Math.log(core(each.core))));
		if (streak === undefined) continue;
		(streak.how === 'rub' ? surface : bulk).times(streak.values);
		streaks.push(streak);
	}
	const layers = strata.map(({ id, chance }) => {
		const product = { surface: shared.surface.copy(), bulk: shared.bulk.copy() };
		for (const { how, values } of streaks) (goesThrough(how, id) ? product.bulk : product.surface).times(values);
		return { chance, ...product, log: product.surface.log + product.bulk.log };
	});
	// one common scale for solid and layered: the largest logarithm of all
	const solidLog = surface.log + bulk.log;
	const coreLog = Math.max(...logCores);
	const layeredLog = Math.max(...layers.map(({ log }) => log)) + coreLog;
	const scale = Math.max(solidLog, layeredLog);
	const solidFactor = Math.exp(solidLog - scale);
	const found = joint({
		solids: (['honest', 'under', 'other'] as const).map((id) => ({ id, odds: prior.odds[id] * solidFactor, bulk: prior.bulk[id] })),
		enrichment: enrichmentOf(subject),
		surface: surface.values,
		bulk: bulk.values,
		layered: {
			odds: prior.odds.layered,
			bulk: prior.bulk.layered,
			surface: imitated,
			strata: layers.map((layer) => ({
				chance: layer.chance * Math.exp(layer.log + coreLog - scale),
				surface: layer.surface.values,
				bulk: layer.bulk.values
			})),
			cores: cores.map(({ chance }, index) => ({ chance, likelihood: Math.exp(logCores[index]! - coreLog) }))
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
			return { core, odds, against: odds / prior0 / Math.max(Number.MIN_VALUE, found.odds[reference] / before) };
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
