/// <reference lib="webworker" />
import { base, build, files, prerendered } from '$service-worker';
import {
	cleanupOutdatedCaches,
	createHandlerBoundToURL,
	getCacheKeyForURL,
	precacheAndRoute,
	type PrecacheEntry
} from 'workbox-precaching';
import { NavigationRoute, registerRoute } from 'workbox-routing';

/**
 * Keeps every file of one release and answers from there. It knows nothing of the business: no records, no
 * migrations. A newer release waits until a page, asked by the person, tells it to take over.
 */
declare const self: ServiceWorkerGlobalScope;

/** Digests of the files whose names do not change with their content; written in by the build (svelte.config.js). */
declare const MELTBOOK_DIGESTS: Readonly<Record<string, string>>;

const SHELL = `${base}/200.html`;

function entry(url: string): PrecacheEntry {
	const path = url.slice(base.length);
	// names under /immutable/ carry a digest of the content already
	if (path.includes('/immutable/')) return { url, revision: null };
	const revision = MELTBOOK_DIGESTS[path];
	if (revision === undefined) throw new Error(`the build wrote no digest for ${path}`);
	return { url, revision };
}

// pictures for the browser's own offer to install are no part of the app
const ours = files.filter((url) => !url.startsWith(`${base}/screenshots/`));
const needed = [...new Set([...build, ...ours, ...prerendered, SHELL])].map(entry);

precacheAndRoute(needed);
cleanupOutdatedCaches();
// "/" is answered by its own prerendered page above; every other page of the app by the shell
registerRoute(new NavigationRoute(createHandlerBoundToURL(SHELL)));

/** On the very first visit there is no older release to disturb, so the open page is taken in at once. */
let first = false;
self.addEventListener('install', () => {
	first = self.registration.active === null;
});
self.addEventListener('activate', (event) => {
	if (first) event.waitUntil(self.clients.claim());
});

async function countKept(): Promise<{ needed: number; kept: number }> {
	const found = await Promise.all(
		needed.map(async ({ url }) => (await caches.match(getCacheKeyForURL(url) ?? url)) !== undefined)
	);
	return { needed: needed.length, kept: found.filter(Boolean).length };
}

self.addEventListener('message', (event: ExtendableMessageEvent) => {
	const type: unknown = (event.data as { type?: unknown } | null)?.type;
	if (type === 'SKIP_WAITING') void self.skipWaiting();
	if (type === 'COUNT_KEPT') event.waitUntil(countKept().then((count) => event.ports[0]?.postMessage(count)));
});
