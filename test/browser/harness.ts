// A site on a plain static host that can be switched off, and a person with a browser in front of it.
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { chromium, type BrowserContext, type Page } from 'playwright-core';
import { expect } from 'vitest';
import { findChromium, root } from '../tools/machine.js';

/** Where pictures of pages go; not kept in the repository. */
const SHOTS = join(root, 'test', 'browser', 'shots');

const FLAGS = [
	'--no-sandbox',
	'--disable-gpu',
	'--disable-quic',
	'--no-first-run',
	'--no-default-browser-check',
	'--disable-background-networking',
	'--disable-component-update',
	'--disable-sync',
	'--disable-domain-reliability'
];

function browserProgram(): string {
	const path = findChromium();
	if (path === null) throw new Error('No Chromium was found; `npm test` says how to get one.');
	return path;
}

/** A static host in a process of its own. Offline means that it is killed: the browser's own switch lies after a reload. */
export type Site = {
	readonly origin: string;
	/** The address of a path inside the app, the app's own base included: url('/book'). */
	url(path: string): string;
	/** Kills the host; from now on nothing answers at this origin. */
	stop(): Promise<void>;
	/** Serves again at the same origin, the same folder or another release. */
	restart(folder?: string): Promise<void>;
};

export async function openSite(folder: string): Promise<Site> {
	let host = await startHost(folder, 0);
	const { origin, base } = host;
	return {
		origin,
		url: (path) => `${origin}${base}${path}`,
		stop: () => endProcess(host.process),
		async restart(next = folder) {
			await endProcess(host.process);
			host = await startHost(next, Number(new URL(origin).port));
		}
	};
}

async function startHost(folder: string, port: number): Promise<{ process: ChildProcess; origin: string; base: string }> {
	const args = [join(root, 'test', 'tools', 'serve.js'), join(root, folder), '--port', String(port), '--exact'];
	const process_ = spawn(process.execPath, args, { stdio: ['ignore', 'pipe', 'inherit'] });
	const line = await firstLine(process_);
	const { origin, pathname } = new URL(line);
	return { process: process_, origin, base: pathname.replace(/\/$/, '') };
}

async function firstLine(child: ChildProcess): Promise<string> {
	const { stdout } = child;
	if (stdout === null) throw new Error('the host has no output to read');
	const reader = createInterface(stdout);
	const line = await Promise.race([
		once(reader, 'line').then(([text]) => String(text)),
		once(child, 'exit').then(([code]) => {
			throw new Error(`the host ended with exit code ${String(code)}`);
		})
	]);
	reader.close();
	stdout.resume();
	return line;
}

async function endProcess(child: ChildProcess): Promise<void> {
	if (child.exitCode !== null || child.signalCode !== null) return;
	const ended = once(child, 'exit');
	child.kill('SIGKILL');
	await ended;
}

/** What a page must never do, collected while it runs. */
export type Breaches = {
	readonly errors: string[];
	readonly policy: string[];
	readonly outside: string[];
};

/** A browser with a profile of its own, watched. */
export type Visitor = {
	readonly context: BrowserContext;
	readonly page: Page;
	readonly profile: string;
	readonly breaches: Breaches;
	/** Another tab, watched like the first. */
	newTab(): Promise<Page>;
	/** Closes the browser; fails when a page raised an error, broke the content policy or asked another host for anything. */
	close(): Promise<void>;
};

export type Device = 'phone' | 'desktop';

export type VisitOptions = {
	readonly device?: Device;
	/** The folder of an earlier visit, to open the same browser again. */
	readonly profile?: string;
	readonly colorScheme?: 'light' | 'dark';
	readonly locale?: string;
	/** Console errors that the test itself provokes, for example requests to a host that was switched off. */
	readonly tolerate?: RegExp;
};

const profiles: string[] = [];
process.once('exit', () => {
	for (const folder of profiles) rmSync(folder, { recursive: true, force: true });
});

export function newProfile(): string {
	const folder = mkdtempSync(join(tmpdir(), 'meltbook-profile-'));
	profiles.push(folder);
	return folder;
}

