import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, shot } from './harness.ts';
import { comeBackOffline } from './visits.ts';

// A bag at a fair, offline: which pieces to open, what is risked with the rest. Ten thousand of them: long-lot.test.ts.

const tidy = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');
const main = async (page: Page) => tidy(await page.locator('main').innerText());

async function begin(): Promise<Page> {
	const { page } = await comeBackOffline('/');
	await page.getByRole('link', { name: 'Type prices' }).click();
	await page.getByRole('textbox', { name: 'Gold', exact: true }).fill('4186.20');
	await page.getByRole('textbox', { name: 'Silver', exact: true }).fill('52.30');
	await page.getByRole('button', { name: 'Save prices' }).click();
	await page.getByRole('status').filter({ hasText: 'Prices saved.' }).waitFor();
	await page.getByRole('link', { name: 'Counter' }).click();
	return page;
}

async function paste(page: Page, lines: readonly string[]): Promise<void> {
	await page.getByRole('link', { name: 'Paste lines or a CSV' }).click();
	await page.getByLabel('One piece a line, or a table').fill(lines.join('\n'));
	await page.getByRole('button', { name: /^Add/ }).click();
	await page.getByRole('link', { name: 'What to test' }).waitFor();
}

describe('a bag at a fair', () => {
	it('says which pieces to open and what is risked with the rest, and learns from what was opened', async () => {
		const page = await begin();
		const lines = Array.from({ length: 60 }, (_, at) => (at < 10 ? `585 chain ${20 + at}.50 g` : at < 50 ? `14k ring ${2 + (at % 5)}.10 g` : '925 spoon 30.5 g'));
		await paste(page, lines);
		await page.getByRole('link', { name: 'What to test' }).click();
		await page.getByText('Open these').waitFor();
		const before = await main(page);
		// chains of a market without control: large, and one in twenty filled; small rings of a controlled one are left
		const [, toOpen = ''] = /Open (\d+) of 60 pieces: that costs \d+ USD and saves up to [\d,]+ USD on average\./.exec(before) ?? [];
		expect(Number(toOpen)).toBeGreaterThanOrEqual(8);
		expect(Number(toOpen)).toBeLessThanOrEqual(12);
		expect(before).toMatch(/The rest\s+\d+ pieces, worth [\d,]+ USD on average at a price of [\d,]+ USD\./);
		const chances = /at least one of them is filled is (\d+(?:\.\d)?) % if one seller’s pieces are alike, and (\d+(?:\.\d)?) % if each stands alone\./.exec(before);
		expect(Number(chances?.[1])).toBeLessThan(Number(chances?.[2]));
		// one filled of sixty: opening ten misses it with five sixths
		expect(before).toMatch(/10 of 60\s+83\.3 %/);
		// one of sixty is found with 57 of them; three of sixty are missed by ten tests with 50 x 49 x 48 / (60 x 59 x 58)
		expect(before).toContain('Open 57 at random, and it is missed once in twenty times at most.');
		const more = page.getByRole('button', { name: 'Suppose filled: one more' });
		await more.click();
		await more.click();
		await page.getByText('57.3 %').waitFor();
		expect(await main(page)).toMatch(/10 of 60\s+57\.3 %/);
		await page.getByRole('button', { name: 'Suppose filled: one less' }).click();
		await shot(page, 'bag');
		await page.setViewportSize({ width: 390, height: 4_000 });
		await expectAccessible(page, 'the bag');
		await page.setViewportSize({ width: 390, height: 844 });
		await expectNoSidewaysScroll(page, 'the bag');

		// the first of them is cut, and it is brass: the others are likelier to be filled now
		await page.locator('.rows a').first().click();
		const section = page.getByRole('region', { name: 'What it is' });
		await section.getByRole('button', { name: 'Add core test' }).click();
		await section.getByRole('textbox', { name: 'Gold as shown' }).fill('10');
		await section.getByRole('button', { name: 'Add the reading' }).click();
		await page.waitForFunction(() => document.querySelector('.verdict')?.textContent?.startsWith('This is a layer') === true);
		await page.goBack();
		await page.getByText('1 was opened, 1 filled.').waitFor();
		const after = await main(page);
		const [, others = ''] = /Open (\d+) of 59 pieces/.exec(after) ?? [];
		expect(Number(others)).toBeGreaterThan(Number(toOpen));
		expect(after).toMatch(/makes a filling in each of the others \d+(\.\d)? times likelier/);
	}, 120_000);

	it('tells pieces that were weighed together apart, and has a word for a bag of brass', async () => {
		const page = await begin();
		await paste(page, ['585 chain 90.60 g x3', '14k ring 2.10 g']);
		await page.getByRole('link', { name: 'What to test' }).click();
		await page.getByText('Open these').waitFor();
		expect(await main(page)).toContain('Open 3 of 4 pieces: that costs 36 USD');
		expect(await main(page)).toMatch(/585 chain × 3\s+[\d.]+ USD each/);
		expect(await main(page)).toMatch(/The rest\s+1 piece, worth/);

		await page.getByRole('link', { name: 'Counter' }).click();
		await page.getByRole('button', { name: 'New lot' }).click();
		await paste(page, ['brass tap 120 g']);
		await page.getByRole('link', { name: 'What to test' }).click();
		await page.getByText('Nothing to test').waitFor();
		await expectAccessible(page, 'a bag of brass');
	}, 60_000);
});
