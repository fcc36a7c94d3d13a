import { decimal, type Decimal } from '../number/decimal.ts';

/** A mass, always in grams; every other unit is a way to type or to print it (units.ts). */
export type Mass = { readonly grams: Decimal };

/** A mass from plain text in grams, such as "12.30". */
export function mass(grams: string): Mass {
	return { grams: decimal(grams) };
}

export function plusMass(a: Mass, b: Mass): Mass {
	return { grams: a.grams.plus(b.grams) };
}

/** a - b; the caller decides what a negative difference means. */
export function minusMass(a: Mass, b: Mass): Mass {
	return { grams: a.grams.minus(b.grams) };
}
