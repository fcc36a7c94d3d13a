import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { shot, workerReady } from './harness.ts';
import { comeBackOffline, startSite, visit } from './visits.ts';

// A buyer's day on a phone whose host is switched off after the first visit. Every figure on the screen is worked out a second
// time here, in whole numbers and fractions of them, without any function of the app.

/* -- the independent route: fractions of whole numbers -- */

type Fraction = readonly [n: bigint, d: bigint];
const fraction = (text: string): Fraction => {
	const [whole = '', places = ''] = text.split('.');
	return [BigInt(whole + places), 10n ** BigInt(places.length)];
};
const times = (a: Fraction, b: Fraction): Fraction => [a[0] * b[0], a[1] * b[1]];
const plus = (a: Fraction, b: Fraction): Fraction => [a[0] * b[1] + b[0] * a[1], a[1] * b[1]];
const minus = (a: Fraction, b: Fraction): Fraction => plus(a, [-b[0], b[1]]);
const over = (a: Fraction, b: Fraction): Fraction => [a[0] * b[1], a[1] * b[0]];
const sum = (all: readonly Fraction[]): Fraction => all.reduce(plus, [0n, 1n]);
const float = ([n, d]: Fraction): number => Number((n * 10n ** 15n) / d) / 1e15;

/** Whole steps of 10^-places: halves to even, or cut off. */
function steps([n, d]: Fraction, places: number, cut = false): bigint {
	const scaled = n * 10n ** BigInt(places);
	const whole = scaled / d;
	const rest = (scaled % d) * 2n;
	if (cut || rest < d || (rest === d && whole % 2n === 0n)) return whole;
	return whole + 1n;
}
/** "4,186.20": groups of three and so many places. */
function printed(value: Fraction, places: number, cut = false): string {
	const digits = steps(value, places, cut).toString().padStart(places + 1, '0');
	const whole = digits.slice(0, digits.length - places).replace(/\B(?=(\d{3})+$)/g, ',');
	return places === 0 ? whole : `${whole}.${digits.slice(-places)}`;
}

/* -- the facts of the day; masses in grams, as the definitions of the units give them -- */

const OUNCE = fraction('31.1034768');
const PENNYWEIGHT = fraction('1.55517384');
const perMille = (text: string): Fraction => times(fraction(text), [1n, 1000n]);
const karat = (k: bigint): Fraction => [k, 24n];

const prices: Readonly<Record<string, { readonly amount: string; readonly grams: Fraction }>> = {
	Gold: { amount: '4186.20', grams: OUNCE },
	Silver: { amount: '52.315', grams: OUNCE },
	Platinum: { amount: '1608.00', grams: OUNCE },
	Palladium: { amount: '1438.50', grams: OUNCE },
	Copper: { amount: '9.90', grams: [1000n, 1n] },
	Zinc: { amount: '2.96', grams: [1000n, 1n] }
};

type Entry = {
	readonly line: string;
	readonly name: string;
	readonly gross: Fraction;
	readonly net: Fraction;
	readonly pieces: number;
	readonly fine: Readonly<Record<string, Fraction>>;
};
const entry = (line: string, name: string, gross: Fraction, off: Fraction, pieces: number, shares: Record<string, Fraction>): Entry => {
	const net = minus(gross, off);
	const fine = Object.fromEntries(Object.entries(shares).map(([metal, share]) => [metal, times(net, share)]));
	return { line, name, gross, net, pieces, fine };
};
const NONE = fraction('0');

const typed: readonly Entry[] = [
	entry('14k ring 5.20 g - 0.35 g stones', '14 kt ring', fraction('5.20'), fraction('0.35'), 1, { Gold: karat(14n) }),
	entry('925 flatware 316.90 g x6', '925 flatware × 6', fraction('316.90'), NONE, 6, { Silver: perMille('925') }),
	// a weighted piece is nine tenths filler until it is opened
	entry('weighted sterling candlestick 412 g', 'weighted 925 candlestick', fraction('412'), fraction('370.8'), 1, { Silver: perMille('925') }),
	entry('1/20 14k gf chain 9.1 g', '1/20 14 kt chain', fraction('9.1'), NONE, 1, { Gold: [14n, 480n] }),
	entry('dental Au 625 Pd 180 Ag 120 4.12 g', 'dental', fraction('4.12'), NONE, 1, {
		Gold: perMille('625'),
		Palladium: perMille('180'),
		Silver: perMille('120')
	}),
	// by the Coinage Act of 1870, schedule 1: 123.27447 grains, eleven twelfths fine
	entry('sovereign 7.98 g', 'sovereign', fraction('7.98'), NONE, 1, { Gold: [11n, 12n] }),
	entry('brass fitting 120 g', 'brass fitting', fraction('120'), NONE, 1, { Copper: [2n, 3n], Zinc: [1n, 3n] }),
	entry('925 8 dwt', '925', times(fraction('8'), PENNYWEIGHT), NONE, 1, { Silver: perMille('925') }),
	entry('22k bangle 0.505 ozt', '22 kt bangle', times(fraction('0.505'), OUNCE), NONE, 1, { Gold: karat(22n) }),
	entry('585 brooch 3,15 g', '585 brooch', fraction('3.15'), NONE, 1, { Gold: perMille('585') }),
	entry('pt950 band 6.1 g', 'Pt 950 band', fraction('6.1'), NONE, 1, { Platinum: perMille('950') })
];
const tapped = entry('', '18 kt chain × 2', fraction('12.40'), NONE, 2, { Gold: karat(18n) });
const all: readonly Entry[] = [...typed, tapped];

