import { IDBFactory, IDBKeyRange } from 'fake-indexeddb';
import type { LotSums } from '../../src/trade/lot/sums.ts';
import { decimal, ZERO } from '../../src/trade/number/decimal.ts';
import { EXACT_ZERO } from '../../src/trade/number/exact.ts';
import type { PriceSheet } from '../../src/trade/price/price-sheet.ts';
import type { LotBody } from '../../src/trade/record/kinds/lot.ts';
import type { PurchaseBody } from '../../src/trade/record/kinds/purchase.ts';
import type { StoredRecord } from '../../src/trade/record/record.ts';
import type { Change, AppendOptions } from '../../src/storage/append.ts';
import { openBook, type Book } from '../../src/storage/book.ts';
import { pageLock, type Environment, type OutsideStore } from '../../src/storage/environment.ts';
import { BookDatabase } from '../../src/storage/schema.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';

/** One browser on one device: tabs opened with it share its database, its locks and its small outside store. */
export type Device = Environment & { time: number; readonly kept: Map<string, string> };

export const START = 1_790_000_000_000;

export function device(parts: Partial<Environment> = {}): Device {
	const kept = new Map<string, string>();
	const outside: OutsideStore = {
		getItem: (key) => kept.get(key) ?? null,
		setItem: (key, value) => void kept.set(key, value),
		removeItem: (key) => void kept.delete(key)
	};
	const made: Device = {
		indexedDB: new IDBFactory() as unknown as IDBFactory & globalThis.IDBFactory,
		IDBKeyRange: IDBKeyRange as unknown as typeof globalThis.IDBKeyRange,
		now: () => made.time,
		lock: pageLock(),
		outside,
		channel: null,
		time: START,
		kept,
		...parts
	};
	return made;
}

export async function opened(on: Device = device(), name = 'meltbook'): Promise<Book> {
	const result = await openBook(name, on);
	if (!result.ok) throw new Error(`the book did not open: ${JSON.stringify(result.problem)}`);
	return result.value.book;
}

/** The tables themselves, for tests that look at them or damage them. */
export async function raw(on: Device, name = 'meltbook'): Promise<BookDatabase> {
	const db = new BookDatabase(name, on);
	await db.open();
	return db;
}

/** Appends, or fails the test. */
export async function saved(book: Book, changes: readonly Change[], options?: AppendOptions): Promise<readonly StoredRecord[]> {
	const result = await book.append(changes, options);
	if (!result.ok) throw new Error(`not saved: ${JSON.stringify(result.problem)}`);
	return result.value;
}

export function value<T>(result: { ok: true; value: T } | { ok: false; problem: unknown }): T {
	if (!result.ok) throw new Error(JSON.stringify(result.problem));
	return result.value;
}

export function problem(result: { ok: true; value: unknown } | { ok: false; problem: { kind: string } }) {
	if (result.ok) throw new Error('there should be a problem');
	return result.problem;
}

export const lotBody = (parts: Partial<LotBody> = {}): LotBody => ({
	name: 'lot',
	note: '',
	state: 'open',
	purchase: null,
	sheet: null,
	openedAt: START,
	ask: null,
	...parts
});

export const lotChange = (subject: string, parts: Partial<LotBody> = {}, replaces: string | null = null): Change => ({
	kind: 'lot',
	subject,
	body: lotBody(parts),
	replaces
});

export const pieceChange = (subject: string, lot: string, line: string, order = 1, replaces: string | null = null): Change => ({
	kind: 'piece',
	subject,
	body: { lot, order, piece: pieceOf(line) },
	replaces
});

export const sheet: PriceSheet = {
	currency: 'EUR',
	quotes: [{ metal: 'Au', amount: decimal('3000'), per: 'ozt' }],
	at: START,
	source: 'typed'
};

export const purchaseBody = (lot: string, parts: Partial<PurchaseBody> = {}): PurchaseBody => ({
	number: null,
	lot,
	boughtAt: START,
	seller: { name: 'Ada Kern', document: '', note: '' },
	paid: { amount: decimal('10'), currency: 'EUR' },
	means: 'cash',
	offer: { amount: decimal('10'), currency: 'EUR' },
	share: decimal('0.85'),
	sheet: 'sheet-1',
	prices: sheet,
	totals: { gross: ZERO, net: ZERO, fine: {}, value: EXACT_ZERO },
	second: null,
	entries: 0,
	pieces: 0,
	...parts
});

export const purchaseChange = (subject: string, lot = 'lot-1', parts: Partial<PurchaseBody> = {}, replaces: string | null = null): Change => ({
	kind: 'purchase',
	subject,
	body: purchaseBody(lot, parts),
	replaces
});

/** Everything of a book that two equal books share, as text. */
export async function contentOf(on: Device, name = 'meltbook'): Promise<string> {
	const db = await raw(on, name);
	const plain = (_: string, held: unknown) => (typeof held === 'bigint' ? `${held}n` : held);
	// a lot without pieces is the same as no sums
	const full = (await db.sums.toArray()).filter(({ sums: of, damaged }) => (of as LotSums).entries > 0 || damaged.length > 0);
	const sums = full.map(({ lot, sums: of, damaged }) => ({ lot, of, damaged }));
	const rows = [await db.records.toArray(), await db.current.toArray(), sums, await db.photos.toArray()];
	db.close();
	return sortedText(rows, plain);
}

function sortedText(rows: unknown, plain: (key: string, held: unknown) => unknown): string {
	return JSON.stringify(rows, (key, held: unknown) => {
		const shown = plain(key, held);
		if (typeof shown !== 'object' || shown === null || Array.isArray(shown)) return shown;
		if (shown instanceof ArrayBuffer) return [...new Uint8Array(shown)];
		return Object.fromEntries(Object.entries(shown).sort(([a], [b]) => (a < b ? -1 : 1)));
	});
}
