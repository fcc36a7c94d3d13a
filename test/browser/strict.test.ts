import type { Page } from 'playwright-core';
import { expect, it } from 'vitest';
import { startSite, visit } from './visits.ts';

// "Saved" means on the medium. IndexedDB's default durability is relaxed, so every transaction that writes must ask for strict.

type Asked = { readonly stores: readonly string[]; readonly durability: string };

/** Notes what every writing transaction of a page asks of the platform, before any script of ours runs. */
async function listen(page: Page): Promise<void> {
	await page.addInitScript(() => {
		const asked: Asked[] = JSON.parse(sessionStorage.getItem('asked') ?? '[]') as Asked[];
		const platform = IDBDatabase.prototype.transaction;
		IDBDatabase.prototype.transaction = function (this: IDBDatabase, stores, mode, options) {
			const made = platform.call(this, stores, mode, options);
			if (mode === 'readwrite') {
				asked.push({ stores: [...made.objectStoreNames], durability: made.durability });
				sessionStorage.setItem('asked', JSON.stringify(asked));
			}
			return made;
		};
	});
}

it('asks for strict durability in every transaction that writes, whatever a person does', async () => {
	const site = await startSite();
	const { page } = await visit(site);
	await listen(page);
	const said = (text: string) => page.getByRole('status').getByText(text).waitFor();
	await page.goto(site.url('/'));

	await page.getByRole('link', { name: 'Type prices' }).click();
	await page.getByRole('textbox', { name: 'Gold', exact: true }).fill('4186.20');
	await page.getByRole('button', { name: 'Save prices' }).click();
	await said('Prices saved.');
	await page.getByRole('link', { name: 'Counter' }).click();
	const line = page.getByLabel('Mass, mark, article and count of a piece');
	for (const text of ['14k ring 3.10 g', '18k chain 9 g']) {
		await line.fill(text);
		await page.waitForTimeout(500);
		await line.press('Enter');
		await said('added.');
	}
	await page.getByRole('button', { name: 'Undo' }).click();
	await said('Taken back.');

	await page.getByRole('link', { name: /14 kt ring/ }).click();
	await page.getByLabel('Note').fill('a bent shank');
	await page.locator('input[type=file]').setInputFiles({ name: 'ring.png', mimeType: 'image/png', buffer: PIXEL });
	await said('Photo added.');
	await page.getByRole('button', { name: 'Save', exact: true }).click();
	await said('changed.');

	await page.getByRole('button', { name: 'Buy' }).click();
	await page.getByLabel('Seller').fill('Orla Quennell');
	await page.getByRole('button', { name: 'Pay and save' }).click();
	await page.getByRole('heading', { name: 'Purchase A-0001' }).waitFor();

	await page.goto(site.url('/book/backup'));
	await page.getByRole('button', { name: /backup/i }).first().click();
	await page.getByRole('link', { name: 'Counter' }).click();
	await line.waitFor();

	const asked = await page.evaluate(() => JSON.parse(sessionStorage.getItem('asked') ?? '[]') as Asked[]);
	const acts = asked.filter(({ stores }) => stores.includes('records'));
	expect(acts.length).toBeGreaterThanOrEqual(7);
	expect(acts.some(({ stores }) => stores.includes('photos'))).toBe(true);
	expect(asked.filter(({ durability }) => durability !== 'strict')).toEqual([]);
});

/** One grey pixel: the smallest picture that a browser can read. */
const PIXEL = Buffer.from('iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAAAAAA6fptVAAAACklEQVR4nGNoAAAAggCBd81ytgAAAABJRU5ErkJggg==', 'base64');
