import { fail, ok, type Result } from '../number/result.ts';
import { hypotheses, type HypothesisId } from './belief.ts';
import type { Origin } from './origin.ts';

/** The chances that a piece is the one thing or another; together they are all that it can be. */
export type Odds = Readonly<Record<HypothesisId, number>>;

/** The buyer's own odds before any test, where he has any. */
export type OwnOdds = Partial<Readonly<Record<Origin, Odds>>>;

export type OddsProblem =
	| { readonly kind: 'odds-outside'; readonly hypothesis: HypothesisId; readonly chance: number }
	| { readonly kind: 'odds-not-whole'; readonly sum: number };

/** What is lost when hundredths become binary fractions. */
const LOST = 1e-9;

/** Chances from 0 to 1 that add up to 1. */
export function checkOdds(odds: Odds): Result<Odds, OddsProblem> {
	for (const hypothesis of hypotheses) {
		const chance = odds[hypothesis];
		if (!(chance >= 0 && chance <= 1)) return fail({ kind: 'odds-outside', hypothesis, chance });
	}
	const sum = hypotheses.reduce((total, id) => total + odds[id], 0);
	return Math.abs(sum - 1) < LOST ? ok(odds) : fail({ kind: 'odds-not-whole', sum });
}
