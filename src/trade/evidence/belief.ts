import type { Fineness } from '../metal/fineness.ts';
import type { MetalId } from '../metal/metals.ts';
import type { Finding } from './finding.ts';

/** What a piece can be: as its mark says; a little under it; another standard; a layer, core or filling that the mark hides. */
export type HypothesisId = 'honest' | 'under' | 'other' | 'layered';
export const hypotheses: readonly HypothesisId[] = ['honest', 'under', 'other', 'layered'];

/** How the piece is made, which decides how often an honest one weighs too light in water. */
export type Build = 'solid' | 'jointed' | 'hollow';
export const builds: readonly Build[] = ['solid', 'jointed', 'hollow'];

/** What is believed of the bulk of a piece after all its findings; fineness and uncertainties in parts per thousand. */
export type Belief = {
	readonly metal: MetalId;
	readonly mean: number;
	/** One chance in twenty that the bulk is below, as likely as not, one chance in twenty that it is above. */
	readonly low: number;
	readonly median: number;
	readonly high: number;
	readonly odds: Readonly<Record<HypothesisId, number>>;
	/** Signed standard uncertainty by tester: the same error in every piece that it read. */
	readonly shared: Readonly<Record<string, number>>;
	/** The rest of the standard uncertainty, of this piece alone. */
	readonly own: number;
};

/** The buyer's decision: at what the piece is taken, on which findings, at which prudence. */
export type Taking = { readonly metal: MetalId; readonly taken: Fineness; readonly rests: readonly string[]; readonly prudence: number };

/** All that was tested of a piece, what follows from it, and what was decided on it. */
export type Evidence = {
	/** null: as the article is usually made. */
	readonly build: Build | null;
	readonly findings: readonly Finding[];
	/** Made from the findings whenever they, the mark or the origin change; null without findings. */
	readonly belief: Belief | null;
	readonly taking: Taking | null;
};
