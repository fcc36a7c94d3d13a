import { atOdds, worthOfCertainty, type Cases } from '../evidence/stake.ts';
import type { Stake } from '../evidence/next-test.ts';

/** A piece of a bag: what it may bring, and the odds that it is layered. Money in one currency. */
export type BagPiece = {
	readonly key: string;
	readonly odds: number;
	readonly cases: Cases;
	readonly stake: Stake;
	/** The inside was seen, by a cut or a fire assay: it is not tested again, and it tells of the others. */
	readonly opened: boolean;
};

export type TestedPiece = { readonly key: string; readonly odds: number; /** What knowing is worth. */ readonly gain: number };

export type BagPlan = {
	/** The pieces worth opening, the one most worth it first. */
	readonly test: readonly TestedPiece[];
	/** What that costs, and what it saves on average before its cost. */
	readonly cost: number;
	readonly gain: number;
	/** Everything that is neither opened nor worth opening. */
	readonly rest: {
		readonly pieces: number;
		/** On average. */
		readonly worth: number;
		readonly price: number;
		readonly lost: number;
		/** The chance that at least one of them is layered. */
		readonly anyLayered: number;
	};
	readonly opened: { readonly pieces: number; readonly layered: number };
	/** How much likelier, or less likely, what was opened makes a layer in each of the others: a factor on its odds. */
	readonly told: number;
};

/** A bag's own rate of layered pieces is known about as well as from so many pieces: a working default, common practice, no source. */
export const BAG_WEIGHT = 4;
/** From these odds on an opened piece counts as layered. */
const FOUND = 0.5;

/**
 * By what factor the odds of a layer move for the pieces of a bag that were not opened.
 * formula: rate before = mean of the odds before any was opened; rate after = (weight x before + layered) / (weight + opened), as for a Beta
 * distribution of weight 4; factor = after / (1 − after) x (1 − before) / before.
 * rounding: none; 1 when nothing was opened.
 * source: the beta-binomial distribution (conjugate prior of a proportion), from memory; the weight is a working default.
 */
export function toldByOpened(before: number, opened: number, layered: number, weight = BAG_WEIGHT): number {
	if (opened === 0 || before <= 0 || before >= 1) return 1;
	const after = (weight * before + layered) / (weight + opened);
	return (after / (1 - after)) * ((1 - before) / before);
}

function moved(odds: number, factor: number): number {
	return (odds * factor) / (1 - odds + odds * factor);
}

/**
 * Which pieces of a bag are worth opening before it is bought, and what is risked with the rest.
 * formula: each piece's odds of a layer moved by what the opened ones tell; opened where knowing for certain is worth more than it costs; of
 * the rest: worth = price + won − lost, and 1 − product of (1 − odds).
 * rounding: none.
 * source: expected value of perfect information, piece by piece; common practice, no source.
 */
export function bagPlan(pieces: readonly BagPiece[], before: number, costOfOpening: number): BagPlan {
	const seen = pieces.filter(({ opened }) => opened);
	const layered = seen.filter(({ odds }) => odds > FOUND).length;
	const told = toldByOpened(before, seen.length, layered);
	const test: TestedPiece[] = [];
	const rest = { pieces: 0, worth: 0, price: 0, lost: 0, anyLayered: 0 };
	let sound = 1;
	for (const { key, odds: alone, cases, stake, opened } of pieces) {
		if (opened) continue;
		const odds = moved(alone, told);
		const swing = atOdds(cases, odds);
		const gain = worthOfCertainty(swing);
		if (gain > costOfOpening) test.push({ key, odds, gain });
		else {
			rest.pieces += 1;
			rest.worth += stake.price + swing.won - swing.lost;
			rest.price += stake.price;
			rest.lost += swing.lost;
			sound *= 1 - odds;
		}
	}
	test.sort((a, b) => b.gain - a.gain);
	return {
		test,
		cost: test.length * costOfOpening,
		gain: test.reduce((sum, each) => sum + each.gain, 0),
		rest: { ...rest, anyLayered: 1 - sound },
		opened: { pieces: seen.length, layered },
		told
	};
}
