import type { Locator, Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll, openDoomed, openSite, openVisitor, shot } from './harness.ts';
import { startSite, visit } from './visits.ts';

const places = (page: Page) => page.getByRole('navigation', { name: 'Places' });
const place = (page: Page, name: string) => places(page).getByRole('link', { name, exact: true });

async function expectAt(page: Page, name: string): Promise<void> {
	await page.waitForFunction(
		(wanted) => document.querySelector('nav [aria-current="page"]')?.textContent?.trim() === wanted,
		name
	);
	expect(await page.getByRole('main').isVisible()).toBe(true);
}

/** The app says by itself that it works offline, once every file is kept. */
async function readyForOffline(page: Page): Promise<void> {
	await page.getByText('Ready for offline').waitFor();
	expect(await page.evaluate(() => navigator.serviceWorker.controller?.state)).toBe('activated');
}

describe.each([
	['at the root of a host', 'build', ''],
	['under a path', 'build-path', '/meltbook']
])('the app %s', (_, folder, base) => {
	it('works without a signal after one visit, deep links and reloads included', async () => {
		const host = await startSite(folder);
		const { page } = await visit(host);
		await page.goto(host.url('/'));
		expect(new URL(page.url()).pathname).toBe(`${base}/`);
		await readyForOffline(page);
		await host.stop();

		await page.reload();
		await expectAt(page, 'Counter');
		await page.goto(host.url('/stock'));
		await expectAt(page, 'Stock');
		await page.reload();
		await expectAt(page, 'Stock');
		await place(page, 'Prices').tap();
		await expectAt(page, 'Prices');
		expect(new URL(page.url()).pathname).toBe(`${base}/prices`);
		await page.goBack();
		await expectAt(page, 'Stock');
		const missing = await page.evaluate((url) => fetch(url).then(() => 'answered', () => 'no signal'), host.url('/never-kept.json'));
		expect(missing, 'the host is really off').toBe('no signal');
	});

	it('opens at a deep link on a host that knows files only, and is then kept', async () => {
		const host = await startSite(folder);
		const { page } = await visit(host);
		const answer = await page.goto(host.url('/book'));
		expect(answer?.status()).toBe(404);
		await expectAt(page, 'Book');
		await readyForOffline(page);
		await host.stop();
		await page.reload();
		await expectAt(page, 'Book');
		await page.goto(host.url('/'));
		await expectAt(page, 'Counter');
	});
});

/** Which release a tab runs: the names of its entry files carry a digest of their content. */
async function release(page: Page): Promise<string> {
	return page.evaluate(() =>
		performance
			.getEntriesByType('resource')
			.map(({ name }) => /\/immutable\/entry\/[^/]+$/.exec(name)?.[0] ?? '')
			.filter((name) => name !== '')
			.sort()
			.filter((name, index, all) => name !== all[index - 1])
			.join(' ')
	);
}

/** What a tab knows of its release, for the message of a test that fails. */
async function state(): Promise<string> {
	const registration = await navigator.serviceWorker.getRegistration();
	const workers = [registration?.installing?.state, registration?.waiting?.state, registration?.active?.state];
	return JSON.stringify({ workers, controlled: navigator.serviceWorker.controller !== null, text: document.body.innerText.slice(0, 500) });
}

/** Presses a button as a person does: again, if it does not answer. */
async function press(button: Locator): Promise<void> {
	const answered = async (): Promise<boolean> => !(await button.isVisible()) || (await button.isDisabled({ timeout: 1_000 }).catch(() => true));
	for (let times = 0; times < 3 && !(await answered()); times += 1) {
		await button.click();
		await expect.poll(answered, { timeout: 5_000 }).toBe(true).catch(() => undefined);
	}
	expect(await answered(), 'the button does not answer').toBe(true);
}

