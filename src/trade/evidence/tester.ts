import type { MetalId } from '../metal/metals.ts';
import { fail, ok, type Result } from '../number/result.ts';

/** An instrument that reads by fluorescence, or a set of acids with its stone. */
export type TesterKind = 'fluorescence' | 'acids';
export const testerKinds: readonly TesterKind[] = ['fluorescence', 'acids'];

/** How well a tester reads one alloy: standard uncertainty of one reading in parts per thousand, its bias included. */
export type TesterRow = { readonly metal: MetalId; readonly colour: 'any' | 'white'; readonly perMille: number; readonly u: number };

/** A tester or a set of acids of the shop. */
export type Tester = {
	readonly id: string;
	readonly name: string;
	readonly kind: TesterKind;
	readonly rows: readonly TesterRow[];
	/** Parts per thousand: the standard uncertainty of its own bias, the same in all that it reads. */
	readonly bias: number;
	/** The chance of a reading that is of something else altogether. */
	readonly gross: number;
	/** The day it was last checked against a known sample, as typed; null: never. */
	readonly checkedOn: string | null;
};

export type TesterProblem =
	| { readonly kind: 'tester-no-name' }
	| { readonly kind: 'tester-no-rows' }
	| { readonly kind: 'tester-u-not-possible'; readonly metal: MetalId; readonly perMille: number; readonly u: number }
	| { readonly kind: 'tester-bias-over-u'; readonly bias: number; readonly least: number }
	| { readonly kind: 'tester-gross-too-often'; readonly gross: number; readonly most: number };

const MOST_GROSS = 0.5;
const MOST_U = 300;

/** A tester whose figures can be reckoned with, or the first thing that is wrong with it. */
export function checkTester(tester: Tester): Result<Tester, TesterProblem> {
	const { name, rows, bias, gross } = tester;
	if (name.trim() === '') return fail({ kind: 'tester-no-name' });
	if (rows.length === 0) return fail({ kind: 'tester-no-rows' });
	for (const { metal, perMille, u } of rows) {
		const possible = perMille >= 0 && perMille <= 1000 && u > 0 && u <= MOST_U;
		if (!possible) return fail({ kind: 'tester-u-not-possible', metal, perMille, u });
	}
	const least = Math.min(...rows.map(({ u }) => u));
	if (!(bias >= 0 && bias <= least)) return fail({ kind: 'tester-bias-over-u', bias, least });
	if (!(gross >= 0 && gross <= MOST_GROSS)) return fail({ kind: 'tester-gross-too-often', gross, most: MOST_GROSS });
	return ok(tester);
}

const row = (metal: MetalId, perMille: number, u: number, colour: TesterRow['colour'] = 'any'): TesterRow => ({ metal, colour, perMille, u });

/** What a tester is taken to be until the buyer has described his own. */
export type TesterDefaults = Pick<Tester, 'rows' | 'bias' | 'gross'>;

/**
 * Working defaults by kind of tester.
 * formula: none; standard uncertainties in parts per thousand: fluorescence 1 at 999, 5 at 990, 6 at 750 yellow, 13 at 750 white, 16 at 585;
 * acids resolve about 15.
 * rounding: none.
 * source: common practice, no source; the order agrees with published comparisons of fluorescence with cupellation.
 */
export const testerDefaults: Readonly<Record<TesterKind, TesterDefaults>> = {
	fluorescence: {
		rows: [
			row('Au', 375, 18), row('Au', 585, 16), row('Au', 750, 6), row('Au', 750, 13, 'white'), row('Au', 990, 5), row('Au', 999, 1),
			row('Ag', 800, 8), row('Ag', 925, 5), row('Ag', 999, 3), row('Pt', 950, 5), row('Pd', 500, 8), row('Pd', 950, 6)
		],
		bias: 1,
		gross: 0.03
	},
	acids: { rows: [row('Au', 585, 15), row('Ag', 925, 25), row('Pt', 950, 25), row('Pd', 950, 25)], bias: 5, gross: 0.02 }
};

/**
 * How well a tester reads an alloy: standard uncertainty in parts per thousand.
 * formula: on the straight line between the two nearest rows of the metal, the end rows beyond them; rows for white alloys count where the
 * piece is white, and only there.
 * rounding: none.
 * source: common practice, no source.
 */
export function readingU(rows: readonly TesterRow[], metal: MetalId, perMille: number, white = false): number {
	const named = rows.filter((each) => each.metal === metal);
	const ofMetal = named.length > 0 ? named : rows;
	const ofColour = ofMetal.filter(({ colour }) => (colour === 'white') === white);
	const sorted = [...(ofColour.length > 0 ? ofColour : ofMetal)].sort((a, b) => a.perMille - b.perMille);
	const high = sorted.find((each) => each.perMille >= perMille) ?? sorted.at(-1)!;
	const low = sorted.filter((each) => each.perMille <= perMille).at(-1) ?? sorted[0]!;
	if (high.perMille <= low.perMille) return high.u;
	return low.u + ((high.u - low.u) * (perMille - low.perMille)) / (high.perMille - low.perMille);
}
