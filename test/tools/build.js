// Builds of the site: the one people get, one under a path, and a second release for the update tests.
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { root, runTool } from './machine.js';

/**
 * @typedef {{ out: string, base: string, release: string, kit: string }} Build
 * `kit` is SvelteKit's own working folder: one for each build, so that they cannot disturb one another.
 */

/** @type {Readonly<Record<'main' | 'path' | 'next', Build>>} */
export const builds = {
	main: { out: 'build', base: process.env.BASE_PATH ?? '', release: process.env.MELTBOOK_RELEASE ?? '', kit: '.svelte-kit' },
	path: { out: 'build-path', base: '/meltbook', release: '', kit: '.svelte-kit/path' },
	next: { out: 'build-next', base: '', release: 'next', kit: '.svelte-kit/next' }
};

const SOURCES = ['src', 'static', 'service-worker', 'package.json', 'package-lock.json', 'svelte.config.js', 'vite.config.ts'];

/**
 * @param {Build} build
 * @returns {Promise<number>} the exit code
 */
export function runBuild(build) {
	return runTool('vite/bin/vite.js', ['build', '--logLevel', 'warn'], {
		env: { MELTBOOK_OUT: build.out, BASE_PATH: build.base, MELTBOOK_RELEASE: build.release, MELTBOOK_KIT: build.kit }
	});
}

/**
 * Why a build has to be made, or null when it is newer than everything it is made from.
 * @param {Build} build
 * @returns {string | null}
 */
export function buildReason(build) {
	const page = join(root, build.out, '404.html');
	if (!existsSync(page)) return 'there is none yet';
	if (baseOf(join(root, build.out)) !== build.base) return `it is to be served under "${build.base}/"`;
	const made = statSync(page).mtimeMs;
	const newer = SOURCES.find((path) => newest(join(root, path)) > made);
	return newer === undefined ? null : `${newer} has changed`;
}

/**
 * The newest change in a file or folder, in milliseconds; a removed file shows in its folder's own time.
 * @param {string} path
 * @returns {number}
 */
function newest(path) {
	if (!existsSync(path)) return 0;
	const stat = statSync(path);
	if (!stat.isDirectory()) return stat.mtimeMs;
	return Math.max(stat.mtimeMs, ...readdirSync(path).map((name) => newest(join(path, name))));
}

/**
 * The path under which a finished site expects to be served, read from its own page: "" at the root of a host.
 * @param {string} folder
 * @returns {string}
 */
export function baseOf(folder) {
	const page = readFileSync(join(folder, '404.html'), 'utf8');
	return /["'(](\/[^"'()]*?)?\/_app\//.exec(page)?.[1] ?? '';
}
