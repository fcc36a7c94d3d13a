import { describe, expect, it } from 'vitest';
import { rowOf } from '../../src/storage/rows.ts';
import { frozen } from '../trade/record/kinds/frozen.ts';
import { contentOf, device, lotChange, opened, pieceChange, problem, purchaseChange, raw, saved, value } from './some-books.ts';

describe('taking back', () => {
	it('removes what an act added, and brings back what it changed or removed', async () => {
		const book = await opened();
		const [lot, piece] = await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g')]);
		const act = await saved(book, [
			lotChange('lot-1', { name: 'renamed' }, lot!.id),
			{ kind: 'piece', subject: 'p-1', body: null, replaces: piece!.id },
			pieceChange('p-2', 'lot-1', '925 fork 50g', 2)
		]);
		const undone = await saved(book, value(await book.undoOf(act.map(({ id }) => id))));
		expect((await book.get('lot', 'lot-1'))?.body?.name).toBe('lot');
		expect(await book.lotKeys('lot-1')).toEqual(['p-1']);
		expect((await book.lot('lot-1'))!.sums.gross.toFixed()).toBe('3.2');
		// and taking back the taking back brings the act again
		await saved(book, value(await book.undoOf(undone.map(({ id }) => id))));
		expect((await book.get('lot', 'lot-1'))?.body?.name).toBe('renamed');
		expect(await book.lotKeys('lot-1')).toEqual(['p-2']);
		expect(await book.check()).toEqual([]);
	});
	it('of a purchase keeps its number taken, and brings it back with it', async () => {
		const book = await opened();
		const [bought] = await saved(book, [purchaseChange('b-1')]);
		const [back] = await saved(book, value(await book.undoOf([bought!.id])));
		expect(await book.purchases(9)).toEqual([]);
		expect((await book.counts()).purchasesOnlyHere).toBe(0);
		await saved(book, [purchaseChange('b-2')]);
		await saved(book, value(await book.undoOf([back!.id])));
		expect((await book.purchases(9)).map(({ body }) => body?.number).sort()).toEqual(['A-0001', 'A-0002']);
		expect((await book.counts()).purchasesOnlyHere).toBe(2);
	});
	it('is refused as a whole when one of its things was changed since', async () => {
		const on = device();
		const book = await opened(on);
		const act = await saved(book, [lotChange('lot-1'), lotChange('lot-2')]);
		await saved(book, [lotChange('lot-2', { name: 'later' }, act[1]!.id)]);
		const before = await contentOf(on);
		expect(problem(await book.undoOf(act.map(({ id }) => id)))).toMatchObject({ kind: 'storage-changed-since', subject: 'lot-2' });
		expect(await contentOf(on)).toBe(before);
	});
	it('is refused when what was before is gone or cannot be read', async () => {
		const on = device();
		const book = await opened(on);
		const [first] = await saved(book, [lotChange('lot-1')]);
		const [second] = await saved(book, [lotChange('lot-1', { name: 'later' }, first!.id)]);
		const db = await raw(on);
		await db.records.put({ ...first!, body: { colour: 'red' } });
		expect(problem(await book.undoOf([second!.id]))).toEqual({ kind: 'storage-no-such-record', record: first!.id });
		await db.records.delete(first!.id);
		expect(problem(await book.undoOf([second!.id]))).toEqual({ kind: 'storage-no-such-record', record: first!.id });
		db.close();
	});
	it('of the first change since an older release brings back what that release wrote, in the form of today', async () => {
		const on = device();
		const book = await opened(on);
		const old = frozen('settings', 1);
		const db = await raw(on);
		await db.records.put(old);
		await db.current.put({ ...rowOf([old]) });
		db.close();
		const before = (await book.settings())!;
		expect(before.damage).toBeNull();
		const kept = before.body!;
		expect([kept.currency, kept.mark, kept.prudence, kept.testCosts, kept.priors]).toEqual(['EUR', 'comma', 0.8, {}, {}]);
		const [changed] = await saved(book, [{ kind: 'settings', subject: 'settings', body: { ...kept, prudence: 0.9 }, replaces: before.record }]);
		expect([changed!.version, (await book.settings())?.body?.prudence]).toEqual([2, 0.9]);
		const [back] = await saved(book, value(await book.undoOf([changed!.id])));
		expect(back!.version).toBe(2);
		expect((await book.settings())?.body).toEqual(kept);
	});
});
