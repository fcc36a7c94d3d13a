import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, shot } from './harness.ts';
import { comeBackOffline } from './visits.ts';

// What a few untested pieces are worth if one of them is not what it is taken for, asked offline.

const tidy = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');

/** The sheet of the melt value, and what it says of one metal: the ends of the interval and its middle. */
async function asked(page: Page, metal: string): Promise<{ low: number; high: number; mean: number }> {
	await page.getByRole('button', { name: /why\? Melt value/ }).click();
	const said = page.getByRole('dialog').getByText('Counting the chance').filter({ hasText: new RegExp(`g\\s${metal}`) });
	const text = tidy(await said.innerText());
	const [, low, high, mean] = /nine times in ten ([\d.]+)–([\d.]+) g \w+, ([\d.]+) g on average/.exec(text) ?? [];
	return { low: Number(low), high: Number(high), mean: Number(mean) };
}

describe('the why of the melt value', () => {
	it('counts the chance that a piece is not what it is taken for, metal by metal, without a network', async () => {
		const { page } = await comeBackOffline('/');
		await page.getByRole('link', { name: 'Type prices' }).click();
		await page.getByRole('textbox', { name: 'Gold', exact: true }).fill('4186.20');
		await page.getByRole('textbox', { name: 'Silver', exact: true }).fill('49.17');
		await page.getByRole('button', { name: 'Save prices' }).click();
		await page.getByRole('status').filter({ hasText: 'Prices saved.' }).waitFor();
		await page.getByRole('link', { name: 'Counter' }).click();
		const line = page.getByLabel('Mass, mark, article and count of a piece');
		for (const [index, typed] of ['14k ring 10.00 g', '14k ring 10.00 g', '925 fork 40.00 g'].entries()) {
			await line.fill(typed);
			await line.press('Enter');
			await page.locator('[data-row]').nth(index).waitFor();
		}
		const gold = await asked(page, 'Au');
		// two rings of 10 g stamped 14 kt: 11.67 g if both are; one that is something else takes grams away
		expect(gold.low).toBeGreaterThan(3);
		expect(gold.low).toBeLessThan(11.3);
		expect(gold.mean).toBeLessThan(11.6);
		expect(gold.high).toBeGreaterThan(11.5);
		await expectAccessible(page, 'the chances of a lot');
		await expectNoSidewaysScroll(page, 'the chances of a lot');
		await shot(page, 'lot-chances');
		await page.keyboard.press('Escape');
		await page.getByRole('dialog').waitFor({ state: 'hidden' });
		const silver = await asked(page, 'Ag');
		expect(silver.mean).toBeGreaterThan(30);
		expect(silver.mean).toBeLessThan(37);
		expect(silver.low).toBeLessThan(silver.mean);
	}, 120_000);

	it('says that a lot of more than two hundred entries is too long for that', async () => {
		const { site, page } = await comeBackOffline('/prices');
		await page.getByRole('textbox', { name: 'Gold', exact: true }).fill('4186.20');
		await page.getByRole('button', { name: 'Save prices' }).click();
		await page.getByRole('status').filter({ hasText: 'Prices saved.' }).waitFor();
		await page.goto(site.url('/lot/new/paste'));
		const list = Array.from({ length: 201 }, () => '18k ring 5.00 g').join('\n');
		await page.getByRole('textbox', { name: 'One piece a line, or a table' }).fill(list);
		await page.getByRole('button', { name: 'Add 201' }).click();
		await page.getByText('201 entries, 201 pieces').waitFor();
		await page.getByRole('button', { name: /why\? Melt value/ }).click();
		await page.getByRole('dialog').getByText('This lot is too long to count').waitFor();
		expect(await page.getByRole('dialog').getByText('Counting the chance').count()).toBe(0);
	}, 120_000);
});
