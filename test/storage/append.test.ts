import { createHash } from 'node:crypto';
import { describe, expect, it, vi } from 'vitest';
import { IDBDatabase as FakeDatabase, IDBObjectStore as FakeStore, IDBVersionChangeEvent } from 'fake-indexeddb';
import { emptySums, addPieces } from '../../src/trade/lot/sums.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { canonicalText } from '../../src/trade/record/record.ts';
import { defaultSettings } from '../../src/trade/record/kinds/settings.ts';
import { newId } from '../../src/storage/ids.ts';
import { encodeSums } from '../../src/trade/lot/sums-stored.ts';
import { makePhoto } from '../../src/storage/photos.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';
import { contentOf, device, lotChange, opened, pieceChange, problem, purchaseChange, raw, saved, START, value } from './some-books.ts';

const bytes = (text: string) => new TextEncoder().encode(text).buffer as ArrayBuffer;
const sumsText = (sums: unknown) => JSON.stringify(sums, (_, held: unknown) => (typeof held === 'bigint' ? `${held}n` : held));

describe('one act', () => {
	it('writes records, what stands, sums, photos and the end of the draft in one strict transaction', async () => {
		const spy = vi.spyOn(FakeDatabase.prototype, 'transaction');
		const book = await opened();
		await book.setDraft('counter', { typed: '14k ring 3.2g' });
		const photo = await makePhoto(bytes('a picture'), 'image/jpeg');
		spy.mockClear();
		await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g')], { photos: [photo], draft: 'counter' });
		const writes = spy.mock.calls.filter(([, mode]) => mode === 'readwrite');
		spy.mockRestore();
		expect(writes).toHaveLength(1);
		expect(writes[0]![2]).toEqual({ durability: 'strict' });
		expect([...(writes[0]![0] as string[])].sort()).toEqual(['book', 'current', 'damaged', 'drafts', 'onlyHere', 'photos', 'records', 'sums']);
		expect(await book.getDraft('counter')).toBeNull();
		expect(await book.photo(photo.id)).toMatchObject({ state: 'whole' });
		expect((await book.lot('lot-1'))?.sums.gross.toFixed()).toBe('3.2');
		expect(await book.lotKeys('lot-1')).toEqual(['p-1']);
	});
	it('is all there or not at all', async () => {
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('lot-1')]);
		await book.setDraft('counter', 'half typed');
		const before = await contentOf(on);
		// the last write of the transaction fails, after every other one was accepted
		const put = FakeStore.prototype.put;
		const spy = vi.spyOn(FakeStore.prototype, 'put').mockImplementation(function (this: IDBObjectStore, row: unknown, key?: unknown) {
			if (this.name === 'book') throw new DOMException('no room', 'QuotaExceededError');
			return put.call(this, row, key as never);
		});
		const result = await book.append([pieceChange('p-1', 'lot-1', '14k ring 3.2g')], { draft: 'counter' });
		spy.mockRestore();
		expect(problem(result)).toMatchObject({ kind: 'storage-quota' });
		expect(await contentOf(on)).toBe(before);
		expect(await book.getDraft('counter')).toBe('half typed');
		// and the same act goes through afterwards
		await saved(book, [pieceChange('p-1', 'lot-1', '14k ring 3.2g')], { draft: 'counter' });
		expect(await book.getDraft('counter')).toBeNull();
	});
	it('answers after the transaction, not after its last request', async () => {
		const order: string[] = [];
		const real = FakeDatabase.prototype.transaction;
		const spy = vi.spyOn(FakeDatabase.prototype, 'transaction').mockImplementation(function (this: IDBDatabase, ...args) {
			const transaction = real.apply(this, args as never);
			if (args[1] === 'readwrite') transaction.addEventListener('complete', () => void order.push('on the medium'));
			return transaction;
		});
		const book = await opened();
		order.length = 0;
		expect((await book.append([lotChange('lot-1')])).ok).toBe(true);
		order.push('said so');
		spy.mockRestore();
		expect(order).toEqual(['on the medium', 'said so']);
	});
	it('chains each record to the one before it, by hashes that another route agrees with', async () => {
		const book = await opened();
		const records = [...(await saved(book, [lotChange('lot-1'), lotChange('lot-2')])), ...(await saved(book, [lotChange('lot-3')]))];
		expect(records.map(({ previous }) => previous)).toEqual([null, records[0]!.hash, records[1]!.hash]);
		for (const record of records) expect(createHash('sha256').update(canonicalText(record)).digest('hex')).toBe(record.hash);
	});
	it('refuses a change of something that was changed since', async () => {
		const book = await opened();
		const [first] = await saved(book, [lotChange('lot-1')]);
		const [second] = await saved(book, [lotChange('lot-1', { name: 'other' }, first!.id)]);
		expect(problem(await book.append([lotChange('lot-1', { name: 'third' }, first!.id)]))).toEqual({
			kind: 'storage-changed-since',
			subject: 'lot-1',
			expected: first!.id,
			found: second!.id
		});
		expect(problem(await book.append([lotChange('lot-1')]))).toMatchObject({ kind: 'storage-changed-since', expected: null });
		expect((await book.get('lot', 'lot-1'))?.body?.name).toBe('other');
	});
	it('stops at our own mistakes', async () => {
		const book = await opened();
		await expect(book.append([])).rejects.toThrow('an act that changes nothing');
		await expect(book.append([lotChange('a'), lotChange('a')])).rejects.toThrow('changes a subject twice');
	});
	it('deletes by a record, and keeps what was', async () => {
		const book = await opened();
		const [first] = await saved(book, [lotChange('lot-1')]);
		const [gone] = await saved(book, [{ kind: 'lot', subject: 'lot-1', body: null, replaces: first!.id }]);
		expect(await book.get('lot', 'lot-1')).toBeNull();
		expect(await book.openLots()).toEqual([]);
		expect((await book.history('lot-1')).map(({ id }) => id)).toEqual([first!.id, gone!.id]);
		expect(await book.standing('lot-1')).toBe(gone!.id);
	});
});

