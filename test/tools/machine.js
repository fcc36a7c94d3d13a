// What the commands need from the machine: Node, the packages, a Chromium. Plain Node, because it runs before anything is installed.
import { spawn, spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync, readFileSync, statSync } from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of the repository. */
export const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** The oldest Node that every tool here runs on, as in "engines" of package.json. */
const OLDEST_NODE = [20, 19];

/**
 * Stops with a clear message when Node is too old; newer syntax in the tools would otherwise fail with a riddle.
 * @param {string} [version]
 */
export function requireNode(version = process.versions.node) {
	const [major = 0, minor = 0] = version.split('.').map(Number);
	const [leastMajor = 0, leastMinor = 0] = OLDEST_NODE;
	if (major > leastMajor || (major === leastMajor && minor >= leastMinor)) return;
	throw new Error(`Meltbook needs Node ${OLDEST_NODE.join('.')} or newer; this is Node ${version}.`);
}

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
	process.on(signal, () => {
		for (const child of running) child.kill(signal);
		process.exit(1);
	});
}

/**
 * Runs a program to its end, its output passed through, without a terminal and without input.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ env?: Record<string, string>, minutes?: number }} [options]
 * @returns {Promise<number>} the exit code; 1 when it was killed or could not start
 */
export function runProgram(command, args, options = {}) {
	return new Promise((resolve) => {
		const child = spawn(command, args, {
			cwd: root,
			stdio: ['ignore', 'inherit', 'inherit'],
			env: { ...process.env, ...options.env }
		});
		running.add(child);
		const limit = options.minutes ?? 20;
		const timer = setTimeout(() => {
			console.error(`${command} did not end within ${limit} minutes and was stopped.`);
			child.kill('SIGKILL');
		}, limit * 60_000);
		/** @param {number} code */
		const end = (code) => {
			clearTimeout(timer);
			running.delete(child);
			resolve(code);
		};
		child.on('error', (error) => {
			console.error(`${command} could not be started: ${error.message}`);
			end(1);
		});
		child.on('close', (code, signal) => {
			if (signal !== null) console.error(`${command} was ended by ${signal}.`);
			end(code ?? 1);
		});
	});
}

/**
 * Runs a tool of node_modules by its entry file, so that no shell and no shim is in between.
 * @param {string} file for example "vite/bin/vite.js"
 * @param {readonly string[]} args
 * @param {{ env?: Record<string, string>, minutes?: number }} [options]
 */
export function runTool(file, args, options = {}) {
	return runProgram(process.execPath, [join(root, 'node_modules', file), ...args], options);
}

/**
 * Why the packages have to be installed, or null when node_modules holds what the lock file says.
 * @param {string} folder
 * @returns {string | null}
 */
export function installReason(folder) {
	const installed = join(folder, 'node_modules', '.package-lock.json');
	if (!existsSync(installed)) return 'node_modules is missing';
	const wanted = packagesOf(join(folder, 'package-lock.json'));
	const have = packagesOf(installed);
	for (const [path, entry] of Object.entries(wanted)) {
		// packages for other systems are optional and are not installed here
		if (path === '' || entry.optional === true) continue;
		if (have[path]?.version !== entry.version) return `${path} is not the version of package-lock.json`;
	}
	return null;
}

/**
 * @param {string} file
 * @returns {Record<string, { version?: string, optional?: boolean }>}
 */
function packagesOf(file) {
	try {
		return JSON.parse(readFileSync(file, 'utf8')).packages ?? {};
	} catch {
		return {};
	}
}

/** Installs exactly what package-lock.json says when it is not there yet. No install script of any package is run. */
export async function requirePackages() {
	const reason = installReason(root);
	if (reason === null) return;
	console.log(`Installing the packages (${reason}) ...`);
	const args = ['ci', '--ignore-scripts', '--no-audit', '--no-fund'];
	const npm = process.env.npm_execpath;
	const code =
		npm !== undefined && /\.c?js$/.test(npm)
			? await runProgram(process.execPath, [npm, ...args])
			: await runProgram(process.platform === 'win32' ? 'npm.cmd' : 'npm', args);
	if (code !== 0) throw new Error('The packages could not be installed; the reason stands above.');
}

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome', 'chrome.exe'];
const PLACES = [
	'/usr/bin',
	'/usr/local/bin',
	'/usr/lib/chromium',
	'/usr/lib/chromium-browser',
	'/opt/google/chrome',
	'/snap/bin',
	'/opt/homebrew/bin'
];
const WHOLE_PATHS = [
	'/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
	'/Applications/Chromium.app/Contents/MacOS/Chromium',
	'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
	'C:\\Program Files (x86)\\Google\\Chrome\\Application\\chrome.exe'
];

/**
 * The path of a Chromium or Chrome on this machine, or null. CHROME_PATH decides when it is set.
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {string | null}
 */
export function findChromium(env = process.env) {
	const named = env.CHROME_PATH;
	if (named !== undefined && named !== '') {
		if (isProgram(named)) return named;
		throw new Error(`CHROME_PATH names ${named}, which is not a program.`);
	}
	const folders = [...(env.PATH ?? '').split(delimiter).filter((folder) => folder !== ''), ...PLACES];
	const paths = [...NAMES.flatMap((name) => folders.map((folder) => join(folder, name))), ...WHOLE_PATHS];
	return paths.find(isProgram) ?? null;
}

/** @param {string} path */
function isProgram(path) {
	try {
		accessSync(path, constants.X_OK);
		return statSync(path).isFile();
	} catch {
		return false;
	}
}

/**
 * The path of a Chromium that answers; installs Debian's package when there is none and this machine allows it.
 * @returns {Promise<string>}
 */
export async function requireChromium() {
	let path = findChromium();
	if (path === null && process.getuid?.() === 0 && spawnSync('apt-get', ['--version']).status === 0) {
		console.log('Installing Chromium with apt-get ...');
		const env = { DEBIAN_FRONTEND: 'noninteractive' };
		await runProgram('apt-get', ['update'], { env });
		await runProgram('apt-get', ['install', '-y', '--no-install-recommends', 'chromium'], { env });
		path = findChromium();
	}
	if (path === null) {
		throw new Error(
			'The browser tests need Chromium or Chrome and found none. Install one, or set CHROME_PATH to the program, and run again.'
		);
	}
	const answer = spawnSync(path, ['--version', '--no-sandbox'], { encoding: 'utf8', timeout: 60_000 });
	if (answer.status !== 0) {
		throw new Error(`${path} does not start: ${answer.stderr || answer.error?.message || 'no reason given'}`);
	}
	console.log(`Browser: ${path} (${answer.stdout.trim()})`);
	return path;
}
