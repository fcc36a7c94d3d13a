import { afterEach, describe, expect, it, vi } from 'vitest';
import { browserEnvironment, pageLock, webLock } from '../../src/storage/environment.ts';

afterEach(() => void vi.unstubAllGlobals());

const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

describe.each([
	['of a page', pageLock()],
	['where there are no Web Locks', webLock]
])('the lock %s', (_, lock) => {
	it('lets one in at a time, in order, and goes on after a failure', async () => {
		const seen: string[] = [];
		const act = (name: string, ms: number) => async () => {
			seen.push(`${name} in`);
			await wait(ms);
			seen.push(`${name} out`);
			if (name === 'b') throw new Error('failed');
			return name;
		};
		const results = await Promise.allSettled([lock('x', act('a', 9)), lock('x', act('b', 1)), lock('x', act('c', 1))]);
		expect(seen).toEqual(['a in', 'a out', 'b in', 'b out', 'c in', 'c out']);
		expect(results.map(({ status }) => status)).toEqual(['fulfilled', 'rejected', 'fulfilled']);
	});
	it('does not hold up another name', async () => {
		let free = false;
		const held = lock('x', async () => {
			while (!free) await wait(1);
		});
		await lock('y', async () => {
			free = true;
		});
		await held;
	});
});

describe('the browser’s own', () => {
	it('uses Web Locks, exclusively, where there are any', async () => {
		const request = vi.fn(async (_name: string, _options: object, act: () => Promise<unknown>) => act());
		vi.stubGlobal('navigator', { locks: { request } });
		expect(await browserEnvironment().lock('x', async () => 7)).toBe(7);
		expect(request).toHaveBeenCalledWith('x', { mode: 'exclusive' }, expect.any(Function));
	});
	it('does without an outside store where reading it throws', () => {
		vi.stubGlobal('localStorage', undefined);
		Object.defineProperty(globalThis, 'localStorage', {
			configurable: true,
			get() {
				throw new DOMException('forbidden', 'SecurityError');
			}
		});
		expect(browserEnvironment().outside).toBeNull();
	});
});