describe('the same act again', () => {
	it('is saved once', async () => {
		const on = device();
		const book = await opened(on);
		const act = newId(START);
		const changes = [lotChange('lot-1'), purchaseChange('b-1')];
		const once = await saved(book, changes, { act });
		const content = await contentOf(on);
		expect(await saved(book, changes, { act })).toEqual(once);
		expect(await contentOf(on)).toBe(content);
		expect((await book.purchases(9)).map(({ body }) => body?.number)).toEqual(['A-0001']);
	});
	it('with something else in it is refused', async () => {
		const book = await opened();
		const act = newId(START);
		await saved(book, [lotChange('lot-1')], { act });
		expect(problem(await book.append([lotChange('lot-1', { name: 'changed' })], { act }))).toEqual({ kind: 'storage-already-saved', act });
	});
	it('is harmless when the connection was lost after it was written', async () => {
		const on = device();
		const real = FakeDatabase.prototype.transaction;
		let written = 0;
		let lose = false;
		const spy = vi.spyOn(FakeDatabase.prototype, 'transaction').mockImplementation(function (this: IDBDatabase, ...args) {
			const transaction = real.apply(this, args as never);
			if (args[1] === 'readwrite' && lose) {
				lose = false;
				// the write is committed, and what the page hears instead is that the connection is gone
				transaction.addEventListener('complete', () => {
					written += 1;
					transaction.oncomplete = null;
					Object.defineProperty(transaction, 'error', { value: new DOMException('Connection to Indexed Database server lost', 'UnknownError') });
					transaction.onabort?.(new IDBVersionChangeEvent('abort') as never);
				});
			}
			return transaction;
		});
		const book = await opened(on);
		lose = true;
		const result = await book.append([purchaseChange('b-1')]);
		spy.mockRestore();
		expect(written).toBe(1);
		expect(value(result)).toHaveLength(1);
		const db = await raw(on);
		expect(await db.records.count()).toBe(1);
		expect((await db.book.get('book'))?.records).toBe(1);
		db.close();
	});
});

/** A database whose readwrite transactions cannot be opened while `broken()` says so. */
function breaking(broken: () => boolean) {
	const real = FakeDatabase.prototype.transaction;
	return vi.spyOn(FakeDatabase.prototype, 'transaction').mockImplementation(function (this: IDBDatabase, ...args) {
		if (args[1] === 'readwrite' && broken()) throw new DOMException('The database connection is closing.', 'InvalidStateError');
		return real.apply(this, args as never);
	});
}

