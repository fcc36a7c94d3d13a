import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, shot, type VisitOptions } from './harness.ts';
import { comeBackOffline, type Away } from './visits.ts';

/** The settings of a browser that has been here before, on a host that is switched off. */
async function settingsOffline(options?: VisitOptions): Promise<{ site: Away; page: Page }> {
	const { site, page } = await comeBackOffline('/book/settings', options);
	await page.getByRole('heading', { name: 'Settings', level: 1 }).waitFor();
	return { site, page };
}

const part = (page: Page, name: string) => page.getByRole('region', { name, exact: true });
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();
const said = (page: Page, text: string) => page.getByRole('status').getByText(text).waitFor();

/** Axe on the whole page: on a tall screen, so that nothing lies under what is fixed at the thumb. */
async function expectClean(page: Page, name: string): Promise<void> {
	const before = page.viewportSize()!;
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width: before.width, height: height + 200 });
	await expectAccessible(page, name);
	await page.setViewportSize(before);
}

describe('the settings, without a signal', () => {
	it('keep each choice through a reload, and take it back', async () => {
		const { page } = await settingsOffline();
		const numbers = part(page, 'Numbers and masses');
		const money = part(page, 'Money');
		await numbers.getByLabel('Numbers and dates are shown as in').selectOption('de-DE');
		await said(page, 'The language of numbers is changed.');
		await numbers.getByLabel('comma').check();
		await said(page, 'Decimals are typed with a comma.');
		await numbers.getByLabel('Unit of a mass typed without one').selectOption('dwt');
		await said(page, 'A mass without a unit is in dwt.');
		await money.getByLabel('Currency of new price sheets').selectOption('CHF');
		await said(page, 'New price sheets begin in CHF.');
		const step = money.getByLabel('Offers are rounded down to steps of');
		await step.fill('0,03 ');
		await press(page, 'Save the cash step');
		await said(page, 'Offers go in steps of 0,03 CHF.');
		await step.fill('0,005');
		await press(page, 'Save the cash step');
		await page.getByText('Cash in CHF cannot go in steps of 0,005.').waitFor();
		expect(await step.evaluate((element) => element === document.activeElement)).toBe(true);
		await step.fill('0,05');
		await press(page, 'Save the cash step');
		await said(page, 'Offers go in steps of 0,05 CHF.');

		await page.reload();
		await page.getByRole('heading', { name: 'Settings', level: 1 }).waitFor();
		expect(await numbers.getByLabel('Numbers and dates are shown as in').inputValue()).toBe('de-DE');
		expect(await numbers.getByLabel('comma').isChecked()).toBe(true);
		expect(await numbers.getByLabel('Unit of a mass typed without one').inputValue()).toBe('dwt');
		expect(await money.getByLabel('Currency of new price sheets').inputValue()).toBe('CHF');
		expect(await step.inputValue()).toBe('0,05');

		// a step that no coin of the next currency knows goes with the old one, in one act
		await money.getByLabel('Currency of new price sheets').selectOption('JPY');
		await said(page, 'The cash step did not fit and is gone.');
		expect(await step.inputValue()).toBe('');
		await press(page, 'Undo');
		await said(page, 'Taken back.');
		expect(await money.getByLabel('Currency of new price sheets').inputValue()).toBe('CHF');
		expect(await step.inputValue()).toBe('0,05');
	});

	it('go back to the defaults when the first change is taken back, and can be changed again', async () => {
		const { page } = await settingsOffline();
		const unit = page.getByLabel('Unit of a mass typed without one');
		await unit.selectOption('ozt');
		await said(page, 'A mass without a unit is in ozt.');
		await press(page, 'Undo');
		await said(page, 'Taken back.');
		await page.waitForFunction(() => [...document.querySelectorAll('select')].some(({ value }) => value === 'g'));
		expect(await unit.inputValue()).toBe('g');
		await unit.selectOption('gr');
		await said(page, 'A mass without a unit is in gr.');
		await page.reload();
		await unit.waitFor();
		expect(await unit.inputValue()).toBe('gr');
	});

	it('keep the cash step to its own currency: a sheet in another one goes to the coins of that one', async () => {
		const { site, page } = await settingsOffline();
		const money = part(page, 'Money');
		await money.getByLabel('Offers are rounded down to steps of').fill('0.25');
		await press(page, 'Save the cash step');
		await said(page, 'Offers go in steps of 0.25 USD.');
		const offered = async (currency: string, offer: RegExp): Promise<void> => {
			await page.goto(site.url('/prices'));
			await page.getByLabel('Currency', { exact: true }).selectOption(currency);
			await page.getByRole('textbox', { name: 'Gold', exact: true }).fill('4186.20');
			await press(page, 'Save prices');
			await said(page, 'Prices saved.');
			await page.goto(site.url('/'));
			await page.locator('.dock dd').nth(1).filter({ hasText: offer }).waitFor();
		};
		await page.goto(site.url('/'));
		await page.getByLabel('Mass, mark, article and count of a piece').fill('14k chain 10 g');
		await press(page, 'Add the piece');
		await said(page, 'added.');
		// 10 g x 14/24 x 4186.20 / 31.1034768 x 0.85 = 667.336...
		await offered('USD', /667\.25/);
		await offered('JPY', /667(?![.,]?\d)/);
	});

	it('take shares by value, refuse what cannot be paid, and keep the form', async () => {
		const { page } = await settingsOffline();
		const shares = part(page, 'Share of the value that is paid');
		await shares.getByText('working default, yours to change').waitFor();
		await press(page, 'Add a share for larger lots');
		await shares.getByLabel('Lots worth from').nth(1).fill('0');
		await shares.getByLabel('Share paid').nth(1).fill('110');
		await press(page, 'Save the shares');
		await shares.getByText('Two shares begin at 0. Keep one of them.').waitFor();
		await shares.getByLabel('Lots worth from').nth(1).fill('5000');
		await shares.getByText('A share of 110 % cannot be paid.').waitFor();
		// half typed, it is still there after a reload
		await page.waitForTimeout(600);
		await page.reload();
		await shares.waitFor();
		await page.waitForFunction(() => document.querySelectorAll('ol input').length === 4);
		expect(await shares.getByLabel('Share paid').nth(1).inputValue()).toBe('110');
		await shares.getByLabel('Share paid').nth(1).fill('88.5');
		await press(page, 'Save the shares');
		await said(page, 'The shares paid are changed.');
		await page.reload();
		await shares.waitFor();
		await page.waitForFunction(() => document.querySelectorAll('ol input').length === 4);
		expect(await shares.getByLabel('Lots worth from').nth(1).inputValue()).toBe('5000');
		expect(await shares.getByLabel('Share paid').nth(1).inputValue()).toBe('88.5');
		expect(await shares.getByText('working default').count()).toBe(0);
	});

	it('describe a scale, say how far off it may be, and put it on the counter', async () => {
		const { page } = await settingsOffline();
		const scales = part(page, 'Scales');
		await press(page, 'Add a scale');
		await press(page, 'Save the scale');
		await scales.getByText('A number is needed here.').waitFor();
		await scales.getByLabel('Smallest step of the display, d').fill('0.1');
		await press(page, 'Save the scale');
		await scales.getByText('Give the scale a name').waitFor();
		await scales.getByLabel('Name of the scale').fill('Bench scale');
		await scales.getByLabel('II', { exact: true }).check();
		await scales.getByLabel('Verification interval on its plate, e').fill('0.01');
		await press(page, 'Save the scale');
		await scales.getByText('cannot be verified to 0.01').waitFor();
		await scales.getByLabel('Verification interval on its plate, e').fill('0.1');
		await scales.getByText('Weigh nothing under 5 g on it.').waitFor();
		await scales.getByRole('row', { name: 'up to 500 g 0.05 g 0.1 g' }).waitFor();
		await scales.getByRole('row', { name: 'above 2,000 g 0.15 g 0.3 g' }).waitFor();
		await scales.getByLabel('Day of its last check with a weight').fill('2026-05-03');
		await press(page, 'Save the scale');
		await said(page, 'Bench scale is on the counter.');

		await page.reload();
		await scales.getByText('steps by 0.1 g, class II, e 0.1 g, checked 3 May 2026').waitFor();
		expect(await scales.getByRole('radio', { name: 'Bench scale' }).isChecked()).toBe(true);
		await scales.getByRole('button', { name: 'Change Bench scale' }).click();
		await scales.getByLabel('Name of the scale').fill('Old bench scale');
		await press(page, 'Save the scale');
		await said(page, 'Old bench scale is saved.');
		await scales.getByRole('button', { name: 'Change Old bench scale' }).click();
		await press(page, 'Remove this scale');
		await said(page, 'Old bench scale is removed.');
		await scales.getByText('No scale is described yet').waitFor();
		await press(page, 'Undo');
		await said(page, 'Taken back.');
		await scales.getByRole('button', { name: 'Change Old bench scale' }).waitFor();
		expect(await scales.getByRole('radio', { name: 'Old bench scale' }).isChecked()).toBe(true);
	});

	it('change days, moves, losses and spreads, and go back to the working defaults', async () => {
		const { page } = await settingsOffline();
		const selling = part(page, 'Until it is sold');
		await selling.getByLabel('Days from the purchase until the metal is sold').fill('2.5');
		await press(page, 'Save days and moves');
		await selling.getByText('is not a whole number').waitFor();
		await selling.getByLabel('Days from the purchase until the metal is sold').fill('30');
		await selling.getByText('How far prices move in a year, by metal').click();
		expect(await selling.getByLabel('Gold').inputValue()).toBe('16');
		await selling.getByLabel('Gold').fill('21.5');
		await press(page, 'Save days and moves');
		await said(page, 'Days and price moves are changed.');

		const losses = part(page, 'Losses in the melt');
		await losses.getByRole('button', { name: 'Change Clean karat metal' }).click();
		const lost = losses.getByRole('group', { name: 'Metal lost in the melt' });
		expect(await lost.getByLabel('from').inputValue()).toBe('0.2');
		await lost.getByLabel('from').fill('1.2');
		await press(page, 'Save the losses');
		await losses.getByText('The range runs from 1.2 % down to 0.8 %.').waitFor();
		await lost.getByLabel('to').fill('1.5');
		await press(page, 'Save the losses');
		await said(page, 'Losses of clean karat metal are changed.');

		const spreads = part(page, 'How far marks are believed');
		await spreads.getByRole('button', { name: 'Change An assay office: hallmarked' }).click();
		await spreads.getByLabel('one piece').fill('0.35');
		await spreads.getByRole('button', { name: 'Save', exact: true }).click();
		await said(page, 'What is believed of these marks is changed.');

		await page.reload();
		await losses.getByText('no metal 0 % to 0.5 %, lost 1.2 % to 1.5 %, fine kept 99.9 % to 99.95 %').waitFor();
		await spreads.getByText('the class as a whole ±0.2 %, one piece ±0.35 %').waitFor();
		expect(await selling.getByLabel('Days from the purchase until the metal is sold').inputValue()).toBe('30');
		await selling.getByText('How far prices move in a year, by metal').click();
		expect(await selling.getByLabel('Gold').inputValue()).toBe('21.5');
		await selling.getByText('Yours; the working default is 16 %.').waitFor();
		await selling.getByLabel('Gold').fill('');
		await press(page, 'Save days and moves');
		await said(page, 'Days and price moves are changed.');
		expect(await selling.getByLabel('Gold').inputValue()).toBe('16');
		await losses.getByRole('button', { name: 'Change Clean karat metal' }).click();
		await press(page, 'Back to the working default');
		await said(page, 'Losses of clean karat metal are the working defaults again.');
		await losses.getByText('no metal 0 % to 0.5 %, lost 0.2 % to 0.8 %, fine kept 99.9 % to 99.95 %').waitFor();
	});

	it('describe a tester from its working defaults, and say which figures are the buyer’s own', async () => {
		const { page } = await settingsOffline();
		const testers = part(page, 'Testers and acids');
		await testers.getByText('None is described yet').waitFor();
		await testers.getByText('Reads by fluorescence: working defaults').click();
		await testers.getByRole('row', { name: 'Gold 750 ‰, white ±13 ‰ working default' }).waitFor();
		await press(page, 'Add a tester or acids');
		expect(await testers.getByLabel('Gold 585 ‰', { exact: true }).inputValue()).toBe('16');
		await testers.getByLabel('acids and a stone').check();
		expect(await testers.getByLabel('Gold 585 ‰', { exact: true }).inputValue()).toBe('15');
		await testers.getByLabel('reads by fluorescence').check();
		await press(page, 'Save the tester');
		await testers.getByText('Give it a name').waitFor();
		await testers.getByLabel('Name of the tester or the acids').fill('Pocket reader');
		await testers.getByLabel('Gold 585 ‰', { exact: true }).fill('12.5');
		await testers.getByRole('button', { name: 'Remove Palladium 500 ‰' }).click();
		await press(page, 'Add this alloy');
		await testers.getByText('A number is needed here.').waitFor();
		await testers.getByLabel('Fineness').fill('916.7');
		await press(page, 'Add this alloy');
		await testers.getByLabel('Gold 916.7 ‰', { exact: true }).fill('0.5');
		await press(page, 'Save the tester');
		await testers.getByText('the best of them is good to ±0.5 ‰').waitFor();
		const bias = testers.getByLabel('Error of its own, the same in all its readings');
		expect(await bias.evaluate((element) => element === document.activeElement)).toBe(true);
		await bias.fill('0.5');
		// half typed, it is still there after a reload
		await page.waitForTimeout(600);
		await page.reload();
		await testers.getByRole('heading', { name: 'A new tester' }).waitFor();
		await page.waitForFunction(() => [...document.querySelectorAll('input')].some(({ value }) => value === 'Pocket reader'));
		expect(await testers.getByLabel('Gold 916.7 ‰', { exact: true }).inputValue()).toBe('0.5');
		await testers.getByLabel('Day of its last check with a known sample').fill('2026-05-03');
		await press(page, 'Save the tester');
		await said(page, 'Pocket reader: saved.');

		await page.reload();
		await testers.getByText('reads by fluorescence, error of its own ±0.5 ‰, wrong in 3 %, checked 3 May 2026').waitFor();
		await testers.getByText('3 of 14 figures are yours, the others are working defaults').waitFor();
		await testers.getByText('What one reading is good to').click();
		await testers.getByRole('row', { name: 'Gold 585 ‰ ±12.5 ‰ yours' }).waitFor();
		await testers.getByRole('row', { name: 'Silver 925 ‰ ±5 ‰ working default' }).waitFor();
		await testers.getByRole('button', { name: 'Change Pocket reader' }).click();
		await testers.getByLabel('Name of the tester or the acids').fill('Old reader');
		await press(page, 'Save the tester');
		await said(page, 'Old reader: saved.');
		await testers.getByRole('button', { name: 'Change Old reader' }).click();
		await press(page, 'Remove this tester');
		await said(page, 'Old reader is removed. What it has read stays.');
		await testers.getByText('None is described yet').waitFor();
		await press(page, 'Undo');
		await said(page, 'Taken back.');
		await testers.getByRole('button', { name: 'Change Old reader' }).waitFor();
	});

	it('change prudence, costs and odds, and go back to the working defaults', async () => {
		const { page } = await settingsOffline();
		const prudence = part(page, 'Prudence').getByLabel('Chance that a tested piece is at least what it is taken at');
		expect(await prudence.inputValue()).toBe('80');
		await prudence.fill('40');
		await press(page, 'Save the prudence');
		await page.getByText('40 % cannot be reckoned with.').waitFor();
		await prudence.fill('90');
		await press(page, 'Save the prudence');
		await said(page, 'The prudence is changed.');

		const costs = part(page, 'What a test costs');
		expect(await costs.getByLabel('Core test').inputValue()).toBe('12.00');
		await costs.getByLabel('Core test').fill('7.50');
		await press(page, 'Save the costs');
		await said(page, 'What a test costs is changed.');
		await press(page, 'Undo');
		await said(page, 'Taken back.');
		await page.waitForFunction(() => [...document.querySelectorAll('input')].some(({ value }) => value === '12.00'));
		await costs.getByLabel('Core test').fill('8');
		await press(page, 'Save the costs');
		await said(page, 'What a test costs is changed.');

		const odds = part(page, 'Odds before any test');
		await odds.getByRole('button', { name: 'Change A maker in the US, since October 1981' }).click();
		expect(await odds.getByLabel('As its mark says').inputValue()).toBe('90');
		await odds.getByLabel('As its mark says').fill('80');
		await press(page, 'Save the odds');
		await odds.getByText('These add up to 90 %.').waitFor();
		await odds.getByLabel('Under its mark').fill('16');
		await press(page, 'Save the odds');
		await said(page, 'These odds are changed.');

		await page.reload();
		await odds.getByText('as its mark says 80 %, under its mark 16 %, another standard 3 %, a layer, core or filling 1 %').waitFor();
		expect(await prudence.inputValue()).toBe('90');
		await costs.getByText('Yours; the working default is 12.00.').waitFor();
		await odds.getByRole('button', { name: 'Change A maker in the US, since October 1981' }).click();
		await press(page, 'Back to the working default');
		await said(page, 'These odds are the working defaults again.');
		await odds.getByText('as its mark says 90 %, under its mark 6 %').waitFor();
		expect(await prudence.inputValue()).toBe('90');
	});

	it('are accessible, do not scroll sideways, and keep a half-typed form open', async () => {
		for (const device of ['phone', 'desktop'] as const) {
			const { page } = await settingsOffline({ device });
			await expectClean(page, `settings, ${device}`);
			await press(page, 'Add a scale');
			await part(page, 'Scales').getByLabel('III', { exact: true }).check();
			await part(page, 'Scales').getByLabel('Name of the scale').fill('Pocket');
			await part(page, 'Scales').getByLabel('Smallest step of the display, d').fill('0.01');
			await part(page, 'Scales').getByLabel('Verification interval on its plate, e').fill('0.1');
			await page.getByRole('button', { name: 'Change Dental, with ceramic' }).click();
			await part(page, 'How far marks are believed').getByRole('button', { name: 'Change Nobody knows: no mark' }).click();
			await part(page, 'Odds before any test').getByRole('button', { name: 'Change A stranger: a bar' }).click();
			await press(page, 'Add a tester or acids');
			await page.getByText('How far prices move in a year, by metal').click();
			await page.waitForTimeout(600);
			await expectClean(page, `settings with open forms, ${device}`);
			await expectNoSidewaysScroll(page, `settings, ${device}`);
			for (const colorScheme of ['light', 'dark'] as const) {
				await page.emulateMedia({ colorScheme });
				await page.evaluate(() => scrollTo(0, 0));
				await shot(page, `settings-${device}-${colorScheme}`);
			}
			await part(page, 'Scales').scrollIntoViewIfNeeded();
			await part(page, 'Scales').getByText('in service').scrollIntoViewIfNeeded();
			await shot(page, `settings-scale-${device}`);
			await part(page, 'Testers and acids').getByText('What one reading is good to').scrollIntoViewIfNeeded();
			await shot(page, `settings-testers-${device}`);
			await part(page, 'Odds before any test').getByText('Working default:').scrollIntoViewIfNeeded();
			await shot(page, `settings-odds-${device}`);
			await page.reload();
			await page.getByRole('heading', { name: 'A new scale' }).waitFor();
			expect(await part(page, 'Scales').getByLabel('Name of the scale').inputValue()).toBe('Pocket');
		}
	});
});
