import { createHash } from 'node:crypto';
import { copyFileSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import adapter from '@sveltejs/adapter-static';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** The folder the finished site is written to; the browser tests build a second release beside it. */
const out = process.env.MELTBOOK_OUT ?? 'build';

/** Path under which the site is served, for example "/meltbook"; empty at the root of a host. */
const base = /** @type {'' | `/${string}`} */ (process.env.BASE_PATH ?? '');

/**
 * The name of this release: the package version and a digest of what it is built from. The same sources
 * give the same name on every machine, so the service worker updates when, and only when, something changed.
 */
function releaseName() {
	const digest = createHash('sha256');
	/** @param {string} path */
	const take = (path) => {
		if (statSync(path).isDirectory()) {
			for (const name of readdirSync(path).sort()) take(join(path, name));
		} else {
			digest.update(path).update(readFileSync(path));
		}
	};
	for (const path of ['src', 'static', 'service-worker', 'package-lock.json', 'svelte.config.js', 'vite.config.ts']) take(path);
	digest.update(base).update(process.env.MELTBOOK_RELEASE ?? '');
	const { version } = JSON.parse(readFileSync('package.json', 'utf8'));
	return `${version}-${digest.digest('hex').slice(0, 8)}`;
}

/** The most that a first visit may have to keep for offline, in bytes. */
const MOST_KEPT = 2_000_000;

/**
 * Writes into the service worker the digest of every file that it keeps under a name which does not change with the
 * content: the pages and the static files. So a file is fetched again when, and only when, its content has changed.
 */
function writeDigests() {
	/** @type {Record<string, string>} */
	const digests = {};
	let kept = 0;
	for (const name of readdirSync(out, { recursive: true, encoding: 'utf8' }).sort()) {
		const file = join(out, name);
		const path = `/${name.replaceAll('\\', '/')}`;
		if (statSync(file).isDirectory() || path === '/service-worker.js' || path === '/404.html') continue;
		const content = readFileSync(file);
		kept += content.length;
		if (path.includes('/immutable/')) continue;
		digests[path.replace(/\/index\.html$/, '/')] = createHash('sha256').update(content).digest('hex').slice(0, 16);
	}
	if (kept > MOST_KEPT) throw new Error(`a first visit would keep ${kept} bytes, more than ${MOST_KEPT}`);
	const worker = join(out, 'service-worker.js');
	const script = readFileSync(worker, 'utf8');
	if (!script.includes('MELTBOOK_DIGESTS')) throw new Error('the service worker does not ask for MELTBOOK_DIGESTS');
	writeFileSync(worker, script.replaceAll('MELTBOOK_DIGESTS', `(${JSON.stringify(digests)})`));
}

/**
 * adapter-static, then the copy that makes plain static hosts answer deep links with the app, then the digests.
 */
function staticSite() {
	const inner = adapter({ pages: out, assets: out, fallback: '200.html', strict: true });
	return {
		...inner,
		/** @param {import('@sveltejs/kit').Builder} builder */
		async adapt(builder) {
			await inner.adapt(builder);
			copyFileSync(join(out, '200.html'), join(out, '404.html'));
			writeDigests();
		}
	};
}

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	kit: {
		adapter: staticSite(),
		outDir: process.env.MELTBOOK_KIT ?? '.svelte-kit',
		alias: { $trade: 'src/trade', $storage: 'src/storage', $ui: 'src/ui' },
		files: { serviceWorker: 'service-worker/index.ts', assets: 'static' },
		serviceWorker: { register: false },
		paths: { base, relative: false },
		version: { name: releaseName() },
		prerender: { entries: ['/'], crawl: false },
		csp: {
			mode: 'hash',
			directives: {
				'default-src': ['self'],
				'script-src': ['self'],
				// the router's live announcer carries a style attribute
				'style-src': ['self', 'unsafe-inline'],
				'img-src': ['self', 'blob:', 'data:'],
				'font-src': ['self'],
				'connect-src': ['self'],
				'worker-src': ['self'],
				'manifest-src': ['self'],
				'object-src': ['none'],
				'base-uri': ['none'],
				'form-action': ['none']
			}
		}
	}
};
