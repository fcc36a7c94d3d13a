import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chained, hashOf, sha256 } from '../../src/storage/hash.ts';
import { frozen } from '../trade/record/kinds/frozen.ts';

describe('hashes', () => {
	it('are SHA-256 as hex', async () => {
		// FIPS 180-2, appendix B.1, from memory
		expect(await sha256('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
		await fc.assert(
			fc.asyncProperty(fc.string({ unit: 'binary' }), async (text) => {
				expect(await sha256(text)).toBe(createHash('sha256').update(text).digest('hex'));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('of the frozen records are what they were', async () => {
		for (const kind of ['lot', 'piece', 'prices', 'purchase', 'settings', 'scale', 'tester'] as const) {
			expect(await hashOf(frozen(kind))).toBe(frozen(kind).hash);
		}
		for (const kind of ['piece', 'settings'] as const) expect(await hashOf(frozen(kind, 2))).toBe(frozen(kind, 2).hash);
	});
	it('chain', async () => {
		const { previous: _, hash: __, ...bare } = frozen('lot');
		const [one, two] = await chained([bare, { ...bare, id: 'r2' }], 'a'.repeat(64));
		expect([one!.previous, two!.previous]).toEqual(['a'.repeat(64), one!.hash]);
	});
});
