import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { host } from './serve.js';

type Answer = { status: number; type: string; cache: string; text: string; location: string };

let top: string;
let site: Awaited<ReturnType<typeof host>>;

beforeAll(async () => {
	top = mkdtempSync(join(tmpdir(), 'meltbook-serve-'));
	const folder = join(top, 'site');
	mkdirSync(join(folder, '_app', 'immutable'), { recursive: true });
	mkdirSync(join(folder, 'sub'));
	mkdirSync(join(top, 'site-beside'));
	writeFileSync(join(top, 'secret.txt'), 'secret');
	writeFileSync(join(top, 'site-beside', 'secret.txt'), 'secret');
	symlinkSync(join(top, 'secret.txt'), join(folder, 'link.txt'));
	writeFileSync(join(folder, 'index.html'), 'home');
	writeFileSync(join(folder, '404.html'), '<script src="/shop/_app/immutable/a.js"></script>');
	writeFileSync(join(folder, 'sub', 'index.html'), 'sub');
	writeFileSync(join(folder, 'manifest.webmanifest'), '{}');
	writeFileSync(join(folder, 'service-worker.js'), '1');
	writeFileSync(join(folder, '_app', 'immutable', 'a.js'), '1');
	site = await host({ folder });
});
afterAll(() => {
	site.close();
	rmSync(top, { recursive: true });
});

/** Sends the path as it stands: fetch would tidy up "..". */
function ask(path: string, method = 'GET', headers: Record<string, string> = {}): Promise<Answer> {
	return new Promise((done, failed) => {
		request({ host: '127.0.0.1', port: site.port, path, method, headers }, (response) => {
			let text = '';
			response.setEncoding('utf8').on('data', (part: string) => (text += part));
			response.on('end', () =>
				done({
					status: response.statusCode ?? 0,
					type: response.headers['content-type'] ?? '',
					cache: response.headers['cache-control'] ?? '',
					text,
					location: response.headers.location ?? ''
				})
			);
		})
			.on('error', failed)
			.end();
	});
}

describe('the static host', () => {
	it('reads from the site under which path it belongs', () => {
		expect(site.base).toBe('/shop');
	});
	it.each([
		['/shop/', 'home', 'text/html; charset=utf-8', 'no-cache'],
		['/shop/?a=1', 'home', 'text/html; charset=utf-8', 'no-cache'],
		['/shop/sub/', 'sub', 'text/html; charset=utf-8', 'no-cache'],
		['/shop/manifest.webmanifest', '{}', 'application/manifest+json; charset=utf-8', 'no-cache'],
		['/shop/service-worker.js', '1', 'text/javascript; charset=utf-8', 'no-cache'],
		['/shop/_app/immutable/a.js', '1', 'text/javascript; charset=utf-8', 'public, max-age=31536000, immutable']
	])('answers %s', async (path, text, type, cache) => {
		expect(await ask(path)).toMatchObject({ status: 200, text, type, cache });
	});
	it('answers what is not there with the page for it and status 404', async () => {
		const answer = await ask('/shop/lot/7');
		expect(answer).toMatchObject({ status: 404, type: 'text/html; charset=utf-8', cache: 'no-cache' });
		expect(answer.text).toContain('<script');
	});
	it('sends the bare path on to its folder, and nothing is outside of it', async () => {
		expect(await ask('/shop')).toMatchObject({ status: 301, location: '/shop/' });
		expect(await ask('/')).toMatchObject({ status: 404, text: 'Nothing is here.\n' });
		expect(await ask('/shopping/')).toMatchObject({ status: 404, text: 'Nothing is here.\n' });
	});
	it.each([
		'/shop/../secret.txt',
		'/shop/../../secret.txt',
		'/shop/%2e%2e/secret.txt',
		'/shop/..%2fsecret.txt',
		'/shop/..%5csecret.txt',
		'/shop/../site-beside/secret.txt',
		'/shop/link.txt',
		'/shop//etc/passwd',
		'/shop/%00',
		'/shop/%ff'
	])('gives nothing from outside the folder for %s', async (path) => {
		const { status, text } = await ask(path);
		expect([400, 404]).toContain(status);
		expect(text).not.toMatch(/secret|root:/);
	});
	it('refuses everything but reading', async () => {
		expect((await ask('/shop/', 'POST')).status).toBe(405);
		expect(await ask('/shop/', 'HEAD')).toMatchObject({ status: 200, text: '' });
	});
	it('takes the next port when the wanted one is taken, unless it must be that one', async () => {
		const next = await host({ folder: join(top, 'site'), port: site.port });
		expect(next.port).toBeGreaterThan(site.port);
		next.close();
		await expect(host({ folder: join(top, 'site'), port: site.port, exact: true })).rejects.toThrow('EADDRINUSE');
	});
});