describe('a new release', () => {
	it('waits until it is asked for, then takes over both tabs, once, without a signal', async () => {
		const host = await startSite('build');
		const visitor = await visit(host);
		const { page: first } = visitor;
		await first.goto(host.url('/'));
		await readyForOffline(first);
		const second = await visitor.newTab();
		await second.goto(host.url('/stock'));
		await expectAt(second, 'Stock');
		const old = await release(first);
		expect(old).not.toBe('');
		expect(await release(second)).toBe(old);

		await host.restart('build-next');
		// a tab asks for a newer release when the signal comes back
		await first.evaluate(() => dispatchEvent(new Event('online')));
		const button = (page: Page) => page.getByRole('button', { name: 'Update now' });
		await button(first).waitFor();
		await button(second).waitFor();
		await first.reload();
		await button(first).waitFor();
		expect(await release(first), 'a reload alone does not change the release').toBe(old);

		// A browser that is watched, as here, ends a worker with work in hand when a newer one wants its place, and starts it again
		// for that work: the place is then free only half a minute later. So the reloaded tab, and the browser's own look for a newer
		// release a second after a load, come to rest first.
		await readyForOffline(first);
		await first.waitForTimeout(2_000);
		await host.stop();
		const loads = [0, 0];
		first.on('load', () => (loads[0]! += 1));
		second.on('load', () => (loads[1]! += 1));
		await second.bringToFront();
		await press(button(second));
		for (const page of [first, second]) {
			const taken = page.waitForFunction(
				(before) => document.readyState === 'complete' && performance.now() > 1_500 && performance.getEntriesByType('resource').some(
					({ name }) => name.includes('/immutable/entry/') && !before.includes(name.slice(name.indexOf('/immutable/')))
				),
				old,
				// frames are not drawn in a tab that lies behind another; a worker that is just starting keeps its place for half a minute
				{ polling: 200, timeout: 75_000 }
			);
			await taken.catch(async (reason: unknown) => {
				throw new Error(`not taken over at ${page.url()}: ${await first.evaluate(state)}, ${await second.evaluate(state)}`, { cause: reason });
			});
		}
		await expectAt(first, 'Counter');
		await expectAt(second, 'Stock');
		expect(await release(first)).not.toBe(old);
		expect(await release(second)).toBe(await release(first));
		expect(await button(first).isVisible()).toBe(false);
		expect(loads, 'each tab is loaded afresh exactly once').toEqual([1, 1]);
	});
});

describe('the frame of the app', () => {
	it('can be installed', async () => {
		const host = await startSite('build');
		const { page } = await visit(host);
		await page.goto(host.url('/'));
		await readyForOffline(page);
		const session = await page.context().newCDPSession(page);
		const { errors, url } = await session.send('Page.getAppManifest');
		expect(url).toBe(host.url('/manifest.webmanifest'));
		expect(errors).toEqual([]);
		expect((await session.send('Page.getInstallabilityErrors')).installabilityErrors).toEqual([]);
	});

	it('is reached by keyboard, found clean by axe and does not scroll sideways', async () => {
		const host = await startSite('build');
		const { page } = await visit(host, { device: 'desktop' });
		await page.goto(host.url('/'));
		await readyForOffline(page);
		await page.reload();
		await expectAt(page, 'Counter');
		await page.keyboard.press('Tab');
		expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Skip to the page');
		const reached = new Set<string>();
		for (let steps = 0; steps < 60 && !reached.has('Book'); steps += 1) {
			await page.keyboard.press('Tab');
			reached.add((await page.evaluate(() => document.activeElement?.textContent?.trim())) ?? '');
		}
		expect([...reached]).toEqual(expect.arrayContaining(['Counter', 'Stock', 'Prices', 'Book']));
		await expectAccessible(page, 'the counter');
		await expectNoSidewaysScroll(page, 'the counter');
		await shot(page, 'shell-desktop');
	});

	it('opens again offline after the browser was killed', async () => {
		const host = await startSite('build');
		const doomed = await openDoomed(host);
		await doomed.page.goto(host.url('/'));
		await readyForOffline(doomed.page);
		await doomed.kill();
		await host.stop();
		const { page } = await visit(host, { profile: doomed.profile });
		await page.goto(host.url('/prices'));
		await expectAt(page, 'Prices');
	});
});

describe('the watch over pages', () => {
	it('reports an error, a breach of the content policy and a request to another host', async () => {
		const host = await startSite('build');
		const visitor = await openVisitor(host);
		await visitor.page.goto(host.url('/'));
		await visitor.page.evaluate(() => {
			setTimeout(() => {
				throw new Error('planted');
			}, 0);
			const script = document.createElement('script');
			script.textContent = 'globalThis.planted = true';
			document.body.append(script);
		});
		const other = await openSite('build');
		// a file without the policy of the app, so that its request really leaves
		await visitor.page.goto(host.url('/manifest.webmanifest'));
		await visitor.page.evaluate((url) => fetch(url, { mode: 'no-cors' }).catch(() => undefined), other.url('/'));
		await other.stop();
		// this one is closed before it is judged, so that nothing stays open when the judgement fails
		await expect(visitor.close()).rejects.toThrow(/raised an error/);
		const { errors, policy, outside } = visitor.breaches;
		// a bare file has no page of ours to name its icon, so the browser asks for the usual one
		expect(errors.filter((error) => !error.includes('/favicon.ico'))).toEqual([expect.stringContaining('planted')]);
		expect(policy.join('\n')).toContain('script-src');
		expect(outside).toEqual([`GET ${other.url('/')}`]);
	});
});
