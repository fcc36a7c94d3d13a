import type { BagPlan } from '$trade/lot/bag.ts';
import type { Format } from '$ui/format.ts';

/** What the opened pieces of a bag tell of the others; empty where none was opened. */
export function toldWords({ opened, told }: Pick<BagPlan, 'opened' | 'told'>, format: Format): string {
	const { pieces, layered } = opened;
	if (pieces === 0) return '';
	const seen = `${format.count(pieces)} ${pieces === 1 ? 'was' : 'were'} opened, ${layered === 0 ? 'none' : format.count(layered)} filled.`;
	if (told > 1) return `${seen} One seller’s pieces are alike: that makes a filling in each of the others ${format.estimate(told, 2)} times likelier.`;
	return told < 1 ? `${seen} That makes a filling in each of the others less likely, to ${format.chance(told)} of its odds.` : seen;
}

/** What is risked with the pieces that nobody opens, in sentences. */
export function restWords({ rest }: Pick<BagPlan, 'rest'>, amount: (value: number) => string, format: Format): readonly string[] {
	const { pieces, worth, price, lost, atLoss, anyLayered } = rest;
	if (pieces === 0) return ['Nothing is left that is neither opened nor worth it.'];
	const alone = format.chance(anyLayered.alone);
	const what = `worth ${amount(worth)} on average at a price of ${amount(price)}.`;
	if (pieces === 1) return [`1 piece, ${what} Bought untested it costs ${amount(lost)} in losses on average; the chance that it is filled is ${alone}.`];
	const alike = format.chance(anyLayered.alike);
	const any = alike === alone ? alone : `${alike} if one seller’s pieces are alike, and ${alone} if each stands alone`;
	return [
		`${format.count(pieces)} pieces, ${what} Bought untested they cost ${amount(lost)} in losses on average; ` +
			`${format.estimate(atLoss, 2)} of them, on average, are worth less than their price.`,
		`The chance that at least one of them is filled is ${any}.`
	];
}

/** How many of the pieces to open at random so that what is supposed is hardly ever missed. */
export function neededWords(needed: number, pieces: number, filled: number, format: Format): string {
	if (pieces === 1) return 'Open it: there is no other.';
	// only a single filled piece can hide until the last one is opened
	if (needed === pieces) return `Open all ${format.count(pieces)}: fewer would miss it more than once in twenty times.`;
	return `Open ${format.count(needed)} at random, and ${filled === 1 ? 'it is' : 'all of them are'} missed once in twenty times at most.`;
}