describe('a lost connection', () => {
	it('is opened again and the same is written', async () => {
		let left = 0;
		const spy = breaking(() => left-- > 0);
		const book = await opened();
		await saved(book, [lotChange('lot-1')]);
		left = 1;
		await saved(book, [lotChange('lot-2')]);
		spy.mockRestore();
		expect(left).toBeLessThan(0);
		expect(await book.openLots()).toHaveLength(2);
	});
	it('is opened again after the database was closed under the page', async () => {
		const on = device();
		const spy = vi.spyOn(FakeDatabase.prototype, 'transaction');
		const book = await opened(on);
		const connection = spy.mock.contexts.at(-1) as IDBDatabase;
		spy.mockRestore();
		connection.close();
		await saved(book, [lotChange('lot-1')]);
		expect(await book.openLots()).toHaveLength(1);
	});
	it('that does not come back is a problem, and nothing was saved', async () => {
		const on = device();
		let broken = false;
		const spy = breaking(() => broken);
		const book = await opened(on);
		const before = await contentOf(on);
		broken = true;
		const result = await book.append([lotChange('lot-1')]);
		broken = false;
		expect(problem(result)).toMatchObject({ kind: 'storage-lost' });
		expect(await contentOf(on)).toBe(before);
		await saved(book, [lotChange('lot-1')]);
		spy.mockRestore();
	});
});

describe('purchase numbers', () => {
	it('have no gaps, whatever fails or is taken back in between', async () => {
		const book = await opened();
		const numbers: (string | null | undefined)[] = [];
		for (let n = 1; n <= 6; n += 1) {
			await book.append([purchaseChange(`b-${n}`, 'lot-1', {}, n === 3 ? 'not there' : null)]);
			if (n === 4) value(await book.append(value(await book.undoOf([(await book.standing('b-4'))!]))));
			numbers.push((await book.get('purchase', `b-${n}`))?.body?.number);
		}
		expect(numbers).toEqual(['A-0001', 'A-0002', undefined, undefined, 'A-0004', 'A-0005']);
		expect(await book.check()).toEqual([]);
	});
	it('stay with the purchase when it is corrected', async () => {
		const book = await opened();
		const [first] = await saved(book, [purchaseChange('b-1')]);
		await saved(book, [purchaseChange('b-1', 'lot-1', { means: 'transfer' }, first!.id)]);
		await saved(book, [purchaseChange('b-2'), purchaseChange('b-3')]);
		expect((await book.purchases(9)).map(({ body }) => [body?.number, body?.means])).toEqual([
			['A-0003', 'cash'],
			['A-0002', 'cash'],
			['A-0001', 'transfer']
		]);
	});
	it('are given once to two tabs that buy at the same moment, with or without locks between them', async () => {
		for (const locked of [true, false]) {
			const on = device();
			const other = { ...on, lock: locked ? on.lock : device().lock };
			const [a, b] = [await opened(on), await opened(other)];
			const acts = Array.from({ length: 12 }, (_, n) => (n % 2 === 0 ? a : b).append([purchaseChange(`b-${n}`)]));
			const results = await Promise.all(acts);
			const kept = results.filter(({ ok }) => ok).length;
			expect(results.filter(({ ok }) => !ok).every((result) => problem(result).kind === 'storage-busy')).toBe(true);
			expect(locked ? kept : 12).toBe(12);
			const numbers = (await a.purchases(99)).map(({ body }) => body!.number!).sort();
			expect(numbers).toEqual(Array.from({ length: kept }, (_, n) => `A-${String(n + 1).padStart(4, '0')}`));
			expect(await a.check()).toEqual([]);
		}
	});
});

