import { IDBDatabase as FakeDatabase, IDBObjectStore as FakeStore } from 'fake-indexeddb';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { blobTarget } from '../../src/storage/backup.ts';
import { openBook, removeBook } from '../../src/storage/book.ts';
import { hashOf } from '../../src/storage/hash.ts';
import { newId } from '../../src/storage/ids.ts';
import { contentOf, device, lotChange, opened, problem, purchaseChange, raw, saved, START, value, type Device } from '../storage/some-books.ts';

afterEach(() => void vi.restoreAllMocks());

/** The platform refuses every write into a store, the way browsers say it. */
function refuse(error: Error): void {
	const put = FakeStore.prototype.put;
	vi.spyOn(FakeStore.prototype, 'put').mockImplementation(function (this: IDBObjectStore, row: unknown, key?: unknown) {
		if (this.name === 'records') throw error;
		return put.call(this, row, key as never);
	});
}

/** A newer app opens the same book. */
const newer = (on: Device) =>
	new Promise<IDBDatabase>((resolve, reject) => {
		const request = on.indexedDB.open('meltbook', 90);
		request.onsuccess = () => resolve(request.result);
		request.onerror = () => reject(request.error);
	});

describe('problems of saving; each time nothing was saved', () => {
	it.each([
		['storage-quota', new DOMException('full', 'QuotaExceededError')],
		['storage-quota', new DOMException('disk full', 'DataError')],
		['storage-failed', new DOMException('refused', 'ConstraintError')],
		['storage-lost', new DOMException('Connection to Indexed Database server lost. Refresh the page to try again', 'UnknownError')]
	])('%s: %s', async (kind, error) => {
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('lot-0')]);
		const before = await contentOf(on);
		refuse(error);
		expect(problem(await book.append([lotChange('lot-1')])).kind).toBe(kind);
		vi.restoreAllMocks();
		expect(await contentOf(on)).toBe(before);
		await saved(book, [lotChange('lot-1')]);
	});
	it('storage-quota: the transaction breaks off when it is to be put on the medium', async () => {
		const on = device();
		const real = FakeDatabase.prototype.transaction;
		let full = false;
		vi.spyOn(FakeDatabase.prototype, 'transaction').mockImplementation(function (this: IDBDatabase, ...args) {
			const transaction = real.apply(this, args as never);
			if (full && args[1] === 'readwrite') {
				const store = transaction.objectStore('book');
				const put = store.put.bind(store);
				vi.spyOn(store, 'put').mockImplementation((row: unknown) => {
					const request = put(row as never);
					request.addEventListener('success', () => {
						transaction.abort();
						Object.defineProperty(transaction, 'error', { value: new DOMException('full', 'QuotaExceededError') });
					});
					return request;
				});
			}
			return transaction;
		});
		const book = await opened(on);
		const before = await contentOf(on);
		full = true;
		const result = await book.append([lotChange('lot-1')]);
		full = false;
		expect(problem(result).kind).toBe('storage-quota');
		expect(await contentOf(on)).toBe(before);
	});
	it('storage-unavailable: a window without a database', async () => {
		expect(problem(await openBook('meltbook', device({ indexedDB: undefined as unknown as IDBFactory }))).kind).toBe('storage-unavailable');
	});
	it('storage-newer: the book was written by a newer app', async () => {
		const on = device();
		(await opened(on)).close();
		(await newer(on)).close();
		const { book, readOnly } = value(await openBook('meltbook', on));
		expect(readOnly).toEqual({ kind: 'storage-newer', found: 9, known: 1 });
		expect(problem(await book.append([lotChange('lot-1')]))).toEqual(readOnly);
	});
	it('storage-superseded: a newer app opened it in another tab', async () => {
		const on = device();
		const book = await opened(on);
		(await newer(on)).close();
		expect(problem(await book.append([lotChange('lot-1')])).kind).toBe('storage-superseded');
	});
	it('storage-blocked: a book that another tab does not let go', async () => {
		const on = device();
		await new Promise<void>((resolve) => {
			const request = on.indexedDB.open('meltbook-demo', 10);
			// a tab that does not listen for versionchange
			request.onsuccess = () => resolve();
		});
		expect(problem(await removeBook('meltbook-demo', on)).kind).toBe('storage-blocked');
	});
	it('storage-busy: another writer without locks comes first every time', async () => {
		const on = device();
		const book = await opened(on);
		const db = await raw(on);
		const real = crypto.subtle.digest.bind(crypto.subtle);
		// between the reading and the writing of each try, another tab has written
		vi.spyOn(crypto.subtle, 'digest').mockImplementation(async (...args) => {
			const row = (await db.book.get('book'))!;
			await db.book.put({ ...row, revision: row.revision + 1 });
			return real(...args);
		});
		expect(problem(await book.append([lotChange('lot-1')])).kind).toBe('storage-busy');
		vi.restoreAllMocks();
		expect(await db.records.count()).toBe(0);
		db.close();
	});
	it('storage-changed-since: the other tab was quicker', async () => {
		const on = device();
		const [a, b] = [await opened(on), await opened(on)];
		const [first] = await saved(a, [lotChange('lot-1')]);
		await saved(b, [lotChange('lot-1', { name: 'theirs' }, first!.id)]);
		expect(problem(await a.append([lotChange('lot-1', { name: 'ours' }, first!.id)])).kind).toBe('storage-changed-since');
		expect(problem(await a.undoOf([first!.id])).kind).toBe('storage-changed-since');
	});
	it('storage-already-saved: the act went through, and the form was changed after', async () => {
		const book = await opened();
		const act = newId(START);
		await saved(book, [purchaseChange('b-1')], { act });
		expect(problem(await book.append([purchaseChange('b-1', 'lot-1', { means: 'transfer' })], { act })).kind).toBe('storage-already-saved');
	});
	it('storage-no-such-record: nothing to take back', async () => {
		expect(problem(await (await opened()).undoOf(['never-was']))).toEqual({ kind: 'storage-no-such-record', record: 'never-was' });
	});
	it('storage-record-differs: another record under the same id', async () => {
		const book = await opened();
		const [first] = await saved(book, [lotChange('lot-1')]);
		const bare = { ...first!, at: 5 };
		expect(problem(await book.merge([{ ...bare, hash: await hashOf(bare) }])).kind).toBe('storage-record-differs');
	});
});

