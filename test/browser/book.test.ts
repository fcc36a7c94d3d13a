import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { gunzipSync, gzipSync } from 'node:zlib';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, newProfile, shot, type Site } from './harness.ts';
import { startSite, visit as open } from './visits.ts';

/** A first visit, up to the word that it works offline. */
async function visit(at: Site): Promise<Page> {
	const { page } = await open(at);
	await page.goto(at.url('/'));
	const ready = page.locator('.banner').filter({ hasText: 'Ready for offline' }).getByRole('button', { name: 'Good' });
	await ready.click();
	await ready.waitFor({ state: 'detached' });
	return page;
}

const button = (page: Page, name: string) => page.getByRole('button', { name, exact: true });

/** Axe on the whole page: on a tall screen, so that nothing lies under what is fixed at the thumb. */
async function expectClean(page: Page, name: string): Promise<void> {
	const before = page.viewportSize();
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width: 390, height: height + 200 });
	await expectAccessible(page, name);
	if (before !== null) await page.setViewportSize(before);
	await expectNoSidewaysScroll(page, name);
}

async function openDemo(page: Page, host: Site): Promise<void> {
	await page.goto(host.url('/book'));
	await button(page, 'Look at a demo book').click();
	await page.getByText('A-0011').waitFor();
}

/** Makes a backup and gives back where the file lies. */
async function backUp(page: Page, host: Site, name: string): Promise<string> {
	await page.goto(host.url('/book/backup'));
	await button(page, 'Make a backup').click();
	await button(page, 'Save or share the file').waitFor();
	const [download] = await Promise.all([page.waitForEvent('download'), button(page, 'Save or share the file').click()]);
	const path = join(newProfile(), `${name}.jsonl.gz`);
	await download.saveAs(path);
	await page.getByText('Handed over').waitFor();
	return path;
}

async function restore(page: Page, host: Site, path: string): Promise<void> {
	await page.goto(host.url('/book/backup'));
	await joinFile(page, path);
}

async function joinFile(page: Page, path: string): Promise<void> {
	await page.getByLabel('Backup file').setInputFiles(path);
	await button(page, 'Join it to this book').click();
	await page.getByText(/^Restored: \d+ entries/).waitFor();
}

/** Everything that a book holds, read past the app. */
function dump(page: Page, name = 'meltbook'): Promise<Record<string, string>> {
	return page.evaluate(async (book) => {
		const done = <T>(request: IDBRequest<T>) =>
			new Promise<T>((resolve, reject) => {
				request.onsuccess = () => resolve(request.result);
				request.onerror = () => reject(request.error);
			});
		const db = await done(indexedDB.open(book));
		const found: Record<string, string> = {};
		for (const table of ['records', 'current', 'sums', 'photos']) {
			const rows = await done(db.transaction(table).objectStore(table).getAll());
			found[table] = JSON.stringify(rows, (_, value: unknown) => (typeof value === 'bigint' ? `${value}n` : value));
		}
		db.close();
		return found;
	}, name);
}

const databases = (page: Page) => page.evaluate(async () => (await indexedDB.databases()).map(({ name }) => name).sort());

describe('the demo book', () => {
	it('is offered by an empty book, is marked, shows every page clean, and leaves nothing behind', async () => {
		const host = await startSite();
		const page = await visit(host);
		await page.goto(host.url('/book'));
		await page.getByText('Nothing bought yet').waitFor();
		await expectClean(page, 'an empty book');
		await openDemo(page, host);
		await page.getByText('Demo book: an invented town').waitFor();
		expect(await databases(page)).toEqual(['meltbook', 'meltbook-demo']);
		expect((await dump(page)).records, 'nothing of it is in the own book').toBe('[]');
		const rows = page.getByRole('list', { name: 'Purchases, newest first' }).getByRole('listitem');
		expect(await rows.count()).toBe(11);
		expect(await rows.first().textContent()).toContain('A-0011');
		await expectClean(page, 'the book');
		await shot(page, 'book');
		await page.getByLabel('Search by number, seller or note').fill('stall 14');
		await page.getByText('1 purchase found').waitFor();
		expect(await rows.count()).toBe(1);

		await page.goto(host.url('/book/check'));
		await button(page, 'Check the book').click();
		await page.getByText('Nothing is missing and nothing was changed.').waitFor();
		await expectClean(page, 'the integrity check');
		await page.goto(host.url('/'));
		await page.getByRole('heading', { name: 'Spoon Fair, stall 9' }).waitFor();

		await button(page, 'Leave and remove').click();
		await page.getByText('The demo book is removed').waitFor();
		expect(await databases(page)).toEqual(['meltbook']);
		await page.goto(host.url('/book'));
		await page.getByText('Nothing bought yet').waitFor();
	});
});

/** The cents of an amount as the page prints it. */
const cents = (text: string) => Math.round(Number(text.replace(/[^\d.]/g, '')) * 100);

