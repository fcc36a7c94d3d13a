import { fileURLToPath } from 'node:url';
import { sveltekit } from '@sveltejs/kit/vite';
import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const alias = { $trade: here('src/trade'), $storage: here('src/storage'), $ui: here('src/ui') };

export default defineConfig({
	plugins: process.env.VITEST ? [] : [sveltekit()],
	build: { target: 'es2022' },
	test: {
		projects: [
			{
				resolve: { alias },
				test: {
					name: 'unit',
					include: ['test/**/*.test.ts'],
					exclude: ['test/published/**', 'test/browser/**', 'test/bench/**']
				}
			},
			{ resolve: { alias }, test: { name: 'published', include: ['test/published/**/*.test.ts'] } },
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
