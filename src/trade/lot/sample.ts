import { exact, EXACT_ZERO, minus, ratio, sum, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';

export type SampleProblem = {
	readonly kind: 'sample-impossible';
	readonly pieces: number;
	readonly bad: number;
	readonly tested: number;
};

const MOST_PIECES = 100_000;
const MOST_TESTED = 10_000;

function possible(pieces: number, bad: number, tested: number): boolean {
	const whole = [pieces, bad, tested].every((value) => Number.isSafeInteger(value) && value >= 0);
	return whole && pieces <= MOST_PIECES && tested <= MOST_TESTED && bad <= pieces && tested <= pieces;
}

/**
 * The chance that a sample of n out of a bag of N, of which D are bad, shows exactly k bad ones.
 * formula: C(D, k) x C(N − D, n − k) / C(N, n).
 * rounding: none; an exact fraction.
 * source: the hypergeometric distribution, ISO 3534-1 (statistics vocabulary), from memory.
 */
export function chanceOf(found: number, pieces: number, bad: number, tested: number): Result<Exact, SampleProblem> {
	if (!possible(pieces, bad, tested) || !Number.isSafeInteger(found)) return fail({ kind: 'sample-impossible', pieces, bad, tested });
	if (found < 0 || found > tested || found > bad || tested - found > pieces - bad) return ok(EXACT_ZERO);
	return ok(ratio(choose(bad, found) * choose(pieces - bad, tested - found), choose(pieces, tested)));
}

/**
 * The chance that a test of n pieces out of a bag of N misses all D bad ones.
 * formula: C(N − D, n) / C(N, n).
 * rounding: none; an exact fraction.
 * source: the hypergeometric distribution, as in sampling by attributes from an isolated lot (ISO 2859-2), from memory.
 */
export function chanceOfMissing(pieces: number, bad: number, tested: number): Result<Exact, SampleProblem> {
	return chanceOf(0, pieces, bad, tested);
}

/**
 * The chance that a sample shows at most c bad pieces.
 * formula: sum of the chances of 0, 1, ... c.
 * rounding: none; an exact fraction.
 * source: the hypergeometric distribution, as in sampling by attributes from an isolated lot (ISO 2859-2), from memory.
 */
export function chanceOfAtMost(most: number, pieces: number, bad: number, tested: number): Result<Exact, SampleProblem> {
	const chances: Exact[] = [];
	for (let found = 0; found <= Math.min(most, tested, bad); found += 1) {
		const chance = chanceOf(found, pieces, bad, tested);
		if (!chance.ok) return chance;
		chances.push(chance.value);
	}
	return possible(pieces, bad, tested) ? ok(sum(chances)) : fail({ kind: 'sample-impossible', pieces, bad, tested });
}

/**
 * How many pieces must be tested so that missing all D bad ones is less likely than `risk`.
 * formula: the least n with C(N − D, n) / C(N, n) <= risk; the quotient falls by (N − D − n) / (N − n) at each step.
 * rounding: up to a whole piece.
 * source: the hypergeometric distribution; common practice, no source.
 */
export function testsNeeded(pieces: number, bad: number, risk: Exact): Result<number, SampleProblem> {
	if (!possible(pieces, bad, 0) || bad < 1) return fail({ kind: 'sample-impossible', pieces, bad, tested: 0 });
	// the products of the quotient's two sides, compared as whole numbers so that no step rounds
	let missing = 1n;
	let all = 1n;
	let tested = 0;
	while (missing * risk.d > risk.n * all && tested <= pieces - bad) {
		missing *= BigInt(Math.max(0, pieces - bad - tested));
		all *= BigInt(pieces - tested);
		tested += 1;
	}
	return ok(tested);
}

function choose(n: number, k: number): bigint {
	let result = 1n;
	const least = Math.min(k, n - k);
	for (let i = 1; i <= least; i += 1) result = (result * BigInt(n - least + i)) / BigInt(i);
	return result;
}

/** The chance that a test of n pieces out of a bag of N finds at least one of D bad ones: what missing all of them leaves. */
export function chanceOfFinding(pieces: number, bad: number, tested: number): Result<Exact, SampleProblem> {
	const missing = chanceOfMissing(pieces, bad, tested);
	return missing.ok ? ok(minus(exact(1n), missing.value)) : missing;
}
