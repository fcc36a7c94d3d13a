import { decimal, type Decimal } from '../number/decimal.ts';
import { exactFromText, exactToText, type Exact } from '../number/exact.ts';
import { isMetalId, type MetalId } from '../metal/metals.ts';
import { isLossClass } from '../piece/loss-class.ts';
import type { ClassSums, FineSums, LotSums, Quantity } from './sums.ts';

type Texts = { readonly [name: string]: string };
export type ClassSumsText = {
	readonly of: string;
	readonly lossClass: string;
	readonly entries: number;
	readonly pieces: number;
	readonly net: string;
	readonly fine: Texts;
};
/** The sums as plain values that any store keeps: decimals, fractions and whole numbers as text. */
export type LotSumsText = {
	readonly entries: number;
	readonly pieces: number;
	readonly gross: string;
	readonly net: string;
	readonly fine: Texts;
	readonly byClass: { readonly [group: string]: ClassSumsText };
	readonly shared: { readonly [source: string]: Texts };
	readonly expected: Texts;
	readonly own: Texts;
};

function mapValues<A, B>(from: Readonly<Record<string, A>>, make: (value: A) => B): Record<string, B> {
	return Object.fromEntries(Object.entries(from).map(([key, value]) => [key, make(value)]));
}

export function encodeSums(sums: LotSums): LotSumsText {
	return {
		entries: sums.entries,
		pieces: sums.pieces,
		gross: sums.gross.toFixed(),
		net: sums.net.toFixed(),
		fine: mapValues(sums.fine, exactToText),
		byClass: mapValues(sums.byClass, ({ net, fine, ...rest }) => ({ ...rest, net: net.toFixed(), fine: mapValues(fine, exactToText) })),
		shared: mapValues(sums.shared, (by) => mapValues(by, (ng) => ng.toString())),
		expected: mapValues(sums.expected, (ng) => ng.toString()),
		own: mapValues(sums.own, (product) => product.toString())
	};
}

/** Reads what `encodeSums` wrote; null for anything else, and the sums must then be made again from the pieces. */
export function decodeSums(stored: unknown): LotSums | null {
	if (!isPlain(stored)) return null;
	const [entries, pieces] = [count(stored.entries), count(stored.pieces)];
	const [gross, net] = [grams(stored.gross), grams(stored.net)];
	const fine = readFine(stored.fine);
	const byClass = readAll(stored.byClass, readClass);
	const shared = readAll(stored.shared, (by) => readAll(by, whole, (name) => isQuantity(name)));
	// an older release knew no findings
	const expected = readAll(stored.expected ?? {}, whole, isMetalId);
	const own = readAll(stored.own, whole, (name) => name.split(' ').length === 2 && name.split(' ').every(isQuantity));
	if (entries === null || pieces === null || gross === null || net === null) return null;
	if (fine === null || byClass === null || shared === null || expected === null || own === null) return null;
	return { entries, pieces, gross, net, fine, byClass, shared: shared as LotSums['shared'], expected, own };
}

function isPlain(value: unknown): value is Readonly<Record<string, unknown>> {
	return value !== null && typeof value === 'object' && !Array.isArray(value);
}

function isQuantity(name: string): name is Quantity {
	return name === 'net' || isMetalId(name);
}

const count = (value: unknown) => (typeof value === 'number' && Number.isSafeInteger(value) && value >= 0 ? value : null);
/** An older release wrote whole numbers as they are. */
const whole = (value: unknown) => (typeof value === 'bigint' || (typeof value === 'string' && /^-?\d{1,80}$/.test(value)) ? BigInt(value) : null);
const grams = (value: unknown): Decimal | null =>
	typeof value === 'string' && /^\d{1,80}(?:\.\d{1,80})?$/.test(value) ? decimal(value) : null;
const fraction = (value: unknown): Exact | null => (typeof value === 'string' ? exactFromText(value) : null);

/** Null as soon as one value or one name is not what it should be. */
function readAll<T>(stored: unknown, read: (value: unknown) => T | null, named: (name: string) => boolean = () => true): Record<string, T> | null {
	if (!isPlain(stored)) return null;
	const all: [string, T][] = [];
	for (const [name, value] of Object.entries(stored)) {
		const made = named(name) ? read(value) : null;
		if (made === null) return null;
		all.push([name, made]);
	}
	return Object.fromEntries(all);
}

function readFine(stored: unknown): FineSums | null {
	return readAll(stored, fraction, isMetalId) as Partial<Record<MetalId, Exact>> | null;
}

function readClass(stored: unknown): ClassSums | null {
	if (!isPlain(stored)) return null;
	const { of, lossClass } = stored;
	const [entries, pieces, net, fine] = [count(stored.entries), count(stored.pieces), grams(stored.net), readFine(stored.fine)];
	if (typeof of !== 'string' || typeof lossClass !== 'string' || !isLossClass(lossClass)) return null;
	if (entries === null || pieces === null || net === null || fine === null) return null;
	return { of, lossClass, entries, pieces, net, fine };
}
