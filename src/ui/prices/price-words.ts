import { metals, type MetalId } from '$trade/metal/metals.ts';
import { isZero, type Exact } from '$trade/number/exact.ts';
import type { Format } from '../format.ts';

/** "+1.2 %", "−0.4 %", "unchanged". */
export function changeWords(change: Exact, format: Format): string {
	if (isZero(change)) return 'unchanged';
	return `${change.n > 0n ? '+' : ''}${format.share(change, { least: 1, most: 2 })}`;
}

/** "gold 0.1 %, silver 0.2 %": how far prices may have moved, as shares of themselves. */
export function movedWords(moves: readonly { readonly metal: MetalId; readonly share: number }[], format: Format): string {
	return moves.map(({ metal, share }) => `${metals[metal].name} ${format.chance(share)}`).join(', ');
}

/** A word at the start of a sentence or a row. */
export function titled(word: string): string {
	return word.charAt(0).toUpperCase() + word.slice(1);
}
