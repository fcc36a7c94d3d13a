import { assert } from '../number/decimal.ts';
import { hypotheses, type HypothesisId } from './belief.ts';
import { bellPrior, CELLS, cellHigh, cellLow, normalised, type Vector } from './grid.ts';
import type { Odds, OwnOdds } from './odds.ts';
import type { Origin } from './origin.ts';
import type { MainMetal, Subject } from './subject.ts';

const odds = (honest: number, under: number, other: number, layered: number): Odds => ({ honest, under, other, layered });

/**
 * The odds before any test, by where the piece comes from: working defaults that the buyer may change.
 * formula: chances that sum to one: as its mark says, under it, another standard, layered.
 * rounding: none.
 * source: common practice, no source.
 */
export const defaultPriors: Readonly<Record<Origin, Odds>> = {
	hallmarked: odds(0.975, 0.01, 0.01, 0.005),
	'us-modern': odds(0.9, 0.06, 0.03, 0.01),
	'us-before-1981': odds(0.55, 0.38, 0.05, 0.02),
	uncontrolled: odds(0.45, 0.45, 0.05, 0.05),
	unmarked: odds(0, 0, 0.9, 0.1),
	'stranger-bar': odds(0.97, 0.005, 0.005, 0.02)
};

/** The mean shortfall of a piece that runs under its mark, in parts per thousand: working defaults, common practice, no source. */
const SHORTFALL: Readonly<Record<Origin, number>> = {
	hallmarked: 8, 'us-modern': 12, 'us-before-1981': 20, uncontrolled: 40, unmarked: 40, 'stranger-bar': 25
};

/** The standards a piece of each metal may really be made to, with how common each is (common practice, no source). */
const STANDARDS: Readonly<Record<MainMetal, readonly (readonly [perMille: number, common: number])[]>> = {
	Au: [[333, 5], [375, 12], [417, 20], [500, 3], [585, 36], [750, 17], [833, 1], [875, 2], [900, 2], [917, 4], [999, 3]],
	Ag: [[800, 20], [830, 8], [835, 8], [875, 3], [900, 12], [925, 40], [950, 3], [958, 2], [999, 4]],
	Pt: [[850, 15], [900, 20], [950, 55], [999, 10]],
	Pd: [[500, 30], [950, 50], [999, 20]]
};

/** Where the mean and the scatter of an honest bulk lie between the mark and what the law lets it mean; where the law gives nothing away, a little above. */
const OF_TOLERANCE = 0.4;
const ABOVE = 0.5;
const LEAST_SCATTER = 1.2;
/** What the bulk under a layer still holds of the metal on top, in parts per thousand on average. */
const UNDER_LAYER = 15;

/** What a piece is before any test: the odds of each hypothesis, and the fineness of the bulk under each. */
export type Prior = { readonly odds: Odds; readonly bulk: Readonly<Record<HypothesisId, Vector>> };

/**
 * The fineness of the bulk before any test, by hypothesis, over the cells of the grid.
 * formula: honest: bell about mark − 0.4 x tolerance (mark + 0.5 where there is none) with sd 0.4 x tolerance, at least 1.2; under: least lawful
 * fineness − exponential shortfall; other: bells of sd 4 about the other standards, nearer ones likelier and lower ones three times as
 * likely, without a mark by how common each is (70 % about what is stated, where somebody states it), and 3 % anything;
 * layered: exponential above zero of mean 15. Parts per thousand.
 * rounding: none.
 * source: 15 U.S.C. 295 and the marks' laws for the tolerances (metal/law.ts); all shapes are working defaults, common practice, no source.
 */
export function priorOf(subject: Subject, own: OwnOdds = {}): Prior {
	const { origin, claimed, metal } = subject;
	// a piece without a mark has nothing to be honest about, whatever it was said to be
	const from: Origin = claimed === null ? 'unmarked' : origin;
	const chosen = own[from] ?? defaultPriors[from];
	const total = hypotheses.reduce((sum, id) => sum + chosen[id], 0);
	assert(total > 0, 'prior odds need a positive sum');
	const share = (id: HypothesisId) => chosen[id] / total;
	const mark = claimed ?? 0;
	const legal = Math.min(subject.legal ?? mark, mark);
	const tolerance = mark - legal;
	return {
		odds: odds(share('honest'), share('under'), share('other'), share('layered')),
		bulk: {
			honest: bellPrior(tolerance === 0 ? mark + ABOVE : mark - OF_TOLERANCE * tolerance, Math.max(LEAST_SCATTER, OF_TOLERANCE * tolerance)),
			under: exponentialDown(legal, SHORTFALL[from]),
			other: from === 'unmarked' && claimed !== null ? stated(otherStandards(metal, null), claimed) : otherStandards(metal, claimed),
			layered: UNDER_ANY_LAYER
		}
	};
}

/** Falls off below a fineness; what would be below nothing stands at nothing. */
function exponentialDown(from: number, mean: number): Vector {
	const values = new Float64Array(CELLS);
	let below = 0;
	for (let cell = 0; cell < CELLS; cell += 1) {
		const high = cellHigh(cell);
		const above = high >= from ? 1 : Math.exp((high - from) / mean);
		values[cell] = above - below;
		below = above;
	}
	return normalised(values);
}

function exponentialUp(mean: number): Vector {
	const values = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) values[cell] = Math.exp(-cellLow(cell) / mean) - Math.exp(-cellHigh(cell) / mean);
	return normalised(values);
}

/** What lies under a layer is the same for every piece. */
const UNDER_ANY_LAYER = exponentialUp(UNDER_LAYER);

const NEARNESS = 150;
const LOWER = 3;
const SCATTER = 4;
const ANYTHING = 0.03;

/** The bell about a standard never changes; it is worked out once. */
const BELLS = new Map<number, Vector>();

function standardBell(perMille: number): Vector {
	const bell = BELLS.get(perMille) ?? bellPrior(perMille, SCATTER);
	BELLS.set(perMille, bell);
	return bell;
}

function otherStandards(metal: MainMetal, claimed: number | null): Vector {
	const values = new Float64Array(CELLS);
	let total = 0;
	for (const [perMille, common] of STANDARDS[metal]) {
		const gap = claimed === null ? 0 : Math.abs(perMille - claimed);
		// 583 and 585 are one standard, and so is the mark itself
		if (claimed !== null && gap < 3) continue;
		const weight = claimed === null ? common : Math.exp(-gap / NEARNESS) * (perMille < claimed ? LOWER : 1);
		total += weight;
		const bell = standardBell(perMille);
		for (let cell = 0; cell < CELLS; cell += 1) values[cell]! += weight * bell[cell]!;
	}
	assert(total > 0, `no other standard of ${metal} is known`);
	const scale = (1 - ANYTHING) / total;
	for (let cell = 0; cell < CELLS; cell += 1) values[cell] = values[cell]! * scale + ANYTHING / CELLS;
	return values;
}

/** A piece without a stamp whose composition somebody states, as of dental alloys: mostly about that, else any standard. Working defaults. */
const STATED = 0.7;
const STATED_SCATTER = 12;

function stated(standards: Vector, claimed: number): Vector {
	const bell = bellPrior(claimed, STATED_SCATTER);
	return standards.map((chance, cell) => STATED * bell[cell]! + (1 - STATED) * chance);
}
