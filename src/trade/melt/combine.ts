import { assert } from '../number/decimal.ts';
import { propagate, type Uncertain } from '../uncertainty/uncertain.ts';

/**
 * a × b of two uncertain quantities, their shared sources kept together.
 * formula: value a b; each source's part: b × its part in a + a × its part in b
 * rounding: none, an estimate.
 * source: JCGM 100:2008 (GUM) 5.1.2 and 5.2.2, first-order propagation; from memory.
 */
export function product(a: Uncertain, b: Uncertain): Uncertain {
	return propagate(a.value * b.value, [
		{ input: a, sensitivity: b.value },
		{ input: b, sensitivity: a.value }
	]);
}

/**
 * a ÷ b of two uncertain quantities, their shared sources kept together; b is not zero.
 * formula: value a ÷ b; each source's part: (its part in a − a ÷ b × its part in b) ÷ b
 * rounding: none, an estimate.
 * source: JCGM 100:2008 (GUM) 5.1.2 and 5.2.2, first-order propagation; from memory.
 */
export function quotient(a: Uncertain, b: Uncertain): Uncertain {
	assert(b.value !== 0, 'an uncertain quantity divided by zero');
	const value = a.value / b.value;
	return propagate(value, [
		{ input: a, sensitivity: 1 / b.value },
		{ input: b, sensitivity: -value / b.value }
	]);
}

/** 1 − a: what is left when the share a is gone. */
export function complement(a: Uncertain): Uncertain {
	return propagate(1 - a.value, [{ input: a, sensitivity: -1 }]);
}
