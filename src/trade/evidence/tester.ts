import type { MetalId } from '../metal/metals.ts';

export type TesterKind = 'fluorescence' | 'acids' | 'core';

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
