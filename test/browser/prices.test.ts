import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, shot, type VisitOptions } from './harness.ts';
import { comeBackOffline, type Away } from './visits.ts';

/** The prices of a browser that has been here before, on a host that is switched off. */
async function pricesOffline(options?: VisitOptions): Promise<{ site: Away; page: Page }> {
	const { site, page } = await comeBackOffline('/prices', options);
	await page.getByRole('heading', { name: 'Prices', level: 1 }).waitFor();
	return { site, page };
}

const field = (page: Page, name: string) => page.getByRole('textbox', { name, exact: true });
const save = (page: Page) => page.getByRole('button', { name: 'Save prices' });
const strip = (page: Page) => page.locator('a.strip');

async function saved(page: Page, text = 'Prices saved.'): Promise<void> {
	await save(page).click();
	await page.getByRole('status').getByText(text).waitFor();
}

async function choose(page: Page, label: string, option: string): Promise<void> {
	await page.getByLabel(label, { exact: true }).selectOption(option);
}

/** Axe on the whole page: on a tall screen, so that nothing lies under what is fixed at the thumb. */
async function expectClean(page: Page, name: string): Promise<void> {
	const before = page.viewportSize()!;
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width: before.width, height: height + 200 });
	await expectAccessible(page, name);
	await page.setViewportSize(before);
}