describe('a purchase', () => {
	it('adds up as printed, gives a slip without values on both papers, and can be taken back and undone', async () => {
		const host = await startSite();
		const page = await visit(host);
		await openDemo(page, host);
		await page.getByText('A-0010').click();
		await page.getByRole('heading', { name: 'Purchase A-0010' }).waitFor();
		const rows = page.getByRole('list', { name: 'Pieces' }).getByRole('listitem');
		const values = await rows.evaluateAll((all) => all.map((row) => row.querySelector('.worth')?.textContent ?? ''));
		expect(values.length).toBe(5);
		const facts = page.locator('dl[aria-label="The purchase"] > div');
		const worth = await facts.filter({ hasText: 'Melt value' }).locator('dd').first().textContent();
		expect(values.map(cents).reduce((a, b) => a + b, 0)).toBe(cents(worth ?? ''));
		await expectClean(page, 'a purchase');
		await shot(page, 'purchase');

		const slip = page.locator('article.paper');
		expect(await slip.isVisible(), 'the slip is for paper only').toBe(false);
		await page.emulateMedia({ media: 'print' });
		expect(await slip.isVisible()).toBe(true);
		expect(await page.locator('nav').isVisible()).toBe(false);
		const text = (await page.locator('body').innerText()).replaceAll('\u00a0', ' ');
		for (const part of ['Purchase A-0010', 'Isaura Penhallick', '18 kt watch case', '41.6 g', '14 kt ring × 2', '157.87 g', '9,890.00']) {
			expect(text).toContain(part);
		}
		for (const value of [...values, worth ?? '', 'Melt value', 'Offer', 'margin', '%', 'g Au']) expect(text, `${value} is not the seller’s`).not.toContain(value);
		await page.emulateMedia({ media: null });
		expect(await pageWidths(page)).toEqual([expect.closeTo(612, 0)]);
		await page.getByRole('radio', { name: '80 mm roll' }).check();
		// 80 mm in points
		expect(await pageWidths(page)).toEqual([expect.closeTo(226.8, 0)]);

		const [download] = await Promise.all([page.waitForEvent('download'), button(page, 'Pieces as CSV').click()]);
		expect(download.suggestedFilename()).toBe('A-0010.csv');
		const lines = readFileSync(await download.path(), 'utf8').trim().split('\r\n');
		expect(lines.length).toBe(6);
		expect(lines[1]).toMatch(/^watch case,1,41\.6,g,18 kt,/);

		const before = await dump(page, 'meltbook-demo');
		await button(page, 'Take back this purchase').click();
		await page.getByText('The number A-0010 stays used').waitFor();
		await button(page, 'Take it back').click();
		await page.getByRole('heading', { name: 'Taken back' }).waitFor();
		await expectClean(page, 'a purchase that was taken back');
		await button(page, 'Undo').click();
		await button(page, 'Print the slip').waitFor();
		expect(await rows.evaluateAll((all) => all.map((row) => row.querySelector('.worth')?.textContent ?? ''))).toEqual(values);
		expect((await dump(page, 'meltbook-demo')).sums).toBe(before.sums);

		await button(page, 'Take back this purchase').click();
		await button(page, 'Take it back').click();
		await button(page, 'To the counter').click();
		await page.getByRole('heading', { name: 'Estate of a watchmaker' }).waitFor();
	});
});

