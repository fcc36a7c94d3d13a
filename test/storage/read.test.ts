import { describe, expect, it, vi } from 'vitest';
import { IDBObjectStore as FakeStore, IDBIndex as FakeIndex } from 'fake-indexeddb';
import { decimal } from '../../src/trade/number/decimal.ts';
import { defaultSettings } from '../../src/trade/record/kinds/settings.ts';
import type { BookEvent } from '../../src/storage/watch.ts';
import { device, lotBody, lotChange, opened, pieceChange, purchaseChange, raw, saved, sheet, START, value } from './some-books.ts';

describe('reading', () => {
	it('an empty book finds nothing and fails nowhere', async () => {
		const book = await opened();
		expect(await book.latestSheet()).toBeNull();
		expect(await book.settings()).toBeNull();
		expect(await book.lot('none')).toBeNull();
		expect(await book.get('lot', 'none')).toBeNull();
		expect(await book.standing('none')).toBeNull();
		expect(await book.lotKeys('none')).toEqual([]);
		expect(await book.lastOrder('none')).toBe(0);
		const lists = [book.openLots(), book.stock(), book.purchases(9), book.scales(), book.testers(), book.conflicts()];
		expect(await Promise.all<readonly unknown[]>(lists)).toEqual(lists.map(() => []));
		expect(await book.counts()).toEqual({ records: 0, purchasesOnlyHere: 0, conflicts: 0, photos: 0, damaged: 0, lastBackup: null, letter: 'A' });
	});
	it('a lot keeps its pieces in their order, with places between them', async () => {
		const book = await opened();
		await saved(book, [lotChange('lot-1'), lotChange('lot-2')]);
		await saved(book, [
			pieceChange('p-a', 'lot-1', '14k ring 1g', 2),
			pieceChange('p-b', 'lot-1', '14k ring 2g', 1),
			pieceChange('p-c', 'lot-2', '14k ring 3g', 1),
			pieceChange('p-d', 'lot-1', '14k ring 4g', 1.5),
			pieceChange('p-e', 'lot-1', '14k ring 5g', -3)
		]);
		expect(await book.lotKeys('lot-1')).toEqual(['p-e', 'p-b', 'p-d', 'p-a']);
		expect(await book.lastOrder('lot-1')).toBe(2);
		expect((await book.pieces(['p-d', 'gone', 'p-b'])).map((entry) => entry?.subject ?? null)).toEqual(['p-d', null, 'p-b']);
		expect((await book.lot('lot-1'))!.sums.entries).toBe(4);
	});
	it('lots stand on the shelf of their state, with their sums', async () => {
		const book = await opened();
		const [lot] = await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '925 fork 50g'), lotChange('lot-2', { state: 'set-aside' })]);
		await saved(book, [lotChange('lot-1', { state: 'bought', purchase: 'b-1' }, lot!.id), purchaseChange('b-1')]);
		expect(await book.openLots()).toEqual([]);
		expect((await book.setAsideLots()).map(({ subject }) => subject)).toEqual(['lot-2']);
		const [bought] = await book.stock();
		expect(bought!.lot.body).toEqual(lotBody({ state: 'bought', purchase: 'b-1' }));
		expect(bought!.sums.net.toFixed()).toBe('50');
	});
	it('the latest price sheet is the one of the latest moment, not the last typed', async () => {
		const book = await opened();
		const at = (moment: number) => ({ kind: 'prices', subject: `sheet-${moment}`, body: { ...sheet, at: moment }, replaces: null }) as const;
		await saved(book, [at(START + 5), at(START + 9), at(START + 1)]);
		expect((await book.latestSheet())?.subject).toBe(`sheet-${START + 9}`);
		expect((await book.sheets(2)).map(({ subject }) => subject)).toEqual([`sheet-${START + 9}`, `sheet-${START + 5}`]);
	});
	it('purchases come newest first, a page at a time, also those of one moment', async () => {
		const book = await opened();
		for (let n = 0; n < 7; n += 1) await saved(book, [purchaseChange(`b-${n}`, 'lot-1', { boughtAt: START + (n >> 1) })]);
		const seen: string[] = [];
		let end: { boughtAt: number; subject: string } | null = null;
		for (;;) {
			const page = await book.purchases(3, end);
			if (page.length === 0) break;
			seen.push(...page.map(({ subject }) => subject));
			const last = page.at(-1)!;
			end = { boughtAt: last.body!.boughtAt, subject: last.subject };
		}
		expect(seen).toEqual(['b-6', 'b-5', 'b-4', 'b-3', 'b-2', 'b-1', 'b-0']);
	});
	it('settings, scales and testers stand where they are looked for', async () => {
		const book = await opened();
		const scale = { id: 's', name: 'Counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: null, checkedOn: null } as const;
		const tester = { id: 't', name: 'Acids', kind: 'acids', rows: [{ metal: 'Au', colour: 'any', perMille: 585, u: 15 }], bias: 5, gross: 0.02, checkedOn: null } as const;
		await saved(book, [
			{ kind: 'settings', subject: 'settings', body: defaultSettings(), replaces: null },
			{ kind: 'scale', subject: 's', body: scale, replaces: null },
			{ kind: 'tester', subject: 't', body: tester, replaces: null }
		]);
		expect((await book.settings())?.body).toEqual(defaultSettings());
		expect((await book.scales()).map(({ body }) => body)).toEqual([scale]);
		expect((await book.testers()).map(({ body }) => body)).toEqual([tester]);
	});
	it('a window of a long lot reads that window only', async () => {
		const book = await opened();
		await saved(book, [lotChange('lot-1')]);
		await saved(book, Array.from({ length: 300 }, (_, n) => pieceChange(`p-${String(n).padStart(3, '0')}`, 'lot-1', '14k ring 1g', n)));
		const spies = [
			vi.spyOn(FakeStore.prototype, 'get'),
			vi.spyOn(FakeStore.prototype, 'getAll'),
			vi.spyOn(FakeIndex.prototype, 'getAll'),
			vi.spyOn(FakeIndex.prototype, 'openCursor')
		];
		const keys = await book.lotKeys('lot-1');
		await book.lot('lot-1');
		expect(await book.pieces(keys.slice(100, 120))).toHaveLength(20);
		const [get, ...whole] = spies.map((spy) => spy.mock.calls.length);
		for (const spy of spies) spy.mockRestore();
		expect(get).toBeLessThanOrEqual(22);
		expect(whole).toEqual([0, 0, 0]);
	});
});

