import { describe, expect, it, vi } from 'vitest';
import { openBook } from '../../src/storage/book.ts';
import { openSession, versionFound } from '../../src/storage/open.ts';
import { StorageFailure } from '../../src/storage/problem.ts';
import { NATIVE_VERSION } from '../../src/storage/schema.ts';
import type { BookEvent } from '../../src/storage/watch.ts';
import { contentOf, device, lotChange, opened, problem, raw, saved, value, type Device } from './some-books.ts';

/** What a newer app would do to the tables: one more store, a higher version. */
function upgrade(on: Device, version = 70): Promise<IDBDatabase> {
	return new Promise((resolve, reject) => {
		const request = on.indexedDB.open('meltbook', version);
		request.onupgradeneeded = () => void request.result.createObjectStore('melts', { keyPath: 'id' });
		request.onsuccess = () => resolve(request.result);
		request.onerror = () => reject(request.error);
		request.onblocked = () => reject(new Error('blocked'));
	});
}

/** A browser that cannot list its databases. */
const listless = (on: Device): Device => {
	const factory = Object.create(on.indexedDB) as IDBFactory;
	Object.defineProperty(factory, 'databases', { value: undefined });
	Object.defineProperty(factory, 'open', { value: (...args: [string, number?]) => on.indexedDB.open(...args) });
	return { ...on, indexedDB: factory };
};

describe('the version of a book', () => {
	it.each([
		['listing', (on: Device) => on],
		['opening', listless]
	])('is found by %s, and asking makes nothing', async (_, as) => {
		const on = device();
		expect(await versionFound('meltbook', as(on))).toBe(0);
		expect(await on.indexedDB.databases()).toEqual([]);
		await opened(on);
		expect(await versionFound('meltbook', as(on))).toBe(NATIVE_VERSION);
	});
	it('is found by opening where listing is refused', async () => {
		const on = device();
		await opened(on);
		vi.spyOn(on.indexedDB, 'databases').mockRejectedValue(new DOMException('private', 'UnknownError'));
		expect(await versionFound('meltbook', on)).toBe(NATIVE_VERSION);
	});
});

describe('a book of a newer app', () => {
	it.each([
		['listed', (on: Device) => on],
		['not listed', listless]
	])('can be read and exported, and is not written (%s)', async (_, as) => {
		const on = device();
		const before = await opened(on);
		await saved(before, [lotChange('lot-1')]);
		before.close();
		(await upgrade(on)).close();
		const { book, readOnly } = value(await openBook('meltbook', as(on)));
		expect(readOnly).toEqual({ kind: 'storage-newer', found: 7, known: 1 });
		expect((await book.openLots()).map(({ subject }) => subject)).toEqual(['lot-1']);
		expect(problem(await book.append([lotChange('lot-2')]))).toEqual(readOnly);
		expect(problem(await book.setDraft('a', 1))).toEqual(readOnly);
		expect(problem(await book.rebuild())).toEqual(readOnly);
		expect(problem(await book.merge([]))).toEqual(readOnly);
		const file = value(await book.backup());
		expect(file.records).toBe(1);
		expect(problem(await book.handedOver(file))).toEqual(readOnly);
		book.close();
		// not a byte of it changed, and its tables are still the newer ones
		expect(await versionFound('meltbook', on)).toBe(70);
		const other = device();
		const restored = await opened(other);
		value(await restored.restore(value(await restored.previewBackup(file.blob))));
		expect((await restored.openLots()).map(({ subject }) => subject)).toEqual(['lot-1']);
	});
	it('is not written even by code that forgets to ask', async () => {
		const on = device();
		(await opened(on)).close();
		(await upgrade(on)).close();
		const session = await openSession('meltbook', on);
		await expect(session.use((db) => db.table('records').put({ id: 'x' }))).rejects.toThrow('a newer book is only read');
		await expect(session.use((db) => db.table('records').clear())).rejects.toThrow('a newer book is only read');
		session.close();
	});
	it('is noticed at every opening, also when it became newer between the look and the opening', async () => {
		const on = device();
		(await opened(on)).close();
		const databases = on.indexedDB.databases.bind(on.indexedDB);
		vi.spyOn(on.indexedDB, 'databases').mockImplementationOnce(async () => {
			const found = await databases();
			(await upgrade(on)).close();
			return found;
		});
		expect(problem(await openBook('meltbook', on))).toEqual({ kind: 'storage-newer', found: 7, known: 1 });
		expect(await versionFound('meltbook', on)).toBe(70);
	});
});

describe('a newer app in another tab', () => {
	it('closes this page’s book for good and says so', async () => {
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('lot-1')]);
		const events: BookEvent[] = [];
		book.onEvent((event) => events.push(event));
		const newer = await upgrade(on);
		await vi.waitFor(() => expect(events).toEqual([{ kind: 'superseded' }]));
		expect(problem(await book.append([lotChange('lot-2')]))).toEqual({ kind: 'storage-superseded' });
		await expect(book.openLots()).rejects.toMatchObject({ problem: { kind: 'storage-superseded' } });
		await expect(book.openLots()).rejects.toBeInstanceOf(StorageFailure);
		newer.close();
		// nothing opens it again behind the person's back
		expect(problem(await book.append([lotChange('lot-2')]))).toEqual({ kind: 'storage-superseded' });
		expect(await versionFound('meltbook', on)).toBe(70);
	});
});

describe('no database', () => {
	it('is a problem with a name', async () => {
		expect(problem(await openBook('meltbook', device({ indexedDB: undefined as unknown as IDBFactory })))).toMatchObject({ kind: 'storage-unavailable' });
		const on = device();
		vi.spyOn(on.indexedDB, 'databases').mockResolvedValue([]);
		vi.spyOn(on.indexedDB, 'open').mockImplementation(() => {
			throw new DOMException('denied', 'SecurityError');
		});
		expect(problem(await openBook('meltbook', on))).toMatchObject({ kind: 'storage-unavailable' });
	});
});

describe('two books', () => {
	it('share nothing', async () => {
		const on = device();
		const [own, demo] = [await opened(on), await opened(on, 'meltbook-demo')];
		await saved(demo, [lotChange('lot-1')]);
		expect(await own.openLots()).toEqual([]);
		expect((await demo.openLots()).length).toBe(1);
		expect([...on.kept.keys()]).toEqual(['meltbook-demo:marker']);
	});
});

describe('an empty book', () => {
	it('is made once, however many tabs open it at the same time', async () => {
		const on = device();
		const books = await Promise.all([opened(on), opened(on), opened(on)]);
		await saved(books[0]!, [lotChange('lot-1')]);
		await saved(books[2]!, [lotChange('lot-2')]);
		const db = await raw(on);
		expect(new Set((await db.records.toArray()).map(({ device: by }) => by)).size).toBe(1);
		db.close();
		expect(await books[1]!.check()).toEqual([]);
		expect(await contentOf(on)).toContain('lot-2');
	});
});
