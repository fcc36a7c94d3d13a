import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Book } from '../../src/storage/book.ts';
import type { Changed } from '../../src/storage/watch.ts';
import { device, lotChange, opened, pieceChange, saved, value } from './some-books.ts';

const open: Book[] = [];
afterEach(() => {
	for (const book of open.splice(0)) book.close();
});
async function tab(on = device({ channel: (name) => new BroadcastChannel(name) })): Promise<Book> {
	const book = await opened(on);
	open.push(book);
	return book;
}

describe('watching', () => {
	it('hears of every committed act, in this tab and in others, and of nothing else', async () => {
		const on = device({ channel: (name) => new BroadcastChannel(name) });
		const [a, b] = [await tab(on), await tab(on)];
		const [here, there]: [Changed[], Changed[]] = [[], []];
		a.watch((changed) => here.push(changed));
		b.watch((changed) => there.push(changed));
		await saved(a, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g')]);
		await vi.waitFor(() => expect(there).toHaveLength(1));
		expect(here).toEqual([{ kinds: ['lot', 'piece'], lots: ['lot-1'], own: true }]);
		expect(there).toEqual([{ kinds: ['lot', 'piece'], lots: ['lot-1'], own: false }]);
		await a.append([lotChange('lot-1')]);
		value(await a.setDraft('counter', 1));
		value(await b.handedOver(value(await b.backup())));
		await vi.waitFor(() => expect(here).toHaveLength(2));
		expect(here[1]).toEqual({ kinds: ['backup'], lots: [], own: false });
	});
	it('sees what it hears of', async () => {
		const on = device({ channel: (name) => new BroadcastChannel(name) });
		const [a, b] = [await tab(on), await tab(on)];
		const seen = new Promise<number>((resolve) => b.watch(() => void b.openLots().then(({ length }) => resolve(length))));
		await saved(a, [lotChange('lot-1')]);
		expect(await seen).toBe(1);
	});
	it('ends when told so', async () => {
		const book = await tab();
		const fn = vi.fn();
		book.watch(fn)();
		await saved(book, [lotChange('lot-1')]);
		await new Promise((resolve) => setTimeout(resolve, 20));
		expect(fn).not.toHaveBeenCalled();
	});
});