describe('a damaged row', () => {
	it('is shown as damaged, announced, kept and counted apart; everything else is read', async () => {
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 1g', 1), pieceChange('p-2', 'lot-1', '14k ring 2g', 2)]);
		const db = await raw(on);
		const row = (await db.current.get('p-1'))!;
		await db.current.put({ ...row, body: { lot: 'lot-1', order: 1, piece: 'smudged' } });
		await db.sums.put({ lot: 'lot-1', sums: { gross: 'x' }, scales: [], damaged: [] });
		db.close();
		const events: BookEvent[] = [];
		book.onEvent((event) => events.push(event));
		const [one, two] = await book.pieces(await book.lotKeys('lot-1'));
		expect(one).toMatchObject({ subject: 'p-1', body: null, damage: { kind: 'record-body', at: 'piece', found: '"smudged"' }, raw: { piece: 'smudged' } });
		expect(two?.damage).toBeNull();
		const found = (await book.lot('lot-1'))!;
		expect([found.sums.gross.toFixed(), found.damaged]).toEqual(['2', ['p-1']]);
		await vi.waitFor(() => expect(events.map((event) => event.kind === 'damaged' && event.subject)).toEqual(['p-1', 'lot-1']));
		// writing over it works, and brings sums that hold
		await saved(book, [pieceChange('p-1', 'lot-1', '14k ring 1.5g', 1, await book.standing('p-1'))]);
		expect((await book.lot('lot-1'))!).toMatchObject({ damaged: [] });
		expect((await book.lot('lot-1'))!.sums.gross.toFixed()).toBe('3.5');
		expect(await book.check()).toEqual([]);
	});
	it('on the purchase shelf does not hide the other purchases', async () => {
		const on = device();
		const book = await opened(on);
		await saved(book, [purchaseChange('b-1'), purchaseChange('b-2')]);
		const db = await raw(on);
		const row = (await db.current.get('b-1'))!;
		await db.current.put({ ...row, body: { ...(row.body as object), paid: 12 } });
		db.close();
		expect((await book.purchases(9)).map(({ subject, damage }) => [subject, damage?.kind])).toEqual([
			['b-2', undefined],
			['b-1', 'record-body']
		]);
		const file = value(await book.backup());
		expect(file).toMatchObject({ records: 2, damaged: 0 });
	});
});
