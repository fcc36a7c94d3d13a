import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { makePhoto } from '../../src/storage/photos.ts';
import { device, lotChange, opened, raw, saved } from './some-books.ts';

describe('photos', () => {
	it('are named by their bytes and kept once', async () => {
		const bytes = new Uint8Array([1, 2, 3]);
		const photo = await makePhoto(bytes.buffer, 'image/jpeg');
		expect(photo.id).toBe(createHash('sha256').update(bytes).digest('hex'));
		const book = await opened();
		await saved(book, [lotChange('lot-1')], { photos: [photo] });
		await saved(book, [lotChange('lot-2')], { photos: [photo] });
		expect((await book.counts()).photos).toBe(1);
		expect(await book.photo(photo.id)).toEqual({ state: 'whole', photo });
	});
	it('are shown as damaged or missing, and nothing breaks', async () => {
		const on = device();
		const book = await opened(on);
		const [one, other] = [await makePhoto(new Uint8Array([1]).buffer, 'image/jpeg'), await makePhoto(new Uint8Array([2]).buffer, 'image/jpeg')];
		await saved(book, [lotChange('lot-1')], { photos: [one, other] });
		const db = await raw(on);
		await db.photos.put({ ...one, bytes: new Uint8Array([7, 7]).buffer });
		await db.photos.put({ ...other, bytes: 'no bytes at all' as never });
		db.close();
		expect(await book.photo(one.id)).toMatchObject({ state: 'damaged' });
		expect(await book.photo(other.id)).toMatchObject({ state: 'damaged' });
		expect(await book.photo('never')).toEqual({ state: 'missing' });
	});
});
