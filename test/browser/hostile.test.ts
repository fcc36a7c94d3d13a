import type { Locator, Page } from 'playwright-core';
import { expect, it } from 'vitest';
import { firstVisit } from './visits.ts';

// Whatever is typed or pasted into a field, the screen answers with a right value or a clear problem: never with what a program
// says to itself, never with markup taken for markup, and never with digits that nobody typed.

const numbers = [
	'12,34', '1.234,5', '1,234.5', '1,234', '1.234', '1e9', '1E-3', '-3', '\u22123', '+3', '--3', '3-', '0', '-0', '00', '0x10', '0b1', '1_000', '1 000', "1'000",
	'1\u00a0000', '1\u202f000,5', '١٢٣', '１２３', '৪', 'Ⅻ', '½', '1/2', '∞', 'NaN', 'Infinity', '-Infinity', 'undefined', 'null', 'true', '[object Object]', '1..2',
	'1.2.3', '.', ',', '.,', '5.', '.5', ',5', '12 g', '12g', '$12', '12%', '12‰', '😀', '12😀', '\u200b12', '12\u200b', '\u202e21', '\ufeff12', '9'.repeat(16),
	'9'.repeat(400), `0.${'0'.repeat(40)}1`, '1,2,3', '12,345,678', '12.345.678', '1,23,456', '=1+1', '@SUM(1)', '+1+1', '<b>12</b>', '<img src=x onerror=alert(1)>',
	'"12"', "'12", '12;13', '12\t13', '${12}', '{{12}}', '%00', '\\u0031', '../12', 'DROP TABLE', '１２．３', '12．3', '12·3', '12:3', '12_3', '1 2', ' 12 ', '12 ', '١٢٫٥'
];
const around: readonly ((text: string) => string)[] = [(text) => text, (text) => `14k ring ${text} g`, (text) => `${text} 5 g`, (text) => `14k ${text} 5 g x${text}`];
const hostileLines = numbers.flatMap((text) => around.map((make) => make(text)));

const BAD = /NaN|Infinity|undefined|\[object|null\b|e[+-]\d\d/;

/** Types each text and gives back what the page says to it. */
async function answers(page: Page, field: Locator, texts: readonly string[], said: string): Promise<readonly string[]> {
	const found: string[] = [];
	for (const text of texts) {
		await field.fill(text);
		found.push(
			await page.evaluate(async (selector) => {
				await new Promise(requestAnimationFrame);
				return [...document.querySelectorAll<HTMLElement>(selector)].map((element) => element.innerText).join('\n');
			}, said)
		);
	}
	return found;
}

/** What a page says beyond the words that were typed, which it may say back. */
function beyond(answer: string, typed: string): string {
	const words = typed.split(/[^\p{L}\p{N}]+/u).filter((word) => word !== '');
	return words.reduce((left, word) => left.replaceAll(word, ''), answer).replaceAll(/“[^”]*”/g, '');
}

it('hostile text in the fields gives a value or a problem', async () => {
	const { site, page } = await firstVisit();
	await page.goto(site.url('/prices'));
	const gold = page.getByRole('textbox', { name: 'Gold', exact: true });
	expect(hostileLines.length).toBeGreaterThanOrEqual(200);
	for (const [index, answer] of (await answers(page, gold, numbers, 'main')).entries()) {
		expect(beyond(answer, numbers[index]!), numbers[index]).not.toMatch(BAD);
	}
	await gold.fill('4186.20');
	await page.getByRole('button', { name: 'Save prices' }).click();
	await page.getByText('Prices saved.').waitFor();

	await page.getByRole('link', { name: 'Counter' }).click();
	const line = page.getByLabel('Mass, mark, article and count of a piece');
	await line.fill('14k ring 5 g');
	await page.getByText('14 kt ring, 5').waitFor();
	for (const [index, answer] of (await answers(page, line, hostileLines, '.dock .answer')).entries()) {
		const typed = hostileLines[index]!;
		expect(beyond(answer, typed), typed).not.toMatch(BAD);
		if (typed.trim() !== '') expect(answer.trim(), `no answer to ${typed}`).not.toBe('');
		// a hundredfold: the mass said back holds the digits that were typed, in their order (half a gram may be typed as 1/2)
		const mass = /, ([\d.,\s]+)\sg(?: together)? · taken/.exec(answer)?.[1];
		if (mass !== undefined && !/[/½]/.test(typed)) {
			const digits = (text: string): string => text.replace(/\D/g, '').replace(/^0+/, '');
			expect(typed.replace(/\D/g, ''), `${typed} was read as ${mass} g`).toContain(digits(mass));
		}
	}
	expect(await page.locator('.dock img, .dock b').count()).toBe(0);

	await line.fill('14k ring 5 g');
	await line.press('Enter');
	await page.getByRole('link', { name: /14 kt ring/ }).waitFor();
	const asked = page.getByRole('textbox', { name: 'Asked price' });
	for (const [index, answer] of (await answers(page, asked, numbers, 'aside')).entries()) {
		expect(beyond(answer, numbers[index]!), numbers[index]).not.toMatch(BAD);
	}
	await page.getByRole('link', { name: /14 kt ring/ }).click();
	await page.getByRole('heading', { name: '14 kt ring', level: 1 }).waitFor();
	for (const name of ['Mass of all pieces together', 'Mark', 'Fineness', 'How many']) {
		const field = page.getByRole('textbox', { name, exact: true });
		const before = await field.inputValue();
		for (const [index, answer] of (await answers(page, field, numbers, 'main, .dock')).entries()) {
			expect(beyond(answer, numbers[index]!), `${name}: ${numbers[index]}`).not.toMatch(BAD);
		}
		await field.fill(before);
	}
}, 180_000);