/** The width of each page as it would be printed, in points. */
async function pageWidths(page: Page): Promise<number[]> {
	const pdf = (await page.pdf({ preferCSSPageSize: true })).toString('latin1');
	return [...pdf.matchAll(/\/MediaBox\s*\[\s*0\s+0\s+([\d.]+)/g)].map((match) => Number(match[1]));
}

describe('a backup', () => {
	it('brings the identical book back after the database was wiped; a damaged one is refused and changes nothing', async () => {
		const host = await startSite();
		const page = await visit(host);
		await openDemo(page, host);
		const demo = await backUp(page, host, 'demo');
		await button(page, 'Leave and remove').click();
		await page.getByText('The demo book is removed').waitFor();
		await restore(page, host, demo);
		const own = await backUp(page, host, 'own');
		const before = await dump(page);
		expect(before.records!.length).toBeGreaterThan(10_000);

		// what the file holds, with one digit of one mass changed, and cut off in the middle
		const plain = gunzipSync(readFileSync(own)).toString('utf8');
		expect(plain).toContain('316.9');
		const changed = join(newProfile(), 'changed.jsonl.gz');
		writeFileSync(changed, gzipSync(plain.replace('316.9', '916.9')));
		const cut = join(newProfile(), 'cut.jsonl.gz');
		writeFileSync(cut, readFileSync(own).subarray(0, 4_000));
		const other = join(newProfile(), 'other.jsonl.gz');
		writeFileSync(other, gzipSync('{"hello":1}\n'));

		await page.evaluate(
			() =>
				new Promise<void>((resolve, reject) => {
					const request = indexedDB.deleteDatabase('meltbook');
					request.onsuccess = () => resolve();
					request.onerror = () => reject(request.error);
				})
		);
		await page.goto(host.url('/book'));
		await page.getByText('This device has lost your book').waitFor();
		await expectClean(page, 'a book that is missing');
		await button(page, 'Go on, and restore a backup in Book').click();
		await page.getByRole('link', { name: 'Restore a backup' }).click();
		await page.getByLabel('Backup file').waitFor();
		const empty = await dump(page);
		expect(empty.records).toBe('[]');
		for (const [path, reason] of [
			[changed, /^This backup is damaged at line \d+/],
			[cut, /^This backup (breaks off|is damaged)/],
			[other, /^This file is not a backup of Meltbook/]
		] as const) {
			await page.getByLabel('Backup file').setInputFiles(path);
			await page.getByText(reason).waitFor();
			expect(await page.getByText(reason).textContent()).toContain('Nothing was changed');
			expect(await dump(page), path).toEqual(empty);
		}
		await expectClean(page, 'a refused backup');

		await page.getByLabel('Backup file').setInputFiles(own);
		await button(page, 'Join it to this book').waitFor();
		await expectClean(page, 'the preview of a backup');
		expect(await dump(page), 'a preview changes nothing').toEqual(empty);
		await button(page, 'Leave it').click();
		await joinFile(page, own);
		expect(await dump(page)).toEqual(before);
		await page.getByLabel('Backup file').setInputFiles(own);
		await button(page, 'Everything in it is here already').waitFor();
		await page.goto(host.url('/book/check'));
		await button(page, 'Check the book').click();
		await page.getByText('Nothing is missing and nothing was changed.').waitFor();
	});

	it('can be made of a book that a newer version wrote, which is not changed', async () => {
		const host = await startSite();
		const page = await visit(host);
		await openDemo(page, host);
		const file = await backUp(page, host, 'older');
		await button(page, 'Leave and remove').click();
		await page.getByText('The demo book is removed').waitFor();
		await restore(page, host, file);
		await page.evaluate(
			() =>
				new Promise<void>((resolve, reject) => {
					const request = indexedDB.open('meltbook', 20);
					request.onupgradeneeded = () => void request.result.createObjectStore('later');
					request.onsuccess = () => {
						request.result.close();
						resolve();
					};
					request.onerror = () => reject(request.error);
				})
		);
		// the book was taken away under the open page: what it goes on to read fails, and only the banner says so
		await page.getByRole('link', { name: 'Stock' }).click();
		await page.getByText('Another tab has opened this book with a newer version').waitFor();
		await page.getByRole('link', { name: 'Counter' }).click();
		await page.goto(host.url('/book'));
		await page.getByText('This book was written by a newer version').waitFor();
		const before = await dump(page);
		await page.getByRole('link', { name: 'Export' }).click();
		expect(await page.getByLabel('Backup file').count(), 'nothing can be restored into it').toBe(0);
		const again = await backUp(page, host, 'newer');
		const lines = (path: string) => gunzipSync(readFileSync(path)).toString('utf8').trim().split('\n').slice(1).sort();
		expect(lines(again)).toEqual(lines(file));
		await page.goto(host.url('/purchase/demo-purchase-10'));
		await button(page, 'Print the slip').waitFor();
		expect(await button(page, 'Take back this purchase').count()).toBe(0);
		await expectClean(page, 'a purchase of a newer book');
		expect(await dump(page)).toEqual(before);
	});

	it('of another device shows both versions where the two disagree, and the kept one settles it', async () => {
		const host = await startSite();
		const first = await visit(host);
		await openDemo(first, host);
		const shared = await backUp(first, host, 'shared');
		await button(first, 'Leave and remove').click();
		await first.getByText('The demo book is removed').waitFor();
		await restore(first, host, shared);
		const second = await visit(host);
		await restore(second, host, shared);

		for (const page of [first, second]) {
			await page.goto(host.url('/purchase/demo-purchase-10'));
			await button(page, 'Take back this purchase').click();
			await button(page, 'Take it back').click();
			await page.getByRole('heading', { name: 'Taken back' }).waitFor();
		}
		// the second one thought better of it
		await button(second, 'Undo').click();
		await button(second, 'Print the slip').waitFor();
		await restore(first, host, await backUp(second, host, 'second'));

		await first.goto(host.url('/book/check'));
		const conflict = first.getByRole('region', { name: 'Purchase: A-0010', exact: true });
		await conflict.waitFor();
		expect(await conflict.getByText('Taken back or removed.').count()).toBe(1);
		await conflict.getByText('Where they differ').click();
		await expectClean(first, 'two versions');
		await shot(first, 'conflict');
		const kept = conflict.locator('.version').filter({ hasNotText: 'Taken back or removed.' });
		await kept.getByRole('button').click();
		await conflict.waitFor({ state: 'detached' });
		const lot = first.getByRole('region', { name: 'Lot: Estate of a watchmaker', exact: true });
		await lot.locator('.version').filter({ hasText: 'bought' }).getByRole('button').click();
		await first.getByText('None. When two devices').waitFor();
		await first.goto(host.url('/purchase/demo-purchase-10'));
		await button(first, 'Print the slip').waitFor();
		await first.goto(host.url('/book/check'));
		await button(first, 'Check the book').click();
		await first.getByText('Nothing is missing and nothing was changed.').waitFor();
	});
});