/** Opens a browser as a person would: 390x844 with touch, or a desktop window. */
export async function openVisitor(site: Pick<Site, 'origin'>, options: VisitOptions = {}): Promise<Visitor> {
	const profile = options.profile ?? newProfile();
	const phone = (options.device ?? 'phone') === 'phone';
	const context = await chromium.launchPersistentContext(profile, {
		executablePath: browserProgram(),
		headless: true,
		args: FLAGS,
		viewport: phone ? { width: 390, height: 844 } : { width: 1280, height: 800 },
		isMobile: phone,
		hasTouch: phone,
		deviceScaleFactor: 2,
		locale: options.locale ?? 'en-GB',
		colorScheme: options.colorScheme ?? 'light',
		acceptDownloads: true
	});
	const breaches = await watch(context, site.origin, options.tolerate);
	const page = context.pages()[0] ?? (await context.newPage());
	await grantLastingStorage(page, site.origin);
	return {
		context,
		page,
		profile,
		breaches,
		newTab: () => context.newPage(),
		async close() {
			await context.close();
			expectClean(breaches);
		}
	};
}

/** Fails with the list when anything was collected. */
export function expectClean(breaches: Breaches): void {
	expect(breaches, 'a page raised an error, broke its content policy or asked another host').toEqual({
		errors: [],
		policy: [],
		outside: []
	});
}

// what Chromium writes when the host is switched off; being offline is not an error of ours
const OFFLINE = /net::ERR_(CONNECTION_REFUSED|CONNECTION_RESET|EMPTY_RESPONSE|SOCKET_NOT_CONNECTED|INTERNET_DISCONNECTED|FAILED)/;
// a plain static host answers a deep link with 404.html and status 404: the page works, the console reports the status
const DEEP_LINK = /the server responded with a status of 404/;

async function watch(context: BrowserContext, origin: string, tolerate?: RegExp): Promise<Breaches> {
	const breaches: Breaches = { errors: [], policy: [], outside: [] };
	context.on('request', (request) => {
		const url = new URL(request.url());
		if (/^(https?|wss?):$/.test(url.protocol) && url.origin !== origin) breaches.outside.push(`${request.method()} ${url.href}`);
	});
	context.on('weberror', (error) => breaches.errors.push(String(error.error().stack ?? error.error())));
	context.on('console', (message) => {
		if (message.type() !== 'error' && message.type() !== 'warning') return;
		const text = message.text();
		if (/Content Security Policy|Content-Security-Policy/i.test(text)) {
			breaches.policy.push(text);
			return;
		}
		if (message.type() === 'warning' || OFFLINE.test(text)) return;
		if (DEEP_LINK.test(text) && !/\.[a-z0-9]+$/.test(new URL(message.location().url || origin).pathname)) return;
		if (tolerate?.test(text) !== true) breaches.errors.push(`console: ${text} (${message.location().url})`);
	});
	await context.addInitScript(() => {
		document.addEventListener('securitypolicyviolation', (event) => {
			console.error(`Content Security Policy: ${event.violatedDirective} refused ${event.blockedURI}`);
		});
	});
	return breaches;
}

/** The permission that a phone gives an installed app: storage that is not cleared to make room. It lasts as long as the session. */
export async function grantLastingStorage(page: Page, origin: string): Promise<void> {
	const session = await page.context().newCDPSession(page);
	await session.send('Browser.grantPermissions', { origin, permissions: ['durableStorage'] });
}

/** Waits until the site's worker controls the page, so that everything after it also works offline. */
export async function workerReady(page: Page): Promise<void> {
	await page.evaluate(async () => {
		await navigator.serviceWorker.ready;
	});
	await page.reload();
	await page.waitForFunction(() => navigator.serviceWorker.controller !== null);
}

/** A browser that the test started itself, so that its whole tree of processes can be killed. */
export type Doomed = {
	readonly context: BrowserContext;
	readonly page: Page;
	readonly profile: string;
	/** SIGKILL to every process of the browser at once: no handler of the page or the browser runs. */
	kill(): Promise<void>;
};

export async function openDoomed(site: Site, profile = newProfile()): Promise<Doomed> {
	rmSync(join(profile, 'DevToolsActivePort'), { force: true });
	rmSync(join(profile, 'SingletonLock'), { force: true });
	const args = ['--headless', '--remote-debugging-port=0', `--user-data-dir=${profile}`, ...FLAGS, 'about:blank'];
	const child = spawn(browserProgram(), args, { detached: true, stdio: ['ignore', 'ignore', 'pipe'] });
	const address = await debuggingAddress(child);
	const browser = await chromium.connectOverCDP(address);
	const context = browser.contexts()[0];
	if (context === undefined) throw new Error('the browser has no context to work in');
	const page = context.pages()[0] ?? (await context.newPage());
	await page.setViewportSize({ width: 390, height: 844 });
	await grantLastingStorage(page, site.origin);
	return {
		context,
		page,
		profile,
		async kill() {
			const ended = child.exitCode === null && child.signalCode === null ? once(child, 'exit') : Promise.resolve();
			for (const pid of treeOf(child.pid)) killHard(pid);
			await ended;
			await browser.close().catch(() => undefined);
		}
	};
}

