// Once for all files: a browser that has visited the site and keeps the app, with an empty book. The host is gone by the time a test begins.
import { rmSync } from 'node:fs';
import type { TestProject } from 'vitest/node';
import { openSite, openVisitor, workerReady } from './harness.ts';

declare module 'vitest' {
	interface ProvidedContext {
		been: { readonly profile: string; readonly origin: string };
	}
}

export default async function prime(project: TestProject): Promise<() => void> {
	const site = await openSite('build');
	const visitor = await openVisitor(site);
	await visitor.page.goto(site.url('/'));
	const ready = visitor.page.locator('.banner').filter({ hasText: 'Ready for offline' }).getByRole('button', { name: 'Good' });
	await ready.click();
	await workerReady(visitor.page);
	await visitor.close();
	await site.stop();
	project.provide('been', { profile: visitor.profile, origin: site.origin });
	return () => rmSync(visitor.profile, { recursive: true, force: true });
}
