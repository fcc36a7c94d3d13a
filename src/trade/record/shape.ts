import { Decimal, decimal } from '../number/decimal.ts';
import { exactFromText, exactToText, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { isList, type Json } from './json.ts';

/** A body that is not what its kind and version say: where, what was expected there, and what stands there. */
export type ShapeProblem = { readonly kind: 'record-body'; readonly at: string; readonly expected: string; readonly found: string };

/** How one kind of value is written as JSON and read back. Reading checks everything and refuses what it does not know. */
export type Shape<T> = {
	readonly write: (value: T) => Json;
	/** Throws a Mismatch; only `readAs` calls it, and turns that into a value. */
	readonly read: (json: Json | undefined, at: string) => T;
};

/** The half of a shape that reads: all that is left of a version which is not written any more. */
export type Reader<T> = Pick<Shape<T>, 'read'>;

class Mismatch {
	constructor(readonly problem: ShapeProblem) {}
}

function mismatch(at: string, expected: string, json: Json | undefined): never {
	const found = json === undefined ? 'nothing' : JSON.stringify(json);
	throw new Mismatch({ kind: 'record-body', at, expected, found: found.length > 60 ? `${found.slice(0, 57)}...` : found });
}

/** Reads a whole body, or says the first place where it is not what it should be. */
export function readAs<T>(shape: Reader<T>, json: Json): Result<T, ShapeProblem> {
	try {
		return ok(shape.read(json, ''));
	} catch (thrown) {
		if (thrown instanceof Mismatch) return fail(thrown.problem);
		throw thrown;
	}
}

function leaf<T>(expected: string, take: (json: Json | undefined) => T | undefined, write: (value: T) => Json): Shape<T> {
	return {
		write,
		read(json, at) {
			const value = take(json);
			return value === undefined ? mismatch(at, expected, json) : value;
		}
	};
}

const isText = (json: Json | undefined): json is string => typeof json === 'string';
const isNumber = (json: Json | undefined): json is number => typeof json === 'number' && Number.isFinite(json);
const same = <T extends Json>(value: T): Json => value;

export const text = leaf<string>('text', (json) => (isText(json) ? json : undefined), same);
export const name = leaf<string>('a name', (json) => (isText(json) && json !== '' ? json : undefined), same);
export const flag = leaf<boolean>('true or false', (json) => (typeof json === 'boolean' ? json : undefined), same);
export const number = leaf<number>('a number', (json) => (isNumber(json) ? json : undefined), same);
export const notNegative = leaf<number>('a number of 0 or more', (json) => (isNumber(json) && json >= 0 ? json : undefined), same);
/** A number from the least to the most, both included. */
export const within = (least: number, most: number): Shape<number> =>
	leaf<number>(`a number from ${least} to ${most}`, (json) => (isNumber(json) && json >= least && json <= most ? json : undefined), same);
export const whole = leaf<number>(
	'a whole number of 0 or more',
	(json) => (isNumber(json) && Number.isSafeInteger(json) && json >= 0 ? json : undefined),
	same
);
/** Milliseconds since 1970-01-01 UTC. */
export const moment = leaf<number>(
	'a time',
	(json) => (isNumber(json) && Number.isSafeInteger(json) && Math.abs(json) <= 8.64e15 ? json : undefined),
	same
);

/** A decimal as its plain value ("12.3"); what was typed ("12.30") is kept as text beside it where it matters. */
export const decimalText = leaf<Decimal>(
	'a decimal as text',
	(json) => (isText(json) && /^-?\d{1,60}(\.\d{1,60})?$/.test(json) ? decimal(json) : undefined),
	(value) => value.toFixed()
);

export const exactText = leaf<Exact>(
	'an exact fraction as text',
	(json) => (isText(json) ? (exactFromText(json) ?? undefined) : undefined),
	(value) => exactToText(value)
);

/** A decimal above zero, such as the division of a scale. */
export const positiveText = leaf<Decimal>(
	'a decimal above zero, as text',
	(json) => (isText(json) && /^\d{1,60}(\.\d{1,60})?$/.test(json) && /[1-9]/.test(json) ? decimal(json) : undefined),
	(value) => value.toFixed()
);

/** One word out of a closed list. */
export function oneOf<T extends string>(words: readonly T[]): Shape<T> {
	const known: ReadonlySet<string> = new Set(words);
	return leaf<T>(
		words.length > 8 ? `one of ${words.length} known words` : `one of ${words.join(', ')}`,
		(json) => (isText(json) && known.has(json) ? (json as T) : undefined),
		same
	);
}

/** Text that a function of another folder accepts, kept as its value. */
export function checked<T extends string>(expected: string, accepts: (found: string) => found is T): Shape<T> {
	return leaf<T>(expected, (json) => (isText(json) && accepts(json) ? json : undefined), same);
}

export function nullable<T>(inner: Shape<T>): Shape<T | null> {
	return {
		write: (value) => (value === null ? null : inner.write(value)),
		read: (json, at) => (json === null ? null : inner.read(json, at))
	};
}

/** A list, of `most` at the most where a body must stay small. */
export function list<T>(item: Shape<T>, most = Infinity): Shape<readonly T[]> {
	return {
		write: (values) => values.map((value) => item.write(value)),
		read(json, at) {
			if (json === undefined || json === null || typeof json !== 'object' || !isList(json)) return mismatch(at, 'a list', json);
			if (json.length > most) return mismatch(at, `a list of at most ${most}`, json);
			return json.map((each, index) => item.read(each, `${at}[${index}]`));
		}
	};
}

function plain(json: Json | undefined, at: string): { readonly [key: string]: Json } {
	if (json === undefined || json === null || typeof json !== 'object' || isList(json)) return mismatch(at, 'named fields', json);
	return json;
}

type Fields<T> = { readonly [K in keyof T]-?: Shape<Exclude<T[K], undefined>> };

/** Named fields, all of them and no others; those in `mayLack` may be absent. */
export function object<T extends object>(fields: Fields<T>, mayLack: readonly (keyof T & string)[] = []): Shape<T> {
	const known = Object.keys(fields) as (keyof T & string)[];
	const names: ReadonlySet<string> = new Set(known);
	const absent: ReadonlySet<string> = new Set(mayLack);
	return {
		write(value) {
			const made: Record<string, Json> = {};
			for (const key of known) {
				const field = value[key];
				if (field === undefined && absent.has(key)) continue;
				made[key] = fields[key].write(field as never);
			}
			return made;
		},
		read(json, at) {
			const found = plain(json, at);
			const made: Partial<T> = {};
			for (const key of known) {
				if (!Object.hasOwn(found, key) && absent.has(key)) continue;
				made[key] = fields[key].read(Object.hasOwn(found, key) ? found[key] : undefined, at === '' ? key : `${at}.${key}`);
			}
			for (const key of Object.keys(found)) {
				if (!names.has(key)) mismatch(at === '' ? key : `${at}.${key}`, 'no such field', found[key]);
			}
			return made as T;
		}
	};
}

/** Values by key, for keys of one shape ("fine grams by metal"). */
export function byKey<K extends string, T>(key: Shape<K>, inner: Shape<T>): Shape<Partial<Record<K, T>>> {
	return {
		write(value) {
			const held = (Object.entries(value) as [K, T | undefined][]).filter((pair): pair is [K, T] => pair[1] !== undefined);
			return Object.fromEntries(held.map(([each, of]) => [each, inner.write(of)]));
		},
		// made as own fields, whatever they are called
		read(json, at) {
			const found = Object.entries(plain(json, at));
			return Object.fromEntries(found.map(([each, of]) => [key.read(each, at), inner.read(of, `${at}.${each}`)])) as Partial<Record<K, T>>;
		}
	};
}

/** One of several kinds of thing, told apart by the word in its field `kind`. Each shape reads and writes its whole thing. */
export function variants<T extends { readonly kind: string }>(shapes: { readonly [K in T['kind']]: Shape<Extract<T, { readonly kind: K }>> }): Shape<T> {
	const kind = oneOf(Object.keys(shapes) as T['kind'][]);
	const of = (known: T['kind']) => shapes[known] as unknown as Shape<T>;
	return {
		write: (value) => of(value.kind).write(value),
		read(json, at) {
			const found = plain(json, at);
			return of(kind.read(Object.hasOwn(found, 'kind') ? found['kind'] : undefined, at === '' ? 'kind' : `${at}.kind`)).read(json, at);
		}
	};
}

/** A version that is not written any more, read as what is written today. */
export function upgraded<Old, T>(old: Reader<Old>, upgrade: (found: Old) => T): Reader<T> {
	return { read: (json, at) => upgrade(old.read(json, at)) };
}

/** A shape with one more condition on the value that was read; `refuses` says what was expected instead, or null. */
export function refined<T>(inner: Shape<T>, refuses: (value: T) => string | null): Shape<T> {
	return {
		write: (value) => inner.write(value),
		read(json, at) {
			const value = inner.read(json, at);
			const expected = refuses(value);
			return expected === null ? value : mismatch(at, expected, json);
		}
	};
}
