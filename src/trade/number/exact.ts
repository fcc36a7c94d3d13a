import { assert, type Decimal } from './decimal.ts';

/**
 * An exact rational number n/d with d > 0. Karat is a fraction of 24 and a price is per ounce, so fine mass and value
 * are quotients: they stay fractions until the one division at the printed figure (rounding.ts).
 * Two values may be equal with different n and d; compare with `compareExact`, never with ===.
 */
export type Exact = { readonly n: bigint; readonly d: bigint };

export const EXACT_ZERO: Exact = { n: 0n, d: 1n };

/** 10^k for k >= 0, kept because masses have few places. */
const TENS: bigint[] = [1n];
function ten(k: number): bigint {
	while (TENS.length <= k) TENS.push(TENS[TENS.length - 1]! * 10n);
	return TENS[k]!;
}

function gcd(a: bigint, b: bigint): bigint {
	let x = a < 0n ? -a : a;
	let y = b;
	while (y !== 0n) [x, y] = [y, x % y];
	return x;
}

/**
 * A decimal as an exact fraction: digits over a power of ten.
 * rounding: none.
 */
export function exact(value: Decimal | bigint): Exact {
	if (typeof value === 'bigint') return { n: value, d: 1n };
	assert(value.isFinite(), `no exact value of ${value.toString()}`);
	const places = value.decimalPlaces();
	return { n: BigInt(value.toFixed(places).replace('.', '')), d: ten(places) };
}

/** a / b of two decimals, undivided. b must not be zero. */
export function ratio(a: Decimal | bigint, b: Decimal | bigint): Exact {
	return divide(exact(a), exact(b));
}

/**
 * a + b over the least common denominator, so that a long sum keeps one small denominator.
 * rounding: none.
 */
export function plus(a: Exact, b: Exact): Exact {
	if (a.d === b.d) return { n: a.n + b.n, d: a.d };
	if (a.d % b.d === 0n) return { n: a.n + b.n * (a.d / b.d), d: a.d };
	if (b.d % a.d === 0n) return { n: a.n * (b.d / a.d) + b.n, d: b.d };
	const shared = gcd(a.d, b.d);
	const left = b.d / shared;
	return { n: a.n * left + b.n * (a.d / shared), d: a.d * left };
}

export function negate(a: Exact): Exact {
	return { n: -a.n, d: a.d };
}

export function minus(a: Exact, b: Exact): Exact {
	return plus(a, negate(b));
}

export function times(a: Exact, b: Exact): Exact {
	return { n: a.n * b.n, d: a.d * b.d };
}

/** a / b; b must not be zero. */
export function divide(a: Exact, b: Exact): Exact {
	assert(b.n !== 0n, 'division by zero');
	return b.n > 0n ? { n: a.n * b.d, d: a.d * b.n } : { n: -a.n * b.d, d: a.d * -b.n };
}

export function sum(values: Iterable<Exact>): Exact {
	let total = EXACT_ZERO;
	for (const value of values) total = plus(total, value);
	return total;
}

/** Lowest terms: used where a value is written down, so that equal values have equal text. */
export function reduce(a: Exact): Exact {
	const shared = gcd(a.n, a.d);
	return shared <= 1n ? (a.n === 0n ? EXACT_ZERO : a) : { n: a.n / shared, d: a.d / shared };
}

/** Negative, zero or positive as a is less than, equal to or more than b. */
export function compareExact(a: Exact, b: Exact): -1 | 0 | 1 {
	const left = a.n * b.d;
	const right = b.n * a.d;
	return left < right ? -1 : left > right ? 1 : 0;
}

export function isZero(a: Exact): boolean {
	return a.n === 0n;
}

/** The nearest float, for estimates, plots and bars only: never on the way to what is paid. */
export function toNumber(a: Exact): number {
	const n = Number(a.n);
	const d = Number(a.d);
	if (Number.isFinite(n) && Number.isFinite(d)) return n / d;
	const shift = BigInt(Math.max(a.n.toString(2).length, a.d.toString(2).length) - 1_000);
	return Number(a.n >> shift) / Number(a.d >> shift);
}

/** "n/d" in lowest terms: the text under which an exact value is stored. */
export function exactToText(a: Exact): string {
	const { n, d } = reduce(a);
	return d === 1n ? n.toString() : `${n}/${d}`;
}

/** Reads what `exactToText` wrote; null for anything else. */
export function exactFromText(text: string): Exact | null {
	const match = /^(-?\d{1,400})(?:\/([1-9]\d{0,400}))?$/.exec(text);
	return match === null ? null : { n: BigInt(match[1]!), d: BigInt(match[2] ?? '1') };
}
