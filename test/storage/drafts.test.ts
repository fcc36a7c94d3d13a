import { describe, expect, it } from 'vitest';
import { device, lotChange, opened, saved, value } from './some-books.ts';

describe('drafts', () => {
	it('survive a reload, are replaced and removed, and are no records', async () => {
		const on = device();
		const book = await opened(on);
		value(await book.setDraft('counter/mass', { typed: '12.' }));
		value(await book.setDraft('counter/mass', { typed: '12.4' }));
		value(await book.setDraft('pay', ['Ada']));
		book.close();
		const again = await opened(on);
		expect(await again.getDraft('counter/mass')).toEqual({ typed: '12.4' });
		expect((await again.listDrafts('counter/')).map(({ key }) => key)).toEqual(['counter/mass']);
		expect(await again.listDrafts()).toHaveLength(2);
		value(await again.removeDraft('pay'));
		expect(await again.getDraft('pay')).toBeNull();
		expect((await again.counts()).records).toBe(0);
	});
	it('stay when the act that uses them up is refused', async () => {
		const book = await opened();
		const [first] = await saved(book, [lotChange('lot-1')]);
		value(await book.setDraft('lot', 'half typed'));
		expect((await book.append([lotChange('lot-1')], { draft: 'lot' })).ok).toBe(false);
		expect(await book.getDraft('lot')).toBe('half typed');
		await saved(book, [lotChange('lot-1', { name: 'x' }, first!.id)], { draft: 'lot' });
		expect(await book.getDraft('lot')).toBeNull();
	});
});
