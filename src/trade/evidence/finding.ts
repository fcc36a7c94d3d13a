import type { Decimal } from '../number/decimal.ts';
import type { Fineness } from '../metal/fineness.ts';
import type { MetalId } from '../metal/metals.ts';

/**
 * What one test of a piece showed, as it was typed, with the figures of the tester as they were on that day: an estimate
 * made from it can be made again years later, whatever the tester has become since.
 * Standard uncertainties and biases are in parts per thousand unless another unit is named.
 */
export type Finding = Touch | Fluorescence | Water | Magnet | Core | Assay | CoinWeight;
export type FindingKind = Finding['kind'];

type Found = {
	readonly id: string;
	/** Milliseconds since 1970-01-01 UTC. */
	readonly at: number;
};

/** What is known of the tester: its own bias is shared by all that it read, and does not average out. */
export type ReadBy = {
	/** The tester's id in the book; null: somebody else's. */
	readonly tester: string | null;
	/** Of one reading, its repeatability and the tester's bias together. */
	readonly u: number;
	/** The part of u that is the tester's own and the same in all its readings. */
	readonly bias: number;
	/** The chance that the reading is of something else altogether: a wrong spot, a slip of the pen. */
	readonly gross: number;
};

/** A streak on the stone: which acid it withstood and which one attacked it. */
export type Touch = Found & ReadBy & {
	readonly kind: 'touch';
	/** Drawn on the surface, or out of a filed notch. */
	readonly how: 'rub' | 'notch';
	readonly holds: Fineness | null;
	readonly attackedBy: Fineness | null;
};

/** A fluorescence reading of the surface: every element that was shown. */
export type Fluorescence = Found & ReadBy & {
	readonly kind: 'fluorescence';
	readonly reads: readonly Read[];
};
export type Read = { readonly metal: MetalId; readonly perMille: Decimal };

/** Weighed in air and again with water: hung in it, or by what a beaker on the scale gains when the piece hangs in its water. */
export type Water = Found & {
	readonly kind: 'water';
	readonly method: 'suspended' | 'beaker';
	/** Grams. */
	readonly air: Decimal;
	/** Grams: the reading in water, or the gain of the beaker. */
	readonly water: Decimal;
	/** Grams. */
	readonly division: Decimal;
	/** °C */
	readonly temperature: Decimal;
};

export type Pull = 'none' | 'weak' | 'strong';
export type Magnet = Found & { readonly kind: 'magnet'; readonly pull: Pull };

/** A reading of the inside, after a cut, a drilling or a deep notch. */
export type Core = Found & ReadBy & { readonly kind: 'core'; readonly perMille: Decimal };

/** A fire assay of a sample: the assay's uncertainty is in `u`, the doubt whether the sample is the piece in `sampleU`. */
export type Assay = Found & ReadBy & { readonly kind: 'assay'; readonly perMille: Decimal; readonly sampleU: number; readonly by: string };

/** One coin weighed, and measured if a gauge was at hand, against the table. */
export type CoinWeight = Found & {
	readonly kind: 'coin';
	readonly coin: string;
	/** Grams of one coin. */
	readonly grams: Decimal;
	/** Grams. */
	readonly division: Decimal;
	/** Millimetres. */
	readonly diameter: Decimal | null;
};

export const findingKinds: readonly FindingKind[] = ['touch', 'fluorescence', 'water', 'magnet', 'core', 'assay', 'coin'];
