import { describe, expect, it } from 'vitest';
import { makePhoto } from '../../src/storage/photos.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';
import { contentOf, device, lotChange, opened, pieceChange, purchaseChange, raw, saved, value, type Device } from './some-books.ts';
import type { BookDatabase } from '../../src/storage/schema.ts';

async function book() {
	const on = device();
	const made = await opened(on);
	const records = [
		...(await saved(made, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g'), pieceChange('p-2', 'lot-1', '925 fork 50g')])),
		...(await saved(made, [purchaseChange('b-1')])),
		...(await saved(made, [purchaseChange('b-2')]))
	];
	return { on, made, records };
}

async function spoil(on: Device, act: (db: BookDatabase) => Promise<unknown>): Promise<void> {
	const db = await raw(on);
	await act(db);
	db.close();
}

describe('a check of the book', () => {
	it('finds nothing in a whole one', async () => {
		const { made } = await book();
		expect(await made.check()).toEqual([]);
	});
	it('names every record that was changed, whatever was changed in it', async () => {
		for (const change of [{ at: 7 }, { subject: 'lot-9' }, { body: null }, { hash: 'f'.repeat(64) }, { settles: ['x'] }, { version: 0 }]) {
			const { on, made, records } = await book();
			await spoil(on, (db) => db.records.put({ ...records[1]!, ...change } as never));
			const findings = await made.check();
			expect(findings[0], JSON.stringify(change)).toMatchObject({ kind: 'check-record-changed', record: records[1]!.id });
		}
	});
	it('names the record after each one that is missing, and the last one that is there when the end is', async () => {
		for (let gone = 0; gone < 5; gone += 1) {
			const { on, made, records } = await book();
			await spoil(on, (db) => db.records.delete(records[gone]!.id));
			const findings = await made.check();
			const device = records[0]!.device;
			expect(findings).toContainEqual(
				gone === 4
					? { kind: 'check-record-missing', device, after: records[3]!.id }
					: { kind: 'check-record-before-missing', device, record: records[gone + 1]!.id }
			);
			// the subject of it is in what stands and in no record any more
			expect(findings).toContainEqual({ kind: 'check-current-differs', subject: records[gone]!.subject });
		}
	});
	it('names what stands otherwise than the records say, and a rebuilding puts it right', async () => {
		const { on, made } = await book();
		const whole = await contentOf(on);
		await spoil(on, async (db) => {
			const row = (await db.current.get('lot-1'))!;
			await db.current.put({ ...row, body: { ...(row.body as object), name: 'forged' } });
			await db.current.delete('p-2');
			await db.current.put({ ...row, subject: 'ghost' });
			const sums = (await db.sums.get('lot-1'))!;
			await db.sums.put({ ...sums, sums: { ...(sums.sums as object), gross: '999' } });
		});
		expect((await made.check()).map((finding) => Object.values(finding).join(' ')).sort()).toEqual([
			'check-current-differs ghost',
			'check-current-differs lot-1',
			'check-current-differs p-2',
			'check-sums-differ lot-1'
		]);
		value(await made.rebuild());
		expect(await contentOf(on)).toBe(whole);
		expect(await made.check()).toEqual([]);
		// and the book goes on from there
		await saved(made, [pieceChange('p-3', 'lot-1', '585 chain 8g')]);
		expect((await made.lot('lot-1'))!.sums.gross.toFixed()).toBe('61.2');
		expect(await made.check()).toEqual([]);
	});
	it('names photos that are damaged or missing', async () => {
		const on = device();
		const made = await opened(on);
		const photos = await Promise.all([1, 2, 3].map((n) => makePhoto(new Uint8Array([n]).buffer, 'image/jpeg')));
		const piece = { ...pieceOf('14k ring 3.2g'), photos: photos.map(({ id }) => id) };
		await saved(made, [{ kind: 'piece', subject: 'p-1', body: { lot: 'lot-1', order: 1, piece }, replaces: null }], { photos });
		expect(await made.check()).toEqual([]);
		await spoil(on, async (db) => {
			await db.photos.put({ ...photos[0]!, bytes: new Uint8Array([9]).buffer });
			await db.photos.delete(photos[1]!.id);
		});
		expect(await made.check()).toEqual([
			{ kind: 'check-photo-damaged', photo: photos[0]!.id },
			{ kind: 'check-photo-missing', photo: photos[1]!.id, subject: 'p-1' }
		]);
	});
	it('names purchase numbers that are there twice or left out', async () => {
		const { on, made, records } = await book();
		const other = await opened();
		await saved(other, [purchaseChange('b-9')]);
		value(await made.merge(await other.history('b-9')));
		expect(await made.check()).toEqual([{ kind: 'check-number-twice', number: 'A-0001' }]);
		await spoil(on, async (db) => {
			await db.records.delete(records[3]!.id);
			await db.records.delete((await db.records.where('subject').equals('b-9').first())!.id);
		});
		expect(await made.check()).toContainEqual({ kind: 'check-number-missing', letter: 'A', count: 1 });
	});
	it('can be stopped', async () => {
		const { made } = await book();
		const stop = new AbortController();
		stop.abort();
		await expect(made.check({ signal: stop.signal })).rejects.toMatchObject({ problem: { kind: 'backup-cancelled' } });
	});
});
