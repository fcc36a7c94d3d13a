import { assert, Decimal } from './decimal.ts';
import { exact, type Exact } from './exact.ts';

/**
 * How a printed figure is rounded. "down" cuts digits off (truncates toward zero), "up" goes away from zero,
 * "floor" and "ceiling" go toward minus and plus infinity; the halves decide only exact ties.
 */
export type Direction = 'down' | 'up' | 'floor' | 'ceiling' | 'half-up' | 'half-even';

/**
 * The multiple of `step` that a value is printed as.
 * formula: the whole number q with value = (q + rest) x step, moved by the direction; then q x step.
 * rounding: here and nowhere else; exact on ties because the value is a fraction, not a quotient of 40 digits.
 * source: decimal arithmetic terms as in IEEE 754-2019 clause 4.3 (half-even; toward zero, plus and minus infinity), from memory.
 */
export function round(value: Exact | Decimal, step: Decimal, direction: Direction): Decimal {
	assert(step.isFinite() && step.gt(0), `a rounding step must be positive, not ${step.toString()}`);
	const v = value instanceof Decimal ? exact(value) : value;
	const s = exact(step);
	const numerator = v.n * s.d;
	const denominator = v.d * s.n;
	const count = roundQuotient(numerator, denominator, direction);
	// count x step, written out from integers so that no digit can be lost
	return placesFrom(count * s.n, s.d);
}

/** The whole number nearest to n/d in the given direction (d > 0). */
export function roundQuotient(n: bigint, d: bigint, direction: Direction): bigint {
	const cut = n / d;
	const rest = n % d;
	if (rest === 0n) return cut;
	const away = n < 0n ? cut - 1n : cut + 1n;
	switch (direction) {
		case 'down':
			return cut;
		case 'up':
			return away;
		case 'floor':
			return n < 0n ? away : cut;
		case 'ceiling':
			return n < 0n ? cut : away;
		case 'half-up':
		case 'half-even': {
			const twice = (rest < 0n ? -rest : rest) * 2n;
			if (twice !== d) return twice > d ? away : cut;
			return direction === 'half-up' || cut % 2n !== 0n ? away : cut;
		}
	}
}

/** n / 10^k as a decimal, where d is 10^k. */
function placesFrom(n: bigint, d: bigint): Decimal {
	const places = d.toString().length - 1;
	const digits = (n < 0n ? -n : n).toString().padStart(places + 1, '0');
	const whole = digits.slice(0, digits.length - places);
	const text = places === 0 ? whole : `${whole}.${digits.slice(-places)}`;
	assert(digits.length <= 40, `a printed figure of ${digits.length} digits does not fit`);
	return new Decimal(n < 0n ? `-${text}` : text);
}