describe('problems of backups; each time nothing was changed', () => {
	async function refused(spoil: (text: string) => string | Blob) {
		const from = await opened();
		await saved(from, [lotChange('lot-1'), lotChange('lot-2')]);
		const zipped = value(await from.backup()).blob;
		const text = await new Response(zipped.stream().pipeThrough(new DecompressionStream('gzip'))).text();
		const on = device();
		const book = await opened(on);
		const before = await contentOf(on);
		const spoiled = spoil(text);
		const found = problem(await book.previewBackup(typeof spoiled === 'string' ? new Blob([spoiled]) : spoiled));
		expect(await contentOf(on)).toBe(before);
		return found;
	}
	it('backup-not-ours: a picture', async () => {
		expect(await refused(() => new Blob([new Uint8Array([0xff, 0xd8, 0xff, 0xe0])]))).toEqual({ kind: 'backup-not-ours' });
	});
	it('backup-cut-short: a copy that was broken off', async () => {
		expect(await refused((text) => text.slice(0, -40))).toEqual({ kind: 'backup-cut-short', line: 3 });
	});
	it('backup-damaged: one letter of a name', async () => {
		expect(await refused((text) => text.replace('"name":"lot"', '"name":"lost"'))).toEqual({ kind: 'backup-damaged', line: 2, what: 'hash' });
	});
	it('backup-newer: a file of a newer app', async () => {
		expect(await refused((text) => text.replace('"version":1}\n', '"version":2}\n'))).toEqual({ kind: 'backup-newer', what: 'file', version: 2, known: 1 });
	});
	it('backup-differs: a record that was written anew under its old id', async () => {
		const from = await opened();
		const [first] = await saved(from, [lotChange('lot-1')]);
		const file = value(await from.backup());
		const book = await opened();
		const bare = { ...first!, at: 5 };
		value(await book.merge([{ ...bare, hash: await hashOf(bare) }]));
		expect(problem(await book.previewBackup(file.blob))).toEqual({ kind: 'backup-differs', record: first!.id });
	});
	it('backup-cancelled: stopped by the person', async () => {
		const stop = new AbortController();
		stop.abort();
		expect(problem(await (await opened()).backup({ signal: stop.signal }))).toEqual({ kind: 'backup-cancelled' });
	});
	it('backup-not-verified: the card gives back something else', async () => {
		const book = await opened();
		const inner = blobTarget();
		const target = { write: inner.write, end: async () => (await inner.end()).slice(5) };
		expect(problem(await book.backup({ target })).kind).toBe('backup-not-verified');
	});
});
