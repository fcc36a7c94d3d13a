// A plain static host, as a shop would rent one: files, their types, 404.html for what is not there, and nothing else.
import { createReadStream } from 'node:fs';
import { realpath, stat } from 'node:fs/promises';
import { createServer } from 'node:http';
import { networkInterfaces } from 'node:os';
import { extname, join, resolve, sep } from 'node:path';
import { pathToFileURL } from 'node:url';
import { baseOf } from './build.js';

/** @type {Readonly<Record<string, string>>} */
const TYPES = {
	'.css': 'text/css; charset=utf-8',
	'.csv': 'text/csv; charset=utf-8',
	'.gz': 'application/gzip',
	'.html': 'text/html; charset=utf-8',
	'.ico': 'image/x-icon',
	'.jpg': 'image/jpeg',
	'.js': 'text/javascript; charset=utf-8',
	'.json': 'application/json; charset=utf-8',
	'.map': 'application/json; charset=utf-8',
	'.mjs': 'text/javascript; charset=utf-8',
	'.png': 'image/png',
	'.svg': 'image/svg+xml',
	'.txt': 'text/plain; charset=utf-8',
	'.wasm': 'application/wasm',
	'.webmanifest': 'application/manifest+json; charset=utf-8',
	'.webp': 'image/webp',
	'.woff2': 'font/woff2'
};

/**
 * Answers requests for the files of one folder under one path.
 * @param {string} folder
 * @param {string} base "" or "/path"
 * @returns {import('node:http').RequestListener}
 */
export function staticHost(folder, base) {
	const top = resolve(folder);
	return (request, response) => {
		answer(top, base, request, response).catch((error) => {
			if (!response.headersSent) plain(response, 500, `The server failed: ${error.message}`);
			else response.destroy();
		});
	};
}

/**
 * @param {string} top
 * @param {string} base
 * @param {import('node:http').IncomingMessage} request
 * @param {import('node:http').ServerResponse} response
 */
async function answer(top, base, request, response) {
	if (request.method !== 'GET' && request.method !== 'HEAD') {
		response.setHeader('allow', 'GET, HEAD');
		return plain(response, 405, 'Only GET and HEAD.');
	}
	const [rawPath = '/', query] = (request.url ?? '/').split('?', 2);
	let path;
	try {
		path = decodeURIComponent(rawPath);
	} catch {
		return plain(response, 400, 'This address cannot be read.');
	}
	if (path.includes('\0') || path.includes('\\')) return plain(response, 400, 'This address cannot be read.');
	if (base !== '' && path === base) return redirect(response, `${base}/${query === undefined ? '' : `?${query}`}`);
	if (!path.startsWith(`${base}/`)) return plain(response, 404, 'Nothing is here.');
	const file = await fileFor(top, path.slice(base.length));
	if (file !== null) return send(file, 200, request, response);
	const missing = await fileFor(top, '/404.html');
	return missing === null ? plain(response, 404, 'Nothing is here.') : send(missing, 404, request, response);
}

/**
 * The file that a path names, a folder's index.html included; null outside the folder, also through a link.
 * @param {string} top
 * @param {string} path starts with a slash
 * @returns {Promise<{ path: string, size: number, time: number } | null>}
 */
async function fileFor(top, path) {
	try {
		const wanted = path.endsWith('/') ? `${path}index.html` : path;
		const real = await realpath(join(top, wanted));
		if (!real.startsWith((await realpath(top)) + sep)) return null;
		const found = await stat(real);
		return found.isFile() ? { path: real, size: found.size, time: found.mtimeMs } : null;
	} catch {
		return null;
	}
}

/**
 * @param {{ path: string, size: number, time: number }} file
 * @param {number} status
 * @param {import('node:http').IncomingMessage} request
 * @param {import('node:http').ServerResponse} response
 */
function send(file, status, request, response) {
	const tag = `"${file.size.toString(36)}-${Math.round(file.time).toString(36)}"`;
	// names under immutable/ carry a digest of their content; all else is asked about again
	const lasting = file.path.includes(`${sep}_app${sep}immutable${sep}`);
	response.setHeader('cache-control', lasting ? 'public, max-age=31536000, immutable' : 'no-cache');
	response.setHeader('x-content-type-options', 'nosniff');
	response.setHeader('etag', tag);
	if (status === 200 && request.headers['if-none-match'] === tag) {
		response.writeHead(304).end();
		return;
	}
	response.writeHead(status, {
		'content-type': TYPES[extname(file.path).toLowerCase()] ?? 'application/octet-stream',
		'content-length': file.size
	});
	if (request.method === 'HEAD') {
		response.end();
		return;
	}
	createReadStream(file.path)
		.on('error', () => response.destroy())
		.pipe(response);
}

/**
 * @param {import('node:http').ServerResponse} response
 * @param {number} status
 * @param {string} text
 */
function plain(response, status, text) {
	response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'no-cache' }).end(`${text}\n`);
}

/**
 * @param {import('node:http').ServerResponse} response
 * @param {string} to
 */
function redirect(response, to) {
	response.writeHead(301, { location: to, 'cache-control': 'no-cache' }).end();
}

/**
 * @typedef {{ folder: string, base?: string, port?: number, exact?: boolean, lan?: boolean }} Hosting
 * `port` 0 takes any free one; unless `exact`, the next ones are tried when it is taken. `lan` serves every interface.
 */

/**
 * Starts the host and tells where it listens.
 * @param {Hosting} hosting
 * @returns {Promise<{ port: number, base: string, close: () => void }>}
 */
export async function host({ folder, base = baseOf(folder), port = 0, exact = false, lan = false }) {
	const listener = staticHost(folder, base);
	const tries = exact || port === 0 ? 1 : 50;
	for (let offset = 0; ; offset++) {
		const server = createServer(listener);
		try {
			const taken = await listen(server, port === 0 ? 0 : port + offset, lan ? '0.0.0.0' : '127.0.0.1');
			return { port: taken, base, close: () => server.close() };
		} catch (error) {
			const code = error instanceof Error && 'code' in error ? error.code : undefined;
			if (code !== 'EADDRINUSE' || offset + 1 >= tries) throw error;
		}
	}
}

/**
 * @param {import('node:http').Server} server
 * @param {number} port
 * @param {string} address
 * @returns {Promise<number>}
 */
function listen(server, port, address) {
	return new Promise((done, failed) => {
		server.once('error', failed);
		server.listen(port, address, () => {
			const bound = server.address();
			done(typeof bound === 'object' && bound !== null ? bound.port : port);
		});
	});
}

/** The addresses at which other machines of the local network reach this one. */
export function lanAddresses() {
	return Object.values(networkInterfaces())
		.flatMap((list) => list ?? [])
		.filter((entry) => entry.family === 'IPv4' && !entry.internal)
		.map((entry) => entry.address);
}

/** From the command line: node test/tools/serve.js FOLDER [--port N] [--exact] [--host] */
async function main() {
	const args = process.argv.slice(2);
	const portAt = args.indexOf('--port');
	const port = portAt === -1 ? 4173 : Number(args[portAt + 1]);
	const folder = args.find((arg, index) => !arg.startsWith('--') && (portAt === -1 || index !== portAt + 1)) ?? 'build';
	const site = await host({ folder, port, exact: args.includes('--exact'), lan: args.includes('--host') });
	console.log(`http://localhost:${site.port}${site.base}/`);
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) await main();
