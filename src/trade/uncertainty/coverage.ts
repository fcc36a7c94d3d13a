import { assert } from '../number/decimal.ts';
import { normalQuantile } from './normal.ts';
import { standardUncertainty, type Uncertain } from './uncertain.ts';

export type Interval = { readonly low: number; readonly high: number };

/**
 * What it is: how many standard uncertainties to each side hold the value with the given chance (0 to 1).
 * formula: normal quantile of (1 + coverage) / 2.
 * rounding: none.
 * source: JCGM 100:2008, 6.2.1 and table G.1 (normal distribution).
 */
export function coverageFactor(coverage: number): number {
	assert(coverage > 0 && coverage < 1, `a coverage must lie between 0 and 1, not ${coverage}`);
	return normalQuantile((1 + coverage) / 2);
}

/**
 * What it is: the range that holds the value with the given chance, if its error is normal; in the unit of the value.
 * formula: value -/+ coverage factor x standard uncertainty.
 * rounding: none.
 * source: JCGM 100:2008, 6.2.1 equation 18 and 6.3.3.
 */
export function interval(a: Uncertain, coverage: number): Interval {
	const half = coverageFactor(coverage) * standardUncertainty(a);
	return { low: a.value - half, high: a.value + half };
}
