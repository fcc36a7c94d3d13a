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
	| { readonly kind: 'tester-u-not-possible'; readonly metal: MetalId; readonly perMille: number; readonly u: number; readonly most: number }
	| { readonly kind: 'tester-bias-over-u'; readonly bias: number; readonly least: number }
	| { readonly kind: 'tester-gross-too-often'; readonly gross: number; readonly most: number };

const MOST_GROSS = 0.5;
const MOST_U = 300;

/** A tester whose figures can be reckoned with, or the first thing that is wrong with it. Its bias is a part of each u, so it is no larger. */
export function checkTester(tester: Tester): Result<Tester, TesterProblem> {
	const { name, rows, bias, gross } = tester;
	if (name.trim() === '') return fail({ kind: 'tester-no-name' });
	if (rows.length === 0) return fail({ kind: 'tester-no-rows' });
	for (const { metal, perMille, u } of rows) {
		const possible = perMille >= 0 && perMille <= 1000 && u > 0 && u <= MOST_U;
		if (!possible) return fail({ kind: 'tester-u-not-possible', metal, perMille, u, most: MOST_U });
	}
	const least = Math.min(...rows.map(({ u }) => u));
	if (!(bias >= 0 && bias <= least)) return fail({ kind: 'tester-bias-over-u', bias, least });
	if (!(gross >= 0 && gross <= MOST_GROSS)) return fail({ kind: 'tester-gross-too-often', gross, most: MOST_GROSS });
	return ok(tester);
}