describe('the page of prices, without a signal', () => {
	it('takes a sheet in several units, keeps it through a reload, and takes it back', async () => {
		const { page } = await pricesOffline();
		await choose(page, 'Currency', 'EUR');
		await field(page, 'Gold').fill('4186.20');
		await field(page, 'Silver').fill('52.315');
		await field(page, 'Platinum').fill('1,640.5');
		await choose(page, 'Another metal', 'Cu');
		await page.getByRole('button', { name: 'Add it' }).click();
		await field(page, 'Copper').fill('9,85');
		expect(await page.getByLabel('Unit of copper').inputValue()).toBe('kg');
		expect(await page.getByLabel('Unit of gold').inputValue()).toBe('ozt');
		await choose(page, 'Unit of silver', 'g');
		await field(page, 'Silver').fill('1.68');
		// 4186.20 / 31.1034768 = 134.589...
		await page.getByText('€134.59 per g').waitFor();
		await field(page, 'Where the prices are from, in your words').fill('a refiner on the telephone');
		await saved(page);
		await strip(page).getByText('4,186.20').waitFor();

		await page.reload();
		// a price has at least the places of its currency
		await page.waitForFunction(() => document.querySelectorAll('form input[inputmode=decimal]').length === 4);
		expect(await field(page, 'Gold').inputValue()).toBe('4186.20');
		expect(await field(page, 'Silver').inputValue()).toBe('1.68');
		expect(await field(page, 'Platinum').inputValue()).toBe('1640.50');
		expect(await field(page, 'Copper').inputValue()).toBe('9.85');
		expect(await page.getByLabel('Unit of silver').inputValue()).toBe('g');
		expect(await page.getByLabel('Currency').inputValue()).toBe('EUR');
		const list = page.getByRole('region', { name: 'Earlier sheets' });
		await list.getByText('a refiner on the telephone').waitFor();
		await list.getByText('9.85 per kg').waitFor();

		await field(page, 'Gold').fill('4200');
		await page.getByText('+0.33 % since the last sheet').waitFor();
		await saved(page);
		await strip(page).getByText('4,200.00').waitFor();
		await list.getByRole('img', { name: 'Gold, EUR per ozt' }).waitFor();
		await page.getByRole('button', { name: 'Undo' }).click();
		await strip(page).getByText('4,186.20').waitFor();
		expect(await list.getByRole('listitem').count()).toBe(1);
	});

	it('keeps what is half typed, digit by digit, and says what is wrong beside its field', async () => {
		const { page } = await pricesOffline();
		await field(page, 'Gold').fill('4,186');
		await page.getByText('can be read two ways').waitFor();
		await field(page, 'Silver').fill('52.310');
		await field(page, 'Palladium').fill('-3');
		// the draft is written a moment after the last keystroke
		await page.waitForTimeout(600);
		await page.reload();
		await page.getByText('can be read two ways').waitFor();
		expect(await field(page, 'Gold').inputValue()).toBe('4,186');
		expect(await field(page, 'Silver').inputValue()).toBe('52.310');

		await save(page).click();
		await page.getByText('is below zero').waitFor();
		expect(await field(page, 'Gold').evaluate((element) => element === document.activeElement)).toBe(true);
		expect(await field(page, 'Palladium').getAttribute('aria-invalid')).toBe('true');
		await page.getByRole('button', { name: 'it is 4,186, in thousands' }).click();
		expect(await field(page, 'Gold').inputValue()).toBe('4186');
		await page.getByRole('button', { name: 'Take palladium off the sheet' }).click();
		await page.getByRole('button', { name: 'Take platinum off the sheet' }).click();
		await saved(page);
		expect(await strip(page).innerText()).not.toContain('palladium');
		await strip(page).getByText('52.31').waitFor();

		// a sheet without any price is refused in words
		await page.getByRole('button', { name: 'Take gold off the sheet' }).click();
		await page.getByRole('button', { name: 'Take silver off the sheet' }).click();
		await save(page).click();
		await page.getByText('This sheet has no price yet.').waitFor();
		await page.getByRole('button', { name: 'Drop what I typed' }).click();
		expect(await field(page, 'Gold').inputValue()).toBe('4186.00');
	});

	it('warns of another unit, of an old sheet and of a moment that has not come', async () => {
		const { page } = await pricesOffline();
		await field(page, 'Gold').fill('4000');
		await page.getByLabel('another moment').check();
		const day = page.getByLabel('Day and time of the prices');
		await day.fill('2035-01-01T10:00');
		await save(page).click();
		await page.getByText('after the clock of this device').waitFor();
		const then = await page.evaluate(() => {
			const at = Date.now() - 4 * 86_400_000;
			return new Date(at - new Date(at).getTimezoneOffset() * 60_000).toISOString().slice(0, 16);
		});
		await day.fill(then);
		await saved(page);
		await page.getByText(/These prices are 4(\.\d)? days old/).waitFor();
		// 0.16 x the root of 4/365 = 1.67 %
		await page.getByText('gold 1.7 % is what prices may have moved').waitFor();
		await choose(page, 'Unit of gold', 'g');
		await page.getByText('This is 31.1 times the last price. Check the digits and the unit.').waitFor();
		await choose(page, 'Unit of gold', 'ozt');
		await saved(page);
		await page.getByText('days old').waitFor({ state: 'detached' });
	});

	it('is accessible, does not scroll sideways, works by keyboard, and shows its history as picture and table', async () => {
		for (const device of ['phone', 'desktop'] as const) {
			const { page } = await pricesOffline({ device });
			await expectClean(page, `prices, empty, ${device}`);
			await field(page, 'Gold').fill('4186.20');
			await field(page, 'Silver').focus();
			await page.keyboard.type('52.31');
			// from the last field on, the keyboard alone: to the button, and press it
			for (let tabs = 0; tabs < 40; tabs += 1) {
				await page.keyboard.press('Tab');
				if (await save(page).evaluate((element) => element === document.activeElement)) break;
			}
			await page.keyboard.press('Enter');
			await page.getByRole('status').getByText('Prices saved.').waitFor();
			await field(page, 'Gold').fill('4150');
			await saved(page);
			await page.getByRole('button', { name: 'Close this message' }).click();
			const chart = page.getByRole('img', { name: 'Gold, USD per ozt' });
			await chart.waitFor();
			await page.getByText('The same as a table').click();
			await page.getByRole('cell', { name: '4,186.20', exact: true }).waitFor();
			await field(page, 'Gold').fill('4x');
			await field(page, 'Silver').focus();
			await page.getByText('is not a number we can read').waitFor();
			await expectClean(page, `prices, filled, ${device}`);
			await expectNoSidewaysScroll(page, `prices, ${device}`);
			for (const colorScheme of ['light', 'dark'] as const) {
				await page.emulateMedia({ colorScheme });
				await page.evaluate(() => scrollTo(0, 0));
				await shot(page, `prices-${device}-${colorScheme}`);
			}
			if (device === 'phone') {
				await chart.scrollIntoViewIfNeeded();
				await shot(page, 'prices-history');
			}
		}
	});
});
