import { fail, ok, type Result } from '$trade/number/result.ts';
import type { Json } from '$trade/record/json.ts';
import type { RecordKind } from '$trade/record/kind.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import type { AppendOptions, Change } from './append.ts';
import type { BackupFile, BackupTarget } from './backup.ts';
import type { Running } from './backup-format.ts';
import { getDraft, listDrafts, removeDraft, setDraft } from './drafts.ts';
import { browserEnvironment, type Environment } from './environment.ts';
import { newId } from './ids.ts';
import { compareMarker, readMarker, removeMarker, type MarkerReading } from './marker.ts';
import { openSession, type Session } from './open.ts';
import { readPhoto } from './photos.ts';
import { problemOf, StorageFailure, type StorageProblem } from './problem.ts';
import * as read from './read.ts';
import type { RestorePreview } from './restore.ts';
import type { BookRow } from './schema.ts';

/** The buyer's own book, and the one with an invented scenario. They never share anything. */
export const BOOK = 'meltbook';
export const DEMO_BOOK = 'meltbook-demo';

export type OpenedBook = {
	readonly book: Book;
	/** Why the book can only be read and exported; null: it can be written. */
	readonly readOnly: StorageProblem | null;
	/** What the marker outside the database says: shown when a book is missing that was here before. */
	readonly marker: MarkerReading;
};

/** Opens a book, making it if there is none. */
export async function openBook(
	name: string = BOOK,
	environment: Environment = browserEnvironment()
): Promise<Result<OpenedBook, StorageProblem>> {
	try {
		const session = await openSession(name, environment);
		const row = await ownRow(session);
		const found = { database: row.database, records: row.records };
		const marker = compareMarker(readMarker(environment.outside, name), found);
		if (marker.state === 'wiped' || marker.state === 'fewer') session.holdMarker();
		if (row.records > 0) session.markWritten(found);
		return ok({ book: bookOf(session), readOnly: session.readOnly, marker });
	} catch (thrown) {
		return fail(problemOf(thrown));
	}
}

/** The row about the book, made when the book is new. A newer book that lacks it is read without. */
async function ownRow(session: Session): Promise<BookRow> {
	const { now } = session.environment;
	const fresh = (): BookRow => ({
		key: 'book',
		database: newId(now()),
		device: newId(now()),
		head: null,
		letter: 'A',
		numbered: 0,
		taken: [],
		records: 0,
		revision: 0,
		lastBackup: null
	});
	const known = await session.use((db) => db.book.get('book'));
	if (known !== undefined || session.readOnly !== null) return known ?? fresh();
	return session.alone(() =>
		session.use((db) =>
			db.transaction('rw', db.book, async () => {
				const meanwhile = await db.book.get('book');
				if (meanwhile !== undefined) return meanwhile;
				const made = fresh();
				await db.book.put(made);
				return made;
			})
		)
	);
}

/** Removes a whole book with its marker: the demo book, or all data on the person's word. Other tabs are told to let go. */
export async function removeBook(name: string, { indexedDB, outside }: Environment = browserEnvironment()): Promise<Result<null, StorageProblem>> {
	try {
		await new Promise<void>((resolve, reject) => {
			const request = indexedDB.deleteDatabase(name);
			request.onsuccess = () => resolve();
			request.onerror = () => reject(request.error ?? new Error('the book was not removed'));
			request.onblocked = () => reject(new StorageFailure({ kind: 'storage-blocked' }));
		});
		removeMarker(outside, name);
		return ok(null);
	} catch (thrown) {
		return fail(problemOf(thrown));
	}
}

/**
 * Everything that a page may do with a book. Reads reject with a StorageFailure; acts answer with a Result. What only acts
 * need is loaded with the first of them: a page is drawn from reads.
 */
export type Book = ReturnType<typeof bookOf>;

function bookOf(session: Session) {
	return {
		name: session.name,
		get readOnly() {
			return session.readOnly;
		},
		append: async (changes: readonly Change[], options?: AppendOptions) => (await import('./append.ts')).append(session, changes, options),
		undoOf: async (recordIds: readonly string[]) => (await import('./undo.ts')).undoOf(session, recordIds),

		get: <K extends RecordKind>(kind: K, subject: string) => read.get(session, kind, subject),
		standing: (subject: string) => read.standing(session, subject),
		history: (subject: string) => read.history(session, subject),
		latestSheet: () => read.latestSheet(session),
		sheets: (limit: number) => read.sheets(session, limit),
		settings: () => read.settings(session),
		scales: () => read.scales(session),
		testers: () => read.testers(session),
		openLots: () => read.lotsIn(session, 'open'),
		setAsideLots: () => read.lotsIn(session, 'set-aside'),
		lot: (subject: string) => read.lot(session, subject),
		lotKeys: (subject: string) => read.lotKeys(session, subject),
		lastOrder: (subject: string) => read.lastOrder(session, subject),
		pieces: (keys: readonly string[]) => read.pieces(session, keys),
		purchases: (limit: number, before: read.PageEnd | null = null) => read.purchases(session, limit, before),
		/** The bought lots with their sums. */
		stock: () => read.lotsWithSums(session, 'bought'),
		conflicts: () => read.conflicts(session),
		counts: () => read.counts(session),
		photo: (id: string) => readPhoto(session, id),

		getDraft: (key: string) => getDraft(session, key),
		setDraft: (key: string, value: Json) => setDraft(session, key, value),
		removeDraft: (key: string) => removeDraft(session, key),
		listDrafts: (prefix?: string) => listDrafts(session, prefix),

		backup: async (options?: Running & { readonly target?: BackupTarget }) =>
			(await import('./backup.ts')).makeBackup(session, options),
		/** Call when the person has the file. */
		handedOver: async (file: BackupFile) => (await import('./backup.ts')).handedOver(session, file),
		previewBackup: async (file: Blob, running?: Running) => (await import('./restore.ts')).previewBackup(session, file, running),
		restore: async (preview: RestorePreview, running?: Running) => (await import('./restore.ts')).restore(session, preview, running),
		/** Joins checked records of another phone. */
		merge: async (records: readonly StoredRecord[]) => (await import('./merge.ts')).mergeRecords(session, records),

		check: async (running?: Running) => (await import('./check.ts')).checkBook(session, running),
		rebuild: async () => (await import('./check.ts')).rebuild(session),

		/** Calls fn after every committed change, in this tab or another; gives back the way to stop. */
		watch: session.watchers.watch,
		onEvent: session.watchers.onEvent,
		/** The person has seen that an earlier book is missing: from now on this one is the marked one. */
		acceptMarker: () => session.settleMarker(),
		close: () => session.close()
	};
}
