import { describe, expect, it, vi } from 'vitest';
import { durability, persist } from '../../src/storage/durable.ts';

describe('lasting storage', () => {
	it('is asked for once', async () => {
		const ask = vi.fn(async () => true);
		expect(await persist({ persisted: async () => true, persist: ask })).toBe(true);
		expect(ask).not.toHaveBeenCalled();
		expect(await persist({ persisted: async () => false, persist: ask })).toBe(true);
		expect(ask).toHaveBeenCalledOnce();
	});
	it('may be refused, missing or broken, and that is no error', async () => {
		expect(await persist({ persist: async () => false })).toBe(false);
		expect(await persist({})).toBe(false);
		expect(await persist({ persisted: () => Promise.reject(new TypeError('no')) })).toBe(false);
		expect(await persist()).toBe(false);
	});
	it('says what it knows', async () => {
		expect(await durability({ persisted: async () => true, estimate: async () => ({ usage: 5, quota: 9 }) })).toEqual({ persisted: true, usage: 5, quota: 9 });
		expect(await durability({})).toEqual({ persisted: null, usage: null, quota: null });
		expect(await durability({ estimate: () => Promise.reject(new TypeError('no')) })).toEqual({ persisted: null, usage: null, quota: null });
	});
});
