import type { Losses, LossPart, Range } from '$trade/melt/losses.ts';
import type { Spread, SpreadId } from '$trade/piece/class-spread.ts';
import { originWords } from '../class-words.ts';
import type { Format } from '../format.ts';

/** What is said of a figure that the buyer has not set himself. */
export const DEFAULT_WORDS = 'working default, yours to change';

export const lossPartWords: Readonly<Record<LossPart, string>> = {
	nonMetal: 'No metal: dirt, wax, stones, flux',
	metalLoss: 'Metal lost in the melt',
	retention: 'Fine metal kept in the bar'
};

export function rangeWords({ low, high }: Range, format: Format): string {
	const places = { least: 0, most: 4 };
	return low.equals(high) ? format.share(low, places) : `${format.share(low, places)} to ${format.share(high, places)}`;
}

/** "no metal 0 % to 0.5 %, lost 0.2 % to 0.8 %, fine kept 99.9 % to 99.95 %". */
export function lossesWords({ nonMetal, metalLoss, retention }: Losses, format: Format): string {
	return `no metal ${rangeWords(nonMetal, format)}, lost ${rangeWords(metalLoss, format)}, fine kept ${rangeWords(retention, format)}`;
}

/** What a spread is said about: where a piece comes from, or a make whose metal is a layer or a shell. */
export const spreadIdWords: Readonly<Record<SpreadId, string>> = {
	...originWords,
	layered: 'a layer: filled, rolled or plated',
	weighted: 'a shell: weighted flatware and holloware'
};

/** An estimated share as it was typed, "0.35 %". */
export function estimateWords(share: number, format: Format): string {
	return `${format.estimate(share * 100, 6)}\u00a0%`;
}

export function spreadWords({ shared, own }: Spread, format: Format): string {
	return `the class as a whole ±${estimateWords(shared, format)}, one piece ±${estimateWords(own, format)}`;
}
