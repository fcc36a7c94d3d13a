import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { baseOf } from './build.js';
import { findChromium, installReason, requireNode } from './machine.js';

let folder: string;
beforeEach(() => {
	folder = mkdtempSync(join(tmpdir(), 'meltbook-machine-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

type Packages = Record<string, { version?: string; optional?: boolean }>;

function lay(wanted: Packages, have?: Packages): void {
	writeFileSync(join(folder, 'package-lock.json'), JSON.stringify({ packages: wanted }));
	if (have === undefined) return;
	mkdirSync(join(folder, 'node_modules'));
	writeFileSync(join(folder, 'node_modules', '.package-lock.json'), JSON.stringify({ packages: have }));
}

describe('the packages', () => {
	it('are installed when there are none', () => {
		lay({ '': {}, 'node_modules/a': { version: '1.0.0' } });
		expect(installReason(folder)).toBe('node_modules is missing');
	});
	it('are left alone when they are what the lock file says, packages for other systems aside', () => {
		lay({ '': {}, 'node_modules/a': { version: '1.0.0' }, 'node_modules/mac': { version: '2.0.0', optional: true } }, { 'node_modules/a': { version: '1.0.0' } });
		expect(installReason(folder)).toBeNull();
	});
	it('are installed again when one is missing or of another version', () => {
		lay({ 'node_modules/a': { version: '1.0.1' } }, { 'node_modules/a': { version: '1.0.0' } });
		expect(installReason(folder)).toBe('node_modules/a is not the version of package-lock.json');
	});
});

describe('the machine', () => {
	it('has a Node that is new enough, and an old one is refused with both numbers', () => {
		expect(() => requireNode()).not.toThrow();
		expect(() => requireNode('20.18.3')).toThrow('Meltbook needs Node 20.19 or newer; this is Node 20.18.3.');
		expect(() => requireNode('18.20.0')).toThrow('Node 18.20.0');
		expect(() => requireNode('20.19.0')).not.toThrow();
		expect(() => requireNode('22.1.0')).not.toThrow();
	});
	it('is looked over for a Chromium: CHROME_PATH decides, then PATH', () => {
		const program = join(folder, 'chromium');
		writeFileSync(program, '#!/bin/sh\n', { mode: 0o755 });
		expect(findChromium({ CHROME_PATH: program })).toBe(program);
		expect(findChromium({ PATH: folder })).toBe(program);
		expect(() => findChromium({ CHROME_PATH: join(folder, 'none') })).toThrow('is not a program');
	});
});

describe('a finished site', () => {
	it.each([
		['<link href="/meltbook/_app/immutable/a.js">', '/meltbook'],
		['<link href="/a/b/_app/immutable/a.js">', '/a/b'],
		['<link href="/_app/immutable/a.js">', ''],
		['<p>no app</p>', '']
	])('tells from %s where it belongs', (page, base) => {
		writeFileSync(join(folder, '404.html'), page);
		expect(baseOf(folder)).toBe(base);
	});
});