describe('running sums', () => {
	it('are those of the pieces that stand, through every kind of change', async () => {
		const book = await opened();
		await saved(book, [lotChange('lot-1'), lotChange('lot-2')]);
		const [a, b] = await saved(book, [
			pieceChange('p-1', 'lot-1', '14k ring 3.2g', 1),
			pieceChange('p-2', 'lot-1', '925 fork 52.7g x3', 2),
			pieceChange('p-3', 'lot-1', 'brass fitting 120g', 3)
		]);
		await saved(book, [pieceChange('p-1', 'lot-1', '18k ring 3.25g', 1, a!.id)]);
		await saved(book, [pieceChange('p-2', 'lot-2', '925 fork 52.7g x3', 1, b!.id)]);
		await saved(book, [{ kind: 'piece', subject: 'p-3', body: null, replaces: (await book.standing('p-3'))! }]);
		const from = (entries: [string, string][]) => addPieces(emptySums(), entries.map(([key, line]) => ({ key, piece: pieceOf(line) })));
		const one = (await book.lot('lot-1'))!.sums;
		const two = (await book.lot('lot-2'))!.sums;
		expect(sumsText(encodeSums(one))).toBe(sumsText(encodeSums(from([['p-1', '18k ring 3.25g']]))));
		expect(sumsText(encodeSums(two))).toBe(sumsText(encodeSums(from([['p-2', '925 fork 52.7g x3']]))));
		expect(await book.check()).toEqual([]);
	});
	it('follow the scale and the spreads that are in them', async () => {
		const book = await opened();
		const scale = { id: 'scale-1', name: 'Counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null } as const;
		const piece = pieceOf('14k ring 3.2g');
		await saved(book, [
			lotChange('lot-1'),
			{ kind: 'piece', subject: 'p-1', body: { lot: 'lot-1', order: 1, piece: { ...piece, weighing: { ...piece.weighing, scale: 'scale-1' } } }, replaces: null }
		]);
		const without = sumsText((await book.lot('lot-1'))!.sums.shared);
		const [made] = await saved(book, [{ kind: 'scale', subject: 'scale-1', body: scale, replaces: null }]);
		const withScale = sumsText((await book.lot('lot-1'))!.sums.shared);
		expect(withScale).not.toBe(without);
		await saved(book, [{ kind: 'scale', subject: 'scale-1', body: { ...scale, verification: decimal('0.5') }, replaces: made!.id }]);
		expect(sumsText((await book.lot('lot-1'))!.sums.shared)).not.toBe(withScale);
		const spreads = { [piece.origin]: { shared: 0.5, own: 0.5 } };
		await saved(book, [{ kind: 'settings', subject: 'settings', body: { ...defaultSettings(), spreads }, replaces: null }]);
		expect(await book.check()).toEqual([]);
		await saved(book, [{ kind: 'piece', subject: 'p-1', body: null, replaces: (await book.standing('p-1'))! }]);
		expect(sumsText(encodeSums((await book.lot('lot-1'))!.sums))).toBe(sumsText(encodeSums(emptySums())));
	});
});

describe('ten thousand pieces at once', () => {
	it('are one act, with one reading and one writing of the sums', async () => {
		const on = device();
		const book = await opened(on);
		const lines = ['14k ring 3.2g', '925 fork 52.7g x3', '585 chain 8.15g', 'brass fitting 120g'];
		const pieces = lines.map(pieceOf);
		await saved(book, [lotChange('lot-1')]);
		const changes = Array.from({ length: 10_000 }, (_, n) => ({
			kind: 'piece' as const,
			subject: `p-${String(n).padStart(5, '0')}`,
			body: { lot: 'lot-1', order: n + 1, piece: pieces[n % 4]! },
			replaces: null
		}));
		const puts = vi.spyOn(FakeStore.prototype, 'put');
		await saved(book, changes);
		const sumsPuts = puts.mock.contexts.filter((store) => (store as IDBObjectStore).name === 'sums').length;
		puts.mockRestore();
		expect(sumsPuts).toBe(1);
		const keys = await book.lotKeys('lot-1');
		expect(keys).toHaveLength(10_000);
		expect(keys[9_999]).toBe('p-09999');
		// 2500 x (3.2 + 52.7 + 8.15 + 120)
		expect((await book.lot('lot-1'))!.sums.gross.toFixed()).toBe('460125');
		expect((await book.pieces(keys.slice(5_000, 5_050))).every((entry) => entry?.damage === null)).toBe(true);
	}, 120_000);
});
