import { fail, ok, type Result } from '../number/result.ts';

/** The chance that the bulk of a piece is at least what it is taken at, until the buyer has said otherwise: a working default, no source. */
export const DEFAULT_PRUDENCE = 0.8;

/** Less than an even chance is no prudence, and nobody is quite sure. */
export const LEAST_PRUDENCE = 0.5;
export const MOST_PRUDENCE = 0.99;

export type PrudenceProblem = { readonly kind: 'prudence-outside'; readonly prudence: number; readonly least: number; readonly most: number };

export function checkPrudence(prudence: number): Result<number, PrudenceProblem> {
	if (prudence >= LEAST_PRUDENCE && prudence <= MOST_PRUDENCE) return ok(prudence);
	return fail({ kind: 'prudence-outside', prudence, least: LEAST_PRUDENCE, most: MOST_PRUDENCE });
}
