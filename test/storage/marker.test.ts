import { describe, expect, it } from 'vitest';
import { IDBFactory } from 'fake-indexeddb';
import { openBook, removeBook } from '../../src/storage/book.ts';
import { compareMarker, readMarker, removeMarker, writeMarker } from '../../src/storage/marker.ts';
import { device, lotChange, opened, saved, value, type Device } from './some-books.ts';

/** The same browser after it has thrown the database away. */
const wiped = (on: Device): Device => Object.assign(device({ outside: on.outside }), { indexedDB: new IDBFactory() });
const markerOf = async (on: Device) => {
	const { book, marker } = value(await openBook('meltbook', on));
	return { book, marker };
};

describe('the marker outside the database', () => {
	it('tells a new book, one as it was left, and one that was thrown away', async () => {
		const on = device();
		const first = await markerOf(on);
		expect(first.marker).toEqual({ state: 'new' });
		await saved(first.book, [lotChange('lot-1'), lotChange('lot-2')]);
		first.book.close();
		expect((await markerOf(on)).marker).toEqual({ state: 'as-left' });
		expect((await markerOf(wiped(on))).marker).toEqual({ state: 'wiped', records: 2 });
	});
	it('goes on telling of the lost book until the person says that it is known', async () => {
		const on = device();
		await saved(await opened(on), [lotChange('lot-1'), lotChange('lot-2')]);
		const after = wiped(on);
		const { book } = await markerOf(after);
		await saved(book, [lotChange('lot-3')]);
		expect((await markerOf(after)).marker).toEqual({ state: 'wiped', records: 2 });
		book.acceptMarker();
		expect((await markerOf(after)).marker).toEqual({ state: 'as-left' });
	});
	it('is content once a backup of the lost book is restored', async () => {
		const on = device();
		const lost = await opened(on);
		await saved(lost, [lotChange('lot-1')]);
		const file = value(await lost.backup());
		const after = wiped(on);
		const { book } = await markerOf(after);
		value(await book.restore(value(await book.previewBackup(file.blob))));
		expect((await markerOf(after)).marker).toEqual({ state: 'as-left' });
	});
	it('tells when the book holds fewer records than before', () => {
		const database = 'd';
		expect(compareMarker({ database, records: 9 }, { database, records: 4 })).toEqual({ state: 'fewer', records: 9, found: 4 });
		expect(compareMarker({ database, records: 4 }, { database, records: 9 })).toEqual({ state: 'as-left' });
		expect(compareMarker(null, { database, records: 9 })).toEqual({ state: 'as-left' });
	});
	it('goes with a book that is removed on purpose', async () => {
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('lot-1')]);
		book.close();
		value(await removeBook('meltbook', on));
		expect(on.kept.size).toBe(0);
		expect((await markerOf(on)).marker).toEqual({ state: 'new' });
	});
	it.each(['', 'nonsense', '[]', '{"database":7,"records":1}', '{"database":"d","records":1.5}'])('is nothing when it reads %j', (text) => {
		expect(readMarker({ getItem: () => text, setItem: () => undefined, removeItem: () => undefined }, 'meltbook')).toBeNull();
	});
	it('that cannot be kept costs only the warning', async () => {
		const refuse = () => {
			throw new DOMException('forbidden', 'SecurityError');
		};
		const outside = { getItem: refuse, setItem: refuse, removeItem: refuse };
		writeMarker(outside, 'meltbook', { database: 'd', records: 1 });
		removeMarker(outside, 'meltbook');
		expect(readMarker(outside, 'meltbook')).toBeNull();
		const book = await opened(device({ outside }));
		await saved(book, [lotChange('lot-1')]);
		await saved(await opened(device({ outside: null })), [lotChange('lot-1')]);
	});
});
