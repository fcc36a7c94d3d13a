import { atOdds, expectedWorth, worthOfCertainty, type Cases } from '../evidence/stake.ts';
import type { Stake } from '../evidence/next-test.ts';

/** An entry of a bag: what each of its pieces may bring, and the odds that one is layered. Money in one currency. */
export type BagPiece = {
	readonly key: string;
	/** Pieces alike that were weighed together: each is tested for itself, and at stake is an equal part of them all. */
	readonly count: number;
	readonly odds: number;
	readonly cases: Cases;
	readonly stake: Stake;
	/** The inside was seen, by a cut or a fire assay: it is not tested again, and it tells of the others. */
	readonly opened: boolean;
};

export type TestedPiece = {
	readonly key: string;
	readonly count: number;
	readonly odds: number;
	/** What knowing is worth, of each piece. */
	readonly gain: number;
};

/** Everything that is neither opened nor worth opening. */
export type BagRest = {
	readonly pieces: number;
	/** On average. */
	readonly worth: number;
	readonly price: number;
	readonly lost: number;
	/** How many of them are worth less than their price, on average. */
	readonly atLoss: number;
	/** The chance that at least one of them is layered: as if each stood alone, and as one seller's pieces are alike. */
	readonly anyLayered: { readonly alone: number; readonly alike: number };
};

export type BagPlan = {
	/** Pieces whose inside nobody has seen: those to test and the rest. */
	readonly pieces: number;
	/** The entries worth opening, the one most worth it first. */
	readonly test: readonly TestedPiece[];
	/** How many pieces that is, what it costs, and what it saves on average before its cost. */
	readonly tests: number;
	readonly cost: number;
	readonly gain: number;
	readonly rest: BagRest;
	/** Entries of which a piece was opened: one finding, one piece seen. */
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

/** From here on one piece more changes nothing that is shown. */
const MOST_COUNTED = 1_000_000;

/**
 * The chance that at least one of so many pieces is layered when they share a rate that is known about as well as from `weight` pieces.
 * formula: 1 − product over i < pieces of (weight x (1 − rate) + i) / (weight + i).
 * rounding: none; beyond a million pieces as for a million.
 * source: the beta-binomial distribution at nothing found, from memory. Never more than 1 − (1 − rate) to the power of pieces.
 */
export function anyIfAlike(pieces: number, rate: number, weight: number): number {
	let none = 1;
	const sound = weight * (1 - rate);
	for (let i = 0; i < Math.min(pieces, MOST_COUNTED); i += 1) none *= (sound + i) / (weight + i);
	return 1 - none;
}

/**
 * Which pieces of a bag are worth opening before it is bought, and what is risked with the rest.
 * formula: each piece's odds of a layer moved by what the opened ones tell; opened where knowing for certain is worth more than it costs; of
 * the rest: sums of worth, loss and chance of a loss; a layer in any of them: 1 − product of (1 − odds) if each stood alone, and anyIfAlike of
 * their mean odds at the weight and the number opened together.
 * rounding: none.
 * source: expected value of perfect information, piece by piece; common practice, no source.
 */
export function bagPlan(entries: readonly BagPiece[], before: number, costOfOpening: number): BagPlan {
	const seen = entries.filter(({ opened }) => opened);
	const layered = seen.filter(({ odds }) => odds > FOUND).length;
	const told = toldByOpened(before, seen.length, layered);
	const test: TestedPiece[] = [];
	const rest = { pieces: 0, worth: 0, price: 0, lost: 0, atLoss: 0 };
	let none = 1;
	let oddsOfRest = 0;
	for (const { key, count, odds: alone, cases, stake, opened } of entries) {
		if (opened) continue;
		const odds = moved(alone, told);
		const swing = atOdds(cases, odds);
		const gain = worthOfCertainty(swing);
		if (gain > costOfOpening) {
			test.push({ key, count, odds, gain });
			continue;
		}
		rest.pieces += count;
		rest.worth += count * expectedWorth(swing, stake);
		rest.price += count * stake.price;
		rest.lost += count * swing.lost;
		rest.atLoss += count * swing.atLoss;
		none *= (1 - odds) ** count;
		oddsOfRest += count * odds;
	}
	test.sort((a, b) => b.gain - a.gain);
	const tests = test.reduce((sum, { count }) => sum + count, 0);
	const rate = rest.pieces === 0 ? 0 : oddsOfRest / rest.pieces;
	return {
		pieces: tests + rest.pieces,
		test,
		tests,
		cost: tests * costOfOpening,
		gain: test.reduce((sum, { count, gain }) => sum + count * gain, 0),
		rest: { ...rest, anyLayered: { alone: 1 - none, alike: anyIfAlike(rest.pieces, rate, BAG_WEIGHT + seen.length) } },
		opened: { pieces: seen.length, layered },
		told
	};
}
