import { strata } from '../../../src/trade/evidence/cores.ts';
import type { Enrichment } from '../../../src/trade/evidence/enrichment.ts';
import { CELLS } from '../../../src/trade/evidence/grid.ts';
import type { Observation } from '../../../src/trade/evidence/observation.ts';
import { observeAll } from '../../../src/trade/evidence/observe.ts';
import { startOf, type Start } from '../../../src/trade/evidence/start.ts';
import type { Tested } from './tested.ts';

export type Answer = { readonly odds: { honest: number; under: number; other: number; layered: number }; readonly bulk: Float64Array; readonly mean: number };

/**
 * Bayes' rule as it is written on paper: for every hypothesis and every pair of surface and bulk, the exponential of a sum of logarithms.
 * It has the same likelihoods of single findings as the house, and the same priors. `tables` takes the logarithms of likelihoods once by cell;
 * without it they are taken for each pair.
 */
export function doubleLoop({ subject, findings }: Tested, tables: boolean): Answer {
	const start = startOf(subject);
	const observations = observeAll(start, findings);
	const weight = new Float64Array(CELLS);
	const odds = { honest: 0, under: 0, other: 0, layered: 0 };
	const sum = (id: keyof typeof odds, prior: number, bulk: Float64Array, chance: (surface: number, bulk: number) => number, of: Likelihoods) => {
		const logs = tables ? { surface: of.surface(), bulk: of.bulk() } : null;
		for (let b = 0; b < CELLS; b += 1) {
			for (let s = 0; s < CELLS; s += 1) {
				const before = prior * bulk[b]! * chance(s, b);
				const log = logs === null ? of.surfaceAt(s) + of.bulkAt(b) : logs.surface[s]! + logs.bulk[b]!;
				const part = tables ? before * Math.exp(log) : Math.exp(Math.log(before) + log);
				odds[id] += part;
				weight[b]! += part;
			}
		}
	};
	const chance = enriched(start.enrichment);
	const solid = likelihoods(observations.map(({ surface, bulk, solid: whole, streak }) => ({
		surface: [surface, streak?.how === 'rub' ? streak.values : undefined],
		bulk: [bulk, whole, streak?.how === 'notch' ? streak.values : undefined]
	})));
	for (const id of ['honest', 'under', 'other'] as const) sum(id, start.prior.odds[id], start.prior.bulk[id], chance, solid);
	for (const { id: thickness, chance: share } of strata) {
		const through = (how: 'rub' | 'notch') => thickness === 'thin' || (thickness === 'notch' && how === 'notch');
		const layered = likelihoods(observations.map(({ surface, bulk, streak }) => ({
			surface: [surface, streak !== undefined && !through(streak.how) ? streak.values : undefined],
			bulk: [bulk, streak !== undefined && through(streak.how) ? streak.values : undefined]
		})));
		sum('layered', start.prior.odds.layered * share * underneath(start, observations), start.prior.bulk.layered, (s) => start.imitated[s]!, layered);
	}
	const all = odds.honest + odds.under + odds.other + odds.layered;
	for (const id of ['honest', 'under', 'other', 'layered'] as const) odds[id] /= all;
	let mean = 0;
	for (let b = 0; b < CELLS; b += 1) {
		weight[b]! /= all;
		mean += weight[b]! * b;
	}
	return { odds, bulk: weight, mean };
}

/** What the findings say of the material under a layer, over all materials. */
function underneath({ cores }: Start, observations: readonly Observation[]): number {
	return cores.reduce((total, { core, chance }) => {
		let likelihood = chance;
		for (const one of observations) {
			const said = one.core?.(core) ?? 1;
			if (said === 'as solid') throw new Error('the bench draws no fine gold');
			likelihood *= said;
		}
		return total + likelihood;
	}, 0);
}

/** The chance of a surface over a bulk: the enrichment, held within 0 to 1000. */
function enriched({ first, chances }: Enrichment): (surface: number, bulk: number) => number {
	const at = (by: number) => chances[by - first] ?? 0;
	return (s, b) => {
		if (s > 0 && s < CELLS - 1) return at(s - b);
		let total = 0;
		for (let step = 0; step < chances.length; step += 1) if (Math.min(CELLS - 1, Math.max(0, b + first + step)) === s) total += chances[step]!;
		return total;
	};
}

type Likelihoods = {
	readonly surfaceAt: (cell: number) => number;
	readonly bulkAt: (cell: number) => number;
	readonly surface: () => Float64Array;
	readonly bulk: () => Float64Array;
};

type Vectors = readonly (Float64Array | undefined)[];

function likelihoods(said: readonly { readonly surface: Vectors; readonly bulk: Vectors }[]): Likelihoods {
	const only = (which: 'surface' | 'bulk') => said.flatMap((each) => each[which].filter((vector) => vector !== undefined));
	const log = (vectors: readonly Float64Array[]) => (cell: number) => {
		let total = 0;
		for (const vector of vectors) total += Math.log(vector[cell]!);
		return total;
	};
	const [surfaceAt, bulkAt] = [log(only('surface')), log(only('bulk'))];
	const table = (at: (cell: number) => number) => () => Float64Array.from({ length: CELLS }, (_, cell) => at(cell));
	return { surfaceAt, bulkAt, surface: table(surfaceAt), bulk: table(bulkAt) };
}