const worthOf = (fine: Entry['fine']): Fraction =>
	sum(
		Object.entries(fine).map(([metal, grams]) => {
			const price = prices[metal]!;
			return over(times(grams, fraction(price.amount)), price.grams);
		})
	);
const value = sum(all.map(({ fine }) => worthOf(fine)));
const offer = times(value, fraction('0.85'));
const fineOf = (metal: string): Fraction => sum(all.map(({ fine }) => fine[metal] ?? NONE));

/** The normal distribution by Simpson's rule over its density: slow, plain, and nobody else's code. */
function normalCdf(z: number): number {
	const from = -12;
	const parts = 20_000;
	const step = (z - from) / parts;
	const density = (x: number) => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
	let total = density(from) + density(z);
	for (let i = 1; i < parts; i += 1) total += density(from + i * step) * (i % 2 === 0 ? 2 : 4);
	return (total * step) / 3;
}

/* -- the day -- */

const line = (page: Page) => page.getByLabel('Mass, mark, article and count of a piece');
const dock = (page: Page) => page.locator('.dock');
const said = (page: Page, text: string) => page.getByRole('status').filter({ hasText: text }).waitFor();
const tidy = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');

async function typePrices(page: Page): Promise<void> {
	await page.getByRole('link', { name: 'Type prices' }).click();
	for (const metal of ['Copper', 'Zinc']) {
		await page.getByLabel('Another metal', { exact: true }).selectOption(metal === 'Copper' ? 'Cu' : 'Zn');
		await page.getByRole('button', { name: 'Add it' }).click();
	}
	for (const [metal, { amount }] of Object.entries(prices)) await page.getByRole('textbox', { name: metal, exact: true }).fill(amount);
	await page.getByRole('button', { name: 'Save prices' }).click();
	await said(page, 'Prices saved.');
}

async function addByLine(page: Page, text: string): Promise<void> {
	const before = await page.locator('[data-row]').count();
	await line(page).fill(text);
	await line(page).press('Enter');
	await page.waitForFunction((count) => document.querySelectorAll('[data-row]').length > count, before);
	await page.waitForFunction(() => document.querySelector<HTMLInputElement>('.entry input')?.value === '');
}

/** Rows of a table by the words of their first cell. */
async function table(page: Page, heading: string): Promise<Record<string, string[]>> {
	const rows = await page
		.locator('section', { has: page.getByRole('heading', { name: heading }) })
		.locator('tbody tr')
		.evaluateAll((found) => found.map((row) => [...row.children].map((cell) => (cell as HTMLElement).innerText)));
	return Object.fromEntries(rows.map(([name = '', ...rest]) => [name, rest.map(tidy)]));
}

