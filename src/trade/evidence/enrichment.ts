import type { MainMetal, Subject } from './subject.ts';
import { bellPrior, type Vector } from './grid.ts';

/** How much finer the surface of a solid piece is than its bulk: whole parts per thousand from `first` on, with the chance of each. */
export type Enrichment = { readonly first: number; readonly chances: Vector };

/** Mean and scatter by metal and fineness, in parts per thousand: working defaults, common practice, no source. */
const TABLE: Readonly<Record<MainMetal, readonly (readonly [from: number, mean: number, sd: number])[]>> = {
	Au: [[0, 5, 6], [450, 2, 3], [880, 0, 1.5], [985, 0, 1]],
	Ag: [[0, 15, 10], [780, 10, 8], [955, 1, 2]],
	Pt: [[0, 0, 2]],
	Pd: [[0, 0, 2]]
};

/** Where no mark says what the piece is, the usual alloys: 14 kt, sterling. */
const USUAL: Readonly<Record<MainMetal, number>> = { Au: 585, Ag: 925, Pt: 950, Pd: 950 };

/**
 * Pickling, wear and old polish leave the surface of a solid piece a little richer than its bulk.
 * formula: surface = bulk + enrichment; the enrichment is a bell cut at four standard deviations, in whole parts per thousand.
 * rounding: none.
 * source: common practice, no source; depletion of copper at the surface of silver and low-karat gold is well known.
 */
export function enrichmentOf(subject: Pick<Subject, 'metal' | 'claimed'>): Enrichment {
	const perMille = subject.claimed ?? USUAL[subject.metal];
	const rows = TABLE[subject.metal];
	const [, mean, sd] = [...rows].reverse().find(([from]) => perMille >= from) ?? rows[0]!;
	const first = Math.floor(mean - 4 * sd);
	return { first, chances: bellPrior(mean - first, sd, Math.ceil(8 * sd) + 1) };
}
