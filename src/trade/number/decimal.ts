import { Decimal as Library } from 'decimal.js';

/**
 * The one decimal arithmetic of the house: 40 digits, half-even, never in exponent notation.
 * Everything that is paid is a value of this clone, built from text and never from a float.
 * rounding: none of what a person types (40 digits hold it); money rounds in rounding.ts only.
 * source: decimal.js, a general-purpose library; the precision is our own choice.
 */
export const Decimal = Library.clone({
	precision: 40,
	rounding: Library.ROUND_HALF_EVEN,
	toExpNeg: -1_000,
	toExpPos: 1_000
});
export type Decimal = InstanceType<typeof Decimal>;

const PLAIN = /^-?\d+(\.\d+)?$/;

/** A decimal from plain text ("12.30", "-4"). Text from a person goes through field.ts; anything else here is our own mistake. */
export function decimal(text: string): Decimal {
	assert(PLAIN.test(text), `not a plain decimal: "${text}"`);
	return new Decimal(text);
}

export const ZERO = decimal('0');
export const ONE = decimal('1');

/** What only we can cause stops here, with the reason. */
export function assert(condition: boolean, why: string): asserts condition {
	if (!condition) throw new Error(`Meltbook is wrong: ${why}`);
}
