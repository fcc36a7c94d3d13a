// npm test: everything that must hold, in order of how soon it tells something. The last line is "N passed, N failed".
// `npm test -- unit lint` runs only the named parts; further words go to vitest as file names.
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { availableParallelism, tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildReason, builds, runBuild } from './build.js';
import { requireChromium, requireNode, requirePackages, runTool } from './machine.js';
import { countTests } from './count.js';

/** @typedef {import('./count.js').Count} Count */

const chosen = process.argv.slice(2);
const reports = mkdtempSync(join(tmpdir(), 'meltbook-test-'));

/**
 * A step that either holds or not: one passed or one failed.
 * @param {Promise<number>} exit
 * @returns {Promise<Count>}
 */
async function one(exit) {
	return (await exit) === 0 ? { passed: 1, failed: 0, notes: [] } : { passed: 0, failed: 1, notes: ['it failed; the reason stands above'] };
}

/**
 * One project of vitest.config, its tests counted from vitest's own report.
 * @param {'unit' | 'published' | 'browser'} project
 * @param {Record<string, string>} [env]
 * @returns {Promise<Count>}
 */
async function tests(project, env = {}) {
	const report = join(reports, `${project}.json`);
	const files = chosen.filter((word) => !(word in parts));
	const exit = await runTool(
		'vitest/vitest.mjs',
		// by itself it leaves a core idle
		['run', '--project', project, `--maxWorkers=${availableParallelism()}`, '--allowOnly=false', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...files],
		{ env }
	);
	return countTests(existsSync(report) ? readFileSync(report, 'utf8') : null, exit);
}

async function types() {
	const synced = await runTool('@sveltejs/kit/svelte-kit.js', ['sync']);
	return synced !== 0 ? synced : runTool('svelte-check/bin/svelte-check', ['--tsconfig', './tsconfig.json', '--fail-on-warnings']);
}

async function allBuilds() {
	const all = { passed: 0, failed: 0, notes: /** @type {string[]} */ ([]) };
	for (const build of Object.values(builds)) add(all, await one(runBuild(build)));
	return all;
}

async function browser() {
	const chromium = await requireChromium();
	const stale = Object.values(builds).filter((build) => buildReason(build) !== null);
	for (const build of stale) {
		if ((await runBuild(build)) !== 0) return { passed: 0, failed: 1, notes: [`no site to test: ${build.out} was not built`] };
	}
	return tests('browser', { CHROME_PATH: chromium });
}

/** @type {Readonly<Record<string, () => Promise<Count>>>} */
const parts = {
	types: () => one(types()),
	trade: () => one(runTool('typescript/bin/tsc', ['-p', 'src/trade/tsconfig.json'])),
	lint: () => one(runTool('eslint/bin/eslint.js', ['--config', 'test/eslint.config.js', '--max-warnings', '0', '.'])),
	unit: () => tests('unit'),
	published: () => tests('published'),
	build: allBuilds,
	browser
};

/**
 * @param {Count} total
 * @param {Count} more
 */
function add(total, more) {
	total.passed += more.passed;
	total.failed += more.failed;
	total.notes.push(...more.notes);
}

/** @type {Count} */
const total = { passed: 0, failed: 0, notes: [] };
try {
	requireNode();
	await requirePackages();
	const wanted = Object.keys(parts).filter((name) => chosen.includes(name));
	// the browser tests stand or fail with Chromium: say so before the long part, not after it
	const names = wanted.length > 0 ? wanted : Object.keys(parts);
	if (names.includes('browser')) await requireChromium();
	for (const name of names) {
		const begun = Date.now();
		console.log(`\n== ${name} ==`);
		/** @type {Count} */
		let count;
		try {
			count = (await parts[name]?.()) ?? { passed: 0, failed: 1, notes: [] };
		} catch (error) {
			count = { passed: 0, failed: 1, notes: [error instanceof Error ? error.message : String(error)] };
		}
		add(total, { ...count, notes: count.notes.map((note) => `${name}: ${note}`) });
		console.log(`-- ${name}: ${count.passed} passed, ${count.failed} failed, ${Math.round((Date.now() - begun) / 1000)} s`);
	}
} catch (error) {
	add(total, { passed: 0, failed: 1, notes: [error instanceof Error ? error.message : String(error)] });
} finally {
	rmSync(reports, { recursive: true, force: true });
}
if (total.passed === 0 && total.failed === 0) add(total, { passed: 0, failed: 1, notes: ['nothing ran'] });
console.log('');
for (const note of total.notes) console.log(note);
process.exitCode = total.failed === 0 ? 0 : 1;
console.log(`${total.passed} passed, ${total.failed} failed`);