function debuggingAddress(child: ChildProcess): Promise<string> {
	const { stderr } = child;
	if (stderr === null) throw new Error('the browser has no output to read');
	return new Promise((found, failed) => {
		let said = '';
		// stays attached, so that the pipe never fills
		stderr.setEncoding('utf8').on('data', (text: string) => {
			said = (said + text).slice(-20_000);
			const address = /DevTools listening on (ws:\S+)/.exec(said)?.[1];
			if (address !== undefined) found(address);
		});
		child.once('exit', () => failed(new Error(`the browser ended before it gave a debugging address:\n${said}`)));
		child.once('error', failed);
	});
}

/** A process and everything it started, children first collected so that none is missed when the parent dies. */
function treeOf(top: number | undefined): number[] {
	if (top === undefined) return [];
	const children = new Map<number, number[]>();
	for (const name of readdirSync('/proc')) {
		if (!/^\d+$/.test(name)) continue;
		try {
			// pid (name) state parent ...; the name may hold spaces and brackets
			const stat = readFileSync(`/proc/${name}/stat`, 'utf8');
			const parent = Number(stat.slice(stat.lastIndexOf(')') + 2).split(' ')[1]);
			children.set(parent, [...(children.get(parent) ?? []), Number(name)]);
		} catch {
			continue; // ended meanwhile
		}
	}
	const tree: number[] = [];
	const queue = [top];
	for (let pid = queue.shift(); pid !== undefined; pid = queue.shift()) {
		tree.push(pid);
		queue.push(...(children.get(pid) ?? []));
	}
	return tree;
}

function killHard(pid: number): void {
	try {
		process.kill(pid, 'SIGKILL');
	} catch (error) {
		if (!(error instanceof Error && 'code' in error && error.code === 'ESRCH')) throw error;
	}
}

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

type AxeViolation = { id: string; help: string; nodes: { html: string; failureSummary?: string }[] };

/** Fails when axe finds anything on the page as it stands, in light and in dark. */
export async function expectAccessible(page: Page, name: string): Promise<void> {
	await page.evaluate(axeSource);
	for (const colorScheme of ['light', 'dark'] as const) {
		await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
		const violations = await page.evaluate(async () => {
			const { axe } = globalThis as unknown as { axe: { run(options: object): Promise<{ violations: AxeViolation[] }> } };
			const result = await axe.run({
				runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']
			});
			return result.violations;
		});
		const found = violations.flatMap(({ id, help, nodes }) =>
			nodes.map((node) => `${id}: ${help}\n  ${node.html}\n  ${node.failureSummary ?? ''}`)
		);
		expect(found, `axe on ${name}, ${colorScheme}`).toEqual([]);
	}
	await page.emulateMedia({ colorScheme: null, reducedMotion: null });
}

/** Fails when the page is wider than a 320 px screen; names what sticks out. */
export async function expectNoSidewaysScroll(page: Page, name: string, width = 320): Promise<void> {
	const before = page.viewportSize();
	await page.setViewportSize({ width, height: 640 });
	const found = await page.evaluate(() => {
		const { scrollWidth, clientWidth } = document.documentElement;
		if (scrollWidth <= clientWidth) return [];
		const wide = [...document.body.querySelectorAll('*')]
			.filter((element) => element.getBoundingClientRect().right > clientWidth + 0.5)
			.map((element) => element.outerHTML.slice(0, 120));
		return [`${scrollWidth} px wide on ${clientWidth} px`, ...wide.slice(0, 10)];
	});
	if (before !== null) await page.setViewportSize(before);
	expect(found, `${name} scrolls sideways at ${width} px`).toEqual([]);
}

/** A picture of the page for the eye of the person who runs the tests. */
export async function shot(page: Page, name: string): Promise<void> {
	mkdirSync(SHOTS, { recursive: true });
	await page.screenshot({ path: join(SHOTS, `${name}.png`) });
}