describe('a day at the counter', () => {
	it('weighs, values, offers and buys without a signal, and finds it all again to the last digit', async () => {
		const site = await startSite();
		const first = await visit(site);
		let { page } = first;
		await page.goto(site.url('/'));
		await page.getByText('Ready for offline').waitFor();
		await workerReady(page);
		await site.stop();
		await page.reload();

		await typePrices(page);
		await page.getByRole('link', { name: 'Counter' }).click();

		for (const each of typed) await addByLine(page, each.line);

		// by taps: open, mark, article, one more, add: five, and the mass is typed where the cursor already stands
		let taps = 0;
		const tap = async (act: Promise<void>): Promise<void> => {
			taps += 1;
			await act;
		};
		const sheet = page.getByRole('dialog');
		await tap(page.getByRole('button', { name: 'Tap in' }).tap());
		await sheet.waitFor();
		await page.waitForFunction(() => document.activeElement?.closest('dialog') !== null && document.activeElement?.tagName === 'INPUT');
		await page.keyboard.type('12.40');
		await tap(sheet.getByRole('radio', { name: '18 kt', exact: true }).tap());
		await tap(sheet.getByRole('radio', { name: 'chain', exact: true }).tap());
		await tap(sheet.getByRole('button', { name: 'How many: one more' }).tap());
		await tap(sheet.getByRole('button', { name: 'Add the piece' }).tap());
		await said(page, '18 kt chain × 2 added.');
		expect(taps).toBeLessThanOrEqual(6);
		await page.keyboard.press('Escape');
		await sheet.waitFor({ state: 'detached' }).catch(() => sheet.waitFor({ state: 'hidden' }));

		const pieces = all.reduce((total, each) => total + each.pieces, 0);
		const gross = sum(all.map((each) => each.gross));
		await page.getByText(new RegExp(`^12 entries, ${pieces} pieces · ${printed(gross, 3)}\\sg gross`)).waitFor();

		// the sums in the dock
		const readDock = async () => tidy(await dock(page).innerText());
		expect(await readDock()).toContain(`$${printed(value, 2)}`);
		expect(await readDock()).toContain(`$${printed(offer, 2, true)}`);

		// each row's name and value; the rows add up to the total (largest remainder), each within a cent of its own value
		const rows = (await page.locator('[data-row]').allInnerTexts()).map(tidy);
		expect(rows).toHaveLength(12);
		let rowCents = 0n;
		rows.forEach((text, index) => {
			const each = all[index]!;
			expect(text).toContain(each.name);
			const amount = /(?:^|\n)([\d,]+\.\d\d)(?:\n|$)/.exec(text)?.[1] ?? '';
			const cents = BigInt(amount.replace(/[,.]/g, ''));
			const floor = steps(worthOf(each.fine), 2, true);
			expect(cents === floor || cents === floor + 1n, `${each.line}: ${amount}`).toBe(true);
			rowCents += cents;
		});
		expect(rowCents).toBe(steps(value, 2));

		// fine metal, its parts of the value, and an interval around it
		const fine = await table(page, 'Fine metal');
		expect(Object.keys(fine)).toEqual(['Gold', 'Silver', 'Copper', 'Zinc', 'Palladium', 'Platinum']);
		let metalCents = 0n;
		for (const [metal, [mass = '', worth = '']] of Object.entries(fine)) {
			const [own = '', between = ''] = mass.split('\n');
			expect(own, metal).toBe(`${printed(fineOf(metal), 2)} g`);
			const [low = NaN, high = NaN] = between.replace(/,|\sg$/g, '').split('–').map(Number);
			expect(low < float(fineOf(metal)) && float(fineOf(metal)) < high, `${metal} ${between}`).toBe(true);
			metalCents += BigInt(worth.replace(/[,.]/g, ''));
		}
		expect(metalCents).toBe(steps(value, 2));

		// remelt yield: less metal than went in, and what is kept of each within what was counted
		const kept = await table(page, 'Remelt yield');
		for (const [metal, [mass = '']] of Object.entries(kept)) {
			const grams = Number((mass.split('\n')[0] ?? '').replace(/,|\sg$/g, ''));
			expect(grams).toBeLessThanOrEqual(float(fineOf(metal)));
			expect(grams).toBeGreaterThan(float(fineOf(metal)) * 0.8);
		}

		// what the seller asks: margin, share, and the chance of loss of a lognormal price over 14 days
		const asked = '3000';
		await page.getByRole('textbox', { name: 'Asked price' }).fill(asked);
		const margin = minus(over(value, fraction(asked)), [1n, 1n]);
		const left = page.locator('dl.left');
		await left.waitFor();
		const words = tidy(await left.innerText());
		expect(words).toContain(`${printed(times(margin, fraction('100')), 1)} %`);
		expect(words).toContain(`${printed(times(over(fraction(asked), value), fraction('100')), 1)} %`);
		const moves: Record<string, number> = { Gold: 0.16, Silver: 0.3, Platinum: 0.25, Palladium: 0.35, Copper: 0.22, Zinc: 0.26 };
		const sigma = Object.entries(moves).reduce((total, [metal, yearly]) => {
			const part = worthOf({ [metal]: fineOf(metal) });
			return total + yearly * float(over(part, value));
		}, 0);
		const chance = normalCdf(-Math.log(1 + float(margin)) / (sigma * Math.sqrt(14 / 365)));
		expect(words).toContain(chance < 0.001 ? 'under 0.1 %' : `${(chance * 100).toFixed(1).replace(/\.0$/, '')} %`);
		await shot(page, 'day-counter');

		// turned to the seller: the offer, the pieces, and nothing of what is left for the buyer
		await page.getByRole('link', { name: 'Turn to the seller' }).click();
		await page.getByRole('heading', { name: 'For your pieces we pay' }).waitFor();
		await page.getByRole('main').getByText('18 kt chain × 2').waitFor();
		const sellerView = tidy(await page.locator('body').innerText());
		expect(sellerView).toContain(`$${printed(offer, 2, true)}`);
		expect(sellerView).not.toContain(printed(value, 2));
		expect(sellerView).not.toContain('4,186.20');
		expect(sellerView).not.toMatch(/margin|melt value|85\s?%|chance/i);
		await shot(page, 'day-seller');
		await page.getByRole('link', { name: 'Turn back' }).click();

		// undo: a piece too many goes away as if it had never been there
		await page.waitForFunction(() => document.querySelectorAll('[data-row]').length === 12);
		await addByLine(page, '9k ring 1.10 g');
		await page.getByRole('link', { name: /9 kt ring/ }).waitFor();
		expect(await readDock()).not.toContain(`$${printed(value, 2)}`);
		await page.getByRole('button', { name: 'Undo' }).click();
		await said(page, 'Taken back.');
		await page.waitForFunction(() => document.querySelectorAll('[data-row]').length === 12);
		expect(await readDock()).toContain(`$${printed(value, 2)}`);

		// paying: a changed mass stops, the same load goes on
		await page.getByRole('button', { name: 'Buy' }).click();
		await page.getByRole('heading', { name: 'Pay', exact: true }).waitFor();
		const again = page.getByRole('textbox', { name: 'Weigh everything again before you pay' });
		await again.fill(printed(minus(gross, fraction('12.40')), 2));
		await page.getByText('Stop.').waitFor();
		await page.getByRole('button', { name: 'Pay and save' }).click();
		expect(await page.getByRole('heading', { name: 'Pay', exact: true }).isVisible()).toBe(true);
		await again.fill(printed(gross, 2));
		await page.getByText('Same load').waitFor();
		await page.getByRole('textbox', { name: 'Seller' }).fill('Orla Quennell');
		await page.getByRole('button', { name: 'Pay and save' }).click();
		await page.getByRole('heading', { name: 'Purchase A-0001' }).waitFor();
		const readAll = async (): Promise<string> => {
			await page.getByText('18 kt chain × 2').first().waitFor();
			return tidy(await page.getByRole('main').innerText());
		};
		const bought = await readAll();
		for (const figure of [`$${printed(value, 2)}`, `$${printed(offer, 2, true)}`, 'Orla Quennell']) expect(bought).toContain(figure);
		const at = page.url();
		await page.getByRole('link', { name: 'Stock' }).click();
		await page.getByRole('heading', { name: 'By class' }).waitFor();
		const readStock = async (): Promise<string> => tidy(await page.getByRole('main').innerText()).replace(/typed .*?:/, '');
		const stock = await readStock();
		expect(stock).toContain(`$${printed(value, 2)}`);

		// the app is closed, and opened again with the host still switched off
		const { profile } = first;
		await first.close();
		({ page } = await visit(site, { profile }));
		await page.goto(at);
		expect(await readAll()).toBe(bought);
		await page.getByRole('link', { name: 'Stock' }).click();
		await page.getByRole('heading', { name: 'By class' }).waitFor();
		expect(await readStock()).toBe(stock);
	});

	it('keeps a half-typed line through a reload, and a lot through being left', async () => {
		const { page } = await comeBackOffline('/');
		await addByLine(page, '14k ring 3.10 g');
		await line(page).fill('925 spoon 2');
		await page.waitForTimeout(600);
		await page.reload();
		await page.waitForFunction(() => document.querySelector<HTMLInputElement>('.entry input')?.value === '925 spoon 2');
		await page.getByText('14 kt ring').waitFor();
		// the lot can be set aside, and taken back
		await page.getByRole('button', { name: 'Set aside' }).click();
		await page.getByRole('button', { name: 'Set it aside' }).click();
		await said(page, 'Set aside.');
		await page.getByText('14 kt ring').waitFor({ state: 'detached' });
		await page.getByRole('button', { name: 'Undo' }).click();
		await page.getByText('14 kt ring').waitFor();
	});
});
