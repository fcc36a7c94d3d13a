import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, shot, type Site } from './harness.ts';
import { firstVisit } from './visits.ts';

async function demoBook(device: 'phone' | 'desktop' = 'phone'): Promise<{ site: Site; page: Page }> {
	const { site, page } = await firstVisit({ device });
	await page.getByRole('button', { name: 'Look at a demo book' }).click();
	await page.getByText('Demo book: an invented town').waitFor();
	await page.locator('[data-row]').first().waitFor();
	return { site, page };
}

/** Axe in light and dark on the whole page (tall, so that nothing lies under what is fixed at the thumb), and no sideways scroll. */
async function expectFit(page: Page, name: string): Promise<void> {
	const before = page.viewportSize()!;
	await expectNoSidewaysScroll(page, name);
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width: before.width, height: height + 300 });
	await page.waitForTimeout(150);
	await expectAccessible(page, name);
	await page.setViewportSize(before);
}

describe('every page, in light and dark, on a narrow screen', () => {
	it('of an empty book', async () => {
		// the router reports an address that leads nowhere; the page says so too
		const { site, page } = await firstVisit({ tolerate: /Not found: \/no\/such\/page/ });
		for (const [path, heading] of [
			['/', 'New lot'],
			['/stock', 'Stock'],
			['/prices', 'Prices'],
			['/book', 'Book'],
			['/book/backup', 'Backup'],
			['/book/check', 'Integrity check'],
			['/book/settings', 'Settings'],
			['/lot/new/paste', 'Paste lines or a CSV'],
			['/lot/nowhere/pay', 'Pay'],
			['/lot/nowhere/seller', 'For your pieces we pay'],
			['/lot/nowhere/bag', 'The bag: what to test'],
			['/lot/nowhere/piece/none', 'Piece'],
			['/purchase/none', 'No such purchase'],
			['/no/such/page', 'No such page']
		] as const) {
			await page.goto(site.url(path));
			await page.getByRole('heading', { name: new RegExp(heading), level: 1 }).waitFor();
			await expectFit(page, `an empty book: ${path}`);
		}
	});

	it('of a filled book', async () => {
		const { site, page } = await demoBook();
		await expectFit(page, 'the counter');
		const lot = (await page.getByRole('link', { name: 'Turn to the seller' }).getAttribute('href'))!.split('/').at(-2)!;
		const piece = (await page.locator('[data-row] a').first().getAttribute('href'))!.split('/').at(-1)!;
		for (const path of ['/stock', '/book', `/lot/${lot}/seller`, `/lot/${lot}/pay`, `/lot/${lot}/bag`, `/lot/${lot}/piece/${piece}`]) {
			await page.goto(site.url(path));
			await page.getByRole('heading', { level: 1 }).waitFor();
			await page.waitForTimeout(400);
			await expectFit(page, `a filled book: ${path}`);
		}
		await page.goto(site.url('/book'));
		await page.getByRole('link', { name: /A-0011/ }).click();
		await page.getByRole('heading', { name: 'Purchase A-0011' }).waitFor();
		await page.getByText('Slip for the seller').waitFor();
		await expectFit(page, 'a purchase');
	});

	it('with sheets open and problems shown', async () => {
		const { page } = await demoBook();
		const line = page.getByLabel('Mass, mark, article and count of a piece');
		await line.fill('14k ring 1,234 g');
		await line.press('Enter');
		await page.getByRole('button', { name: 'it is 1.234' }).waitFor();
		await expectFit(page, 'a line with a question');
		for (const [button, name] of [
			[/why\? Melt value/, 'why the melt value'],
			[/why\? Offer/, 'why the offer'],
			[/why\? Remelt yield/, 'why the yield'],
			['Tap in', 'taps']
		] as const) {
			const opener = page.getByRole('button', { name: button });
			await opener.click();
			await page.getByRole('dialog').waitFor();
			await expectNoSidewaysScroll(page, name);
			await expectAccessible(page, name);
			await shot(page, `sheet-${name.replaceAll(' ', '-')}`);
			await page.keyboard.press('Escape');
			await page.getByRole('dialog').waitFor({ state: 'hidden' });
			expect(await opener.evaluate((element) => element === document.activeElement), `focus after ${name}`).toBe(true);
		}
		await line.fill('');
		await page.getByRole('link', { name: 'Paste lines or a CSV' }).click();
		await page.getByRole('textbox', { name: 'One piece a line, or a table' }).fill('14k ring 3 g\n14k ring\n925 8 oz');
		await page.getByText('to mend').waitFor();
		await expectFit(page, 'a pasted list with bad rows');
	});
});

describe('with the keyboard alone', () => {
	it('a piece is added, changed and bought', async () => {
		const { page } = await demoBook('desktop');
		/** Goes on with Tab until the focus stands on what is named; it must be seen there. */
		async function tabTo(name: RegExp): Promise<void> {
			for (let presses = 0; presses < 120; presses += 1) {
				await page.keyboard.press('Tab');
				const at = await page.evaluate(() => {
					const element = document.activeElement as HTMLElement | null;
					if (element === null || element === document.body) return null;
					const label = (element as HTMLInputElement).labels?.[0]?.innerText ?? '';
					const outline = getComputedStyle(element);
					return {
						name: `${element.getAttribute('aria-label') ?? ''} ${label} ${element.innerText}`.trim(),
						seen: outline.outlineStyle !== 'none' && parseFloat(outline.outlineWidth) > 0
					};
				});
				if (at !== null && name.test(at.name)) {
					expect(at.seen, `the focus on ${at.name}`).toBe(true);
					return;
				}
			}
			throw new Error(`Tab never came to ${String(name)}`);
		}
		await tabTo(/^Mass, mark, article/);
		await page.keyboard.type('14k ring 3.10 g');
		await page.keyboard.press('Enter');
		await page.getByRole('link', { name: /14 kt ring/ }).waitFor();
		await tabTo(/^Buy$/);
		await page.getByRole('link', { name: /14 kt ring/ }).focus();
		await page.keyboard.press('Enter');
		await page.getByRole('heading', { name: '14 kt ring', level: 1 }).waitFor();
		await tabTo(/^Note$/);
		await page.keyboard.type('bent');
		await tabTo(/^Save$/);
		await page.keyboard.press('Enter');
		await page.getByText('14 kt ring changed.').waitFor();
		await tabTo(/^Buy$/);
		await page.keyboard.press('Enter');
		await page.getByRole('heading', { name: 'Pay', exact: true }).waitFor();
		await tabTo(/^Seller$/);
		await page.keyboard.type('Orla Quennell');
		await tabTo(/^Pay and save$/);
		await page.keyboard.press('Enter');
		await page.getByRole('heading', { name: /^Purchase A-/ }).waitFor();
	});
});
