import { assert } from '$trade/number/decimal.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import { encodeBody, versionOf, type Bodies, type RecordKind } from '$trade/record/kind.ts';
import { freeLetter, purchaseNumber, type PurchaseBody } from '$trade/record/kinds/purchase.ts';
import { canonicalJson, type Json } from '$trade/record/json.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { chained } from './hash.ts';
import { newId, recordId } from './ids.ts';
import type { Session } from './open.ts';
import type { Photo } from './photos.ts';
import { problemOf, StorageFailure, type StorageProblem } from './problem.ts';
import { rowAfter } from './rows.ts';
import type { BookDatabase, BookRow, CurrentRow, DamagedRow, SumsRow } from './schema.ts';
import { sumsAfter } from './sums-after.ts';

/** One thing to be written: the whole new state of a subject, or null to delete it. */
export type Change = {
	readonly [K in RecordKind]: {
		readonly kind: K;
		readonly subject: string;
		readonly body: Bodies[K] | null;
		/** The record that the page read it from; null for something new. */
		readonly replaces: string | null;
		/** Further standing records that this one settles after a conflict. */
		readonly settles?: readonly string[];
	};
}[RecordKind];

export type AppendOptions = {
	readonly photos?: readonly Photo[];
	/** A draft that this act uses up. */
	readonly draft?: string;
	/** A name for the act (newId()), kept with the draft: the same act tried again is saved once. */
	readonly act?: string;
};

/** What is about to be written, worked out and hashed before the transaction opens. */
export type Prepared = {
	readonly revision: number;
	readonly records: readonly StoredRecord[];
	readonly rows: readonly CurrentRow[];
	readonly sums: readonly SumsRow[];
	readonly book: BookRow;
	readonly photos: readonly Photo[];
	readonly damaged: readonly DamagedRow[];
	readonly draft: string | null;
	/** Purchases that are now on this phone only, and those that are not any more. */
	readonly onlyHere: readonly string[];
	readonly notOnlyHere: readonly string[];
	readonly lots: readonly string[];
};

/** Another writer was quicker: what was prepared is worked out again. */
class Moved extends Error {}

const MOST_TRIES = 5;

/**
 * Writes one act: its records, what stands now, the sums of its lots, its photos, the device's last hash and the end of its
 * draft, in one transaction. The answer comes after the transaction's own promise: then it is on the medium.
 */
export async function append(
	session: Session,
	changes: readonly Change[],
	options: AppendOptions = {}
): Promise<Result<readonly StoredRecord[], StorageProblem>> {
	assert(changes.length > 0, 'an act that changes nothing');
	assert(new Set(changes.map(({ subject }) => subject)).size === changes.length, 'one act changes a subject twice');
	const act = options.act ?? newId(session.environment.now());
	return write(session, async () => {
		const before = options.act === undefined ? null : await earlier(session, act, changes);
		return before ?? prepare(session, act, changes, options);
	});
}

/** Runs a writer alone: prepares, writes in one transaction, and prepares again if another writer came in between. */
export async function write(
	session: Session,
	prepare: () => Promise<Prepared | { readonly done: readonly StoredRecord[] }>
): Promise<Result<readonly StoredRecord[], StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	try {
		return await session.alone(async () => {
			for (let tries = 0; tries < MOST_TRIES; tries += 1) {
				const prepared = await prepare();
				if ('done' in prepared) return ok(prepared.done);
				try {
					await session.use((db) => commit(db, prepared));
				} catch (thrown) {
					if (thrown instanceof Moved) continue;
					throw thrown;
				}
				const { database, records } = prepared.book;
				session.markWritten({ database, records });
				session.watchers.tell({ kinds: [...new Set(prepared.rows.map(({ kind }) => kind))], lots: prepared.lots });
				return ok(prepared.records);
			}
			return fail<StorageProblem>({ kind: 'storage-busy' });
		});
	} catch (thrown) {
		if (thrown instanceof StorageFailure || !isOurMistake(thrown)) return fail(problemOf(thrown));
		throw thrown;
	}
}

function isOurMistake(thrown: unknown): boolean {
	return thrown instanceof Error && thrown.message.startsWith('Meltbook is wrong');
}

