import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { addPiece, addPieces, emptySums } from '../../../src/trade/lot/sums.ts';
import { decodeSums, encodeSums } from '../../../src/trade/lot/sums-stored.ts';
import { anyPiece, pieceOf } from '../piece/some-pieces.ts';

// a thousand lots take a while on a busy machine
vi.setConfig({ testTimeout: 120_000 });

describe('the sums of a lot in a store', () => {
	it('is stored as text and read back the same; damaged text is refused', () => {
		fc.assert(
			fc.property(fc.array(anyPiece, { maxLength: 4 }), (pieces) => {
				const sums = addPieces(emptySums(), pieces.map((piece, at) => ({ piece, key: `p${at}` })));
				const stored = JSON.parse(JSON.stringify(encodeSums(sums))) as unknown;
				const read = decodeSums(stored);
				expect(read === null ? null : encodeSums(read)).toEqual(encodeSums(sums));
			}),
			{ numRuns: 1_000 }
		);
		const stored = encodeSums(addPiece(emptySums(), pieceOf('14k chain 12.4g'), 'a'));
		// an older release wrote whole numbers as they are, and knew no findings
		const { shared, own } = addPiece(emptySums(), pieceOf('14k chain 12.4g'), 'a');
		const { expected: _, ...older } = { ...stored, shared, own };
		expect(encodeSums(decodeSums(structuredClone(older))!)).toEqual(stored);
		for (const damage of [
			{ gross: '12,4' }, { net: null }, { entries: 1.5 }, { entries: -1 }, { fine: { Xx: '1' } }, { fine: { Au: '1/0' } }, { fine: [] },
			{ byClass: { a: {} } }, { shared: { a: { Au: '1.5' } } }, { shared: { a: { Xx: '1' } } }, { own: { 'Au Xx': '1' } }, { own: { 'Au Au': 5 } }
		]) {
			expect(decodeSums({ ...stored, ...damage })).toBe(null);
		}
		expect([decodeSums(null), decodeSums('x'), decodeSums([]), decodeSums({})]).toEqual([null, null, null, null]);
	});
});
