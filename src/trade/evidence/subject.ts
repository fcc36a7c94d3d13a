import type { Build } from './belief.ts';
import type { Origin } from './origin.ts';

/** The metals whose fineness a piece is bought for. */
export type MainMetal = 'Au' | 'Ag' | 'Pt' | 'Pd';
export const mainMetals: readonly MainMetal[] = ['Au', 'Ag', 'Pt', 'Pd'];

/** The piece as it is before any test: what it claims to be, and where it comes from. Fineness in parts per thousand. */
export type Subject = {
	readonly metal: MainMetal;
	/** What its mark says; null without one. */
	readonly claimed: number | null;
	/** The least that the law lets the mark mean. */
	readonly legal: number | null;
	readonly origin: Origin;
	readonly build: Build;
	/** The coin it is taken for, as it stands in the table of coins. */
	readonly coin: string | null;
};