/** The one transaction of an act. Repeating it after a lost connection is harmless: the ids are the same. */
async function commit(db: BookDatabase, prepared: Prepared): Promise<void> {
	const tables = [db.records, db.current, db.sums, db.photos, db.drafts, db.book, db.onlyHere, db.damaged];
	await db.transaction('rw', tables, async () => {
		const now = await db.book.get('book');
		if (now?.revision !== prepared.revision) {
			const there = await db.records.bulkGet(prepared.records.map(({ id }) => id));
			if (there.every((record, index) => record?.hash === prepared.records[index]!.hash)) return;
			throw new Moved('another writer was quicker');
		}
		await db.records.bulkPut(prepared.records as StoredRecord[]);
		await db.current.bulkPut(prepared.rows as CurrentRow[]);
		if (prepared.sums.length > 0) await db.sums.bulkPut(prepared.sums as SumsRow[]);
		if (prepared.photos.length > 0) await db.photos.bulkPut(prepared.photos as Photo[]);
		if (prepared.damaged.length > 0) await db.damaged.bulkPut(prepared.damaged as DamagedRow[]);
		if (prepared.draft !== null) await db.drafts.delete(prepared.draft);
		if (prepared.onlyHere.length > 0) await db.onlyHere.bulkPut(prepared.onlyHere.map((subject) => ({ subject })));
		if (prepared.notOnlyHere.length > 0) await db.onlyHere.bulkDelete(prepared.notOnlyHere as string[]);
		await db.book.put(prepared.book);
	});
}

/** The records that this very act wrote before, if it did. */
async function earlier(
	session: Session,
	act: string,
	changes: readonly Change[]
): Promise<{ readonly done: readonly StoredRecord[] } | null> {
	const found = await session.use((db) => db.records.bulkGet(changes.map((_, index) => recordId(act, index))));
	if (found.every((record) => record === undefined)) return null;
	const same = found.every((record, index) => {
		const change = changes[index]!;
		if (record === undefined || record.kind !== change.kind || record.subject !== change.subject) return false;
		return canonicalJson(record.body) === canonicalJson(written(change, numberIn(record.body)));
	});
	if (!same) throw new StorageFailure({ kind: 'storage-already-saved', act });
	return { done: found as StoredRecord[] };
}

function numberIn(body: Json | null): string | null {
	const number = (body as { readonly number?: Json } | null)?.number;
	return typeof number === 'string' ? number : null;
}

/** The body as it is written; a purchase gets its number here. */
function written(change: Change, number: string | null): Json | null {
	if (change.body === null) return null;
	if (change.kind !== 'purchase') return encodeBody(change.kind, change.body);
	const body: PurchaseBody = { ...change.body, number: change.body.number ?? number };
	return encodeBody('purchase', body);
}

async function prepare(session: Session, act: string, changes: readonly Change[], options: AppendOptions): Promise<Prepared> {
	const now = session.environment.now();
	const subjects = changes.map(({ subject }) => subject);
	const [book, before] = await session.use(async (db) => [await db.book.get('book'), await db.current.bulkGet(subjects)] as const);
	assert(book !== undefined, 'a book without its own row');
	let { letter, numbered } = book;
	if (book.taken.includes(letter)) [letter, numbered] = [freeLetter(new Set(book.taken)), 0];
	const drafts = changes.map((change, index) => {
		const old = before[index];
		const found = old?.record ?? null;
		if (change.replaces !== found) {
			throw new StorageFailure({ kind: 'storage-changed-since', subject: change.subject, expected: change.replaces, found });
		}
		let number = numberIn(old?.body ?? null);
		if (change.kind === 'purchase' && change.body !== null && change.body.number === null && number === null) {
			numbered += 1;
			number = purchaseNumber(letter, numbered);
		}
		const settles = change.settles ?? [];
		// where other records still stand, the one made now is the later one, even against a clock that runs ahead
		const others = (old?.heads ?? []).filter(({ id }) => id !== change.replaces && !settles.includes(id));
		return {
			id: recordId(act, index),
			kind: change.kind,
			version: versionOf(change.kind),
			subject: change.subject,
			replaces: change.replaces,
			settles: [...settles],
			at: others.reduce((latest, { at }) => Math.max(latest, at + 1), now),
			device: book.device,
			body: written(change, number)
		};
	});
	const records = await chained(drafts, book.head);
	const rows = records.map((record, index) => rowAfter(before[index], record));
	const { sums, lots } = await sumsAfter(session, before, rows);
	const purchases = records.filter(({ kind }) => kind === 'purchase');
	return {
		revision: book.revision,
		records,
		rows,
		sums,
		lots,
		photos: options.photos ?? [],
		damaged: [],
		draft: options.draft ?? null,
		onlyHere: purchases.filter(({ body }) => body !== null).map(({ subject }) => subject),
		notOnlyHere: purchases.filter(({ body }) => body === null).map(({ subject }) => subject),
		book: {
			...book,
			letter,
			numbered,
			head: records[records.length - 1]!.hash,
			records: book.records + records.length,
			revision: book.revision + 1
		}
	};
}
