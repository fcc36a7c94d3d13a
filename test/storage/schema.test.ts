import { IDBDatabase as FakeDatabase } from 'fake-indexeddb';
import { describe, expect, it, vi } from 'vitest';
import { makePhoto } from '../../src/storage/photos.ts';
import { BookDatabase, NATIVE_VERSION } from '../../src/storage/schema.ts';
import { device, lotChange, opened, purchaseChange, saved, value } from './some-books.ts';

describe('every write of every kind', () => {
	it('is strict: the platform is asked to put it on the medium', async () => {
		const spy = vi.spyOn(FakeDatabase.prototype, 'transaction');
		const book = await opened();
		const photo = await makePhoto(new Uint8Array([1, 2, 3]).buffer, 'image/jpeg');
		await saved(book, [lotChange('lot-1'), purchaseChange('b-1')], { photos: [photo] });
		value(await book.setDraft('counter', 1));
		value(await book.removeDraft('counter'));
		const file = value(await book.backup());
		value(await book.handedOver(file));
		value(await book.rebuild());
		const other = await opened();
		value(await other.restore(value(await other.previewBackup(file.blob))));
		value(await other.merge((await book.history('lot-1')).slice()));
		const writes = spy.mock.calls.filter(([, mode]) => mode === 'readwrite');
		spy.mockRestore();
		// two new books, an act, two drafts, a backup, a rebuilding, photos and records of a restore
		expect(writes.length).toBeGreaterThanOrEqual(9);
		for (const [, , options] of writes) expect(options).toEqual({ durability: 'strict' });
	});
});

describe('the tables of version 1', () => {
	it('are these, for good: a release may add to them and never takes one away', async () => {
		const on = device();
		const db = new BookDatabase('meltbook', on);
		await db.open();
		expect(db.backendDB().version).toBe(NATIVE_VERSION);
		expect(db.tables.map(({ name, schema }) => [name, schema.primKey.src, ...schema.indexes.map(({ src }) => src)]).sort()).toEqual([
			['book', 'key'],
			['current', 'subject', '[shelf+order+subject]', 'conflict'],
			['damaged', 'key'],
			['drafts', 'key'],
			['onlyHere', 'subject'],
			['photos', 'id'],
			['records', 'id', 'subject'],
			['sums', 'lot', '*scales']
		]);
		db.close();
	});
});
