// Sites and visitors for the tests of one file, closed after each test, so that no test can forget to ask whether a page broke a rule.
import { cpSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterEach, inject } from 'vitest';
import { newProfile, openSite, openVisitor, type Site, type VisitOptions, type Visitor } from './harness.ts';

const sites: Site[] = [];
const visitors: Visitor[] = [];

afterEach(async () => {
	const closing = visitors.splice(0).map((visitor) => visitor.close());
	const closed = await Promise.allSettled([...closing, ...sites.splice(0).map((site) => site.stop())]);
	for (const one of closed) if (one.status === 'rejected') throw one.reason;
});

export async function startSite(folder = 'build'): Promise<Site> {
	const site = await openSite(folder);
	sites.push(site);
	return site;
}

export async function visit(site: Pick<Site, 'origin'>, options?: VisitOptions): Promise<Visitor> {
	const visitor = await openVisitor(site, options);
	visitors.push(visitor);
	return visitor;
}

/** A first visit to the counter, with the host there. */
export async function firstVisit(options?: VisitOptions): Promise<{ site: Site; page: Page }> {
	const site = await startSite();
	const { page } = await visit(site, options);
	await page.goto(site.url('/'));
	return { site, page };
}

/** A page of a browser that was here once before (primed.ts), with an empty book, and whose host is switched off. */
export async function comeBackOffline(path: string, options?: VisitOptions): Promise<{ site: Away; visitor: Visitor; page: Page }> {
	const been = inject('been');
	const profile = newProfile();
	cpSync(been.profile, profile, { recursive: true });
	const site: Away = { origin: been.origin, url: (at) => `${been.origin}${at}` };
	const visitor = await visit(site, { ...options, profile });
	await visitor.page.goto(site.url(path));
	return { site, visitor, page: visitor.page };
}

/** A site that nobody serves any more. */
export type Away = Pick<Site, 'origin' | 'url'>;
