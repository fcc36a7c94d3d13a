import { fileURLToPath } from 'node:url';
import { sveltekit } from '@sveltejs/kit/vite';
import { svelte, vitePreprocess } from '@sveltejs/vite-plugin-svelte';
import type { Rolldown } from 'vite';
import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const alias = { $trade: here('src/trade'), $storage: here('src/storage'), $ui: here('src/ui') };

/** What the counter is drawn by. */
const COUNTER = ['src/routes/+layout.svelte', 'src/routes/+page.svelte'].map(here);

/**
 * Whether the counter needs a module to be drawn. These go into two files, packages and our own: many small ones cost a
 * request each and do not compress. All else is left to come file by file, when it is asked for.
 */
function drawsCounter(id: string, modules: Rolldown.ChunkingContext): boolean {
	const seen = new Set([id]);
	for (const each of seen) {
		if (COUNTER.includes(each)) return true;
		for (const importer of modules.getModuleInfo(each)?.importers ?? []) seen.add(importer);
	}
	return false;
}

const groups: Rolldown.CodeSplittingGroup[] = [
	{ name: (id, modules) => (id.includes('/node_modules/') && drawsCounter(id, modules) ? 'packages' : null) },
	{ name: (id, modules) => (drawsCounter(id, modules) ? 'counter' : null) }
];

export default defineConfig({
	plugins: process.env.VITEST ? [] : [sveltekit()],
	// the package's own door gives the whole of it in one old-style file; this is the same code as modules
	resolve: { alias: [{ find: /^dexie$/, replacement: here('node_modules/dexie/dist/modern/dexie.mjs') }] },
	build: {
		target: 'es2022',
		rolldownOptions: { output: { codeSplitting: { groups } } }
	},
	test: {
		projects: [
			{
				// runes in .svelte.ts files work as in the page: Svelte's own build for the browser
				plugins: [svelte({ configFile: false, preprocess: vitePreprocess() })],
				resolve: { alias, conditions: ['browser', 'development'] },
				test: {
					name: 'unit',
					include: ['test/**/*.test.ts'],
					exclude: ['test/published/**', 'test/browser/**', 'test/bench/**'],
					// properties run a thousand cases and more on whatever machine there is
					testTimeout: 60_000
				}
			},
			{ resolve: { alias }, test: { name: 'published', include: ['test/published/**/*.test.ts'], testTimeout: 60_000 } },
			{
				resolve: { alias },
				test: {
					name: 'browser',
					include: ['test/browser/**/*.test.ts'],
					globalSetup: ['test/browser/primed.ts'],
					testTimeout: 120_000,
					hookTimeout: 120_000
				}
			}
		]
	}
});
