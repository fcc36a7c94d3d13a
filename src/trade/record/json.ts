import { assert } from '../number/decimal.ts';

/** What can be written as JSON text and read back the same: what a record's body is made of. */
export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

/**
 * The one text of a JSON value: keys sorted by their UTF-16 units, no spaces. Two equal values have equal text, so a hash
 * of the text is a hash of the value, whatever order a database or another program keeps keys in.
 */
export function canonicalJson(value: Json): string {
	if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value);
	if (typeof value === 'number') {
		assert(Number.isFinite(value), `a record cannot hold ${value}`);
		return JSON.stringify(value);
	}
	if (isList(value)) return `[${value.map(canonicalJson).join(',')}]`;
	const fields = Object.keys(value)
		.sort()
		.map((key) => `${JSON.stringify(key)}:${canonicalJson(value[key]!)}`);
	return `{${fields.join(',')}}`;
}

/** True of plain JSON values only: no undefined, NaN, Date, Decimal, Map or class instance anywhere inside. */
export function isJson(value: unknown, depth = 0): value is Json {
	if (value === null || typeof value === 'boolean' || typeof value === 'string') return true;
	if (typeof value === 'number') return Number.isFinite(value);
	if (typeof value !== 'object' || depth > MOST_DEPTH) return false;
	if (Array.isArray(value)) return value.every((item) => isJson(item, depth + 1));
	const made = Object.getPrototypeOf(value) as unknown;
	if (made !== null && (made as { constructor?: { name?: string } }).constructor?.name !== 'Object') return false;
	return Object.values(value).every((item) => isJson(item, depth + 1));
}

/** Deeper than any record of ours, shallow enough that hostile nesting cannot exhaust the stack. */
const MOST_DEPTH = 40;

/** Narrowing that keeps `readonly` (Array.isArray does not). */
export function isList(value: Json): value is readonly Json[] {
	return Array.isArray(value);
}

/**
 * Anything as JSON, for keeping what cannot be read: what JSON cannot hold becomes text that tells what it was. Bytes become
 * their numbers. Nothing thrown, whatever it is given.
 */
export function asJson(value: unknown, depth = 0): Json {
	if (value === null || typeof value === 'boolean' || typeof value === 'string') return value;
	if (typeof value === 'number') return Number.isFinite(value) ? value : `number ${value}`;
	if (typeof value !== 'object') return typeof value === 'undefined' ? 'undefined' : `${typeof value} ${String(value as bigint)}`;
	if (depth >= MOST_DEPTH - 10) return 'nested too deeply';
	if (value instanceof ArrayBuffer) return { bytes: [...new Uint8Array(value)] };
	if (value instanceof Date) return `date ${value.getTime()}`;
	if (Array.isArray(value)) return value.map((item) => asJson(item, depth + 1));
	return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, asJson(item, depth + 1)]));
}
