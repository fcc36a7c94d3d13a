import { fileURLToPath } from 'node:url';
import { sveltekit } from '@sveltejs/kit/vite';
import { svelte, vitePreprocess } from '@sveltejs/vite-plugin-svelte';
import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const alias = { $trade: here('src/trade'), $storage: here('src/storage'), $ui: here('src/ui') };

export default defineConfig({
	plugins: process.env.VITEST ? [] : [sveltekit()],
	build: { target: 'es2022' },
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
					fileParallelism: false,
					testTimeout: 120_000,
					hookTimeout: 120_000
				}
			}
		]
	}
});
