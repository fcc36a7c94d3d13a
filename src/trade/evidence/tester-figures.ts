import type { MetalId } from '../metal/metals.ts';
import type { Tester, TesterKind, TesterRow } from './tester.ts';

const row = (metal: MetalId, perMille: number, u: number, colour: TesterRow['colour'] = 'any'): TesterRow => ({ metal, colour, perMille, u });

/** What a tester is taken to be until the buyer has described his own. */
export type TesterFigures = Pick<Tester, 'rows' | 'bias' | 'gross'>;

/**
 * Working defaults by kind of tester, in parts per thousand: common practice, no source; the order agrees with published
 * comparisons of fluorescence with cupellation.
 */
export const testerDefaults: Readonly<Record<TesterKind, TesterFigures>> = {
	fluorescence: {
		rows: [
			row('Au', 417, 18), row('Au', 585, 16), row('Au', 750, 6), row('Au', 750, 13, 'white'), row('Au', 990, 5), row('Au', 999, 1),
			row('Ag', 800, 8), row('Ag', 925, 5), row('Ag', 999, 3), row('Pt', 950, 5), row('Pd', 500, 8), row('Pd', 950, 6)
		],
		bias: 1,
		gross: 0.03
	},
	acids: { rows: [row('Au', 585, 15), row('Ag', 925, 25), row('Pt', 950, 25), row('Pd', 950, 25)], bias: 5, gross: 0.02 }
};

/**
 * How well a tester reads an alloy: standard uncertainty of one reading in parts per thousand.
 * formula: on the straight line between the two nearest rows of the metal, the end rows beyond them; for a white alloy a white row stands in for
 * the other of its fineness; of a metal without a row, the largest of all rows.
 * rounding: none.
 * source: common practice, no source.
 */
export function readingU(rows: readonly TesterRow[], metal: MetalId, perMille: number, white = false): number {
	const ofMetal = rows.filter((each) => each.metal === metal);
	const whites = ofMetal.filter(({ colour }) => colour === 'white');
	const others = ofMetal.filter(({ colour }) => colour === 'any');
	const usable = white ? [...whites, ...others.filter((each) => whites.every((one) => one.perMille !== each.perMille))] : others;
	// rows of white alloys only: better than nothing for the others
	const sorted = [...(usable.length > 0 ? usable : ofMetal)].sort((a, b) => a.perMille - b.perMille);
	if (sorted.length === 0) return Math.max(...rows.map(({ u }) => u));
	const high = sorted.find((each) => each.perMille >= perMille) ?? sorted.at(-1)!;
	const low = [...sorted].reverse().find((each) => each.perMille <= perMille) ?? sorted[0]!;
	if (high.perMille <= low.perMille) return high.u;
	return low.u + ((high.u - low.u) * (perMille - low.perMille)) / (high.perMille - low.perMille);
}
