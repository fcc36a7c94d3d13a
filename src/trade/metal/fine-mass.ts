import { assert } from '../number/decimal.ts';
import { exact, plus, times, type Exact } from '../number/exact.ts';
import type { Mass } from '../mass/mass.ts';
import { shareOf, type Fineness } from './fineness.ts';
import type { MetalId } from './metals.ts';

/** Grams of one pure metal. The metal is part of the type, so that gold and silver cannot be added. */
export type FineMass<M extends MetalId = MetalId> = { readonly metal: M; readonly grams: Exact };

/**
 * The fine mass of one metal in a mass of known fineness.
 * formula: fine grams = net grams x parts per thousand / 1000.
 * rounding: none; a fraction until the printed figure.
 * source: common practice, no source.
 */
export function fineMass<M extends MetalId>(net: Mass, metal: M, fineness: Fineness): FineMass<M> {
	return { metal, grams: times(exact(net.grams), shareOf(fineness)) };
}

/**
 * Fine mass of the same metal added. Two metals do not compile; metals known only when running are asserted.
 * formula: fine grams = a + b.
 * rounding: none.
 * source: common practice, no source.
 */
export function plusFine<M extends MetalId>(a: FineMass<M>, b: FineMass<NoInfer<M>>): FineMass<M> {
	assert(a.metal === b.metal, `fine ${a.metal} and fine ${b.metal} are not one sum`);
	return { metal: a.metal, grams: plus(a.grams, b.grams) };
}
