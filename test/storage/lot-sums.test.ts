import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addPieces, emptySums } from '../../src/trade/lot/sums.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { encodeBody } from '../../src/trade/record/kind.ts';
import type { Piece } from '../../src/trade/piece/piece.ts';
import { decodeSums, encodeSums } from '../../src/trade/lot/sums-stored.ts';
import { sumsFromScratch, sumsWith } from '../../src/storage/lot-sums.ts';
import type { CurrentRow } from '../../src/storage/schema.ts';
import { anyPiece } from '../trade/piece/some-pieces.ts';

const none = { scaleOf: () => undefined, spreads: {} };
const text = (sums: unknown) => JSON.stringify(sums, (_, held: unknown) => (typeof held === 'bigint' ? `${held}n` : held));

/** The same sums with their keys in order: running sums keep theirs in the order of arrival. */
function ordered(held: unknown): unknown {
	if (typeof held !== 'object' || held === null) return held;
	return Object.fromEntries(
		Object.entries(held)
			.sort(([a], [b]) => (a < b ? -1 : 1))
			.map(([key, inner]) => [key, ordered(inner)])
	);
}

const rowOf = (piece: Piece, subject: string): CurrentRow => ({
	subject,
	kind: 'piece',
	record: `r-${subject}`,
	version: 1,
	at: 1,
	body: encodeBody('piece', { lot: 'lot-1', order: 1, piece }),
	heads: []
});

describe('kept sums', () => {
	it('read back as they were, through what a database does to them', () => {
		fc.assert(
			fc.property(fc.array(anyPiece, { maxLength: 6 }), (pieces) => {
				const sums = addPieces(emptySums(), pieces.map((piece, n) => ({ piece, key: `p-${n}` })));
				const stored = structuredClone(encodeSums(sums));
				expect(text(encodeSums(decodeSums(stored)!))).toBe(text(stored));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('after any coming and going are those from scratch', () => {
		fc.assert(
			fc.property(fc.array(anyPiece, { minLength: 1, maxLength: 8 }), fc.array(fc.nat(7), { maxLength: 6 }), (pieces, leaving) => {
				const rows = pieces.map((piece, n) => rowOf(piece, `p-${n}`));
				const gone = new Set(leaving.filter((n) => n < rows.length));
				let kept = sumsFromScratch('lot-1', [], none);
				for (const row of rows) kept = sumsWith(kept, [], [row], none)!;
				for (const n of gone) kept = sumsWith(kept, [rows[n]!], [], none)!;
				const scratch = sumsFromScratch('lot-1', rows.filter((_, n) => !gone.has(n)), none);
				expect(text(ordered(kept.sums))).toBe(text(ordered(scratch.sums)));
				expect(kept.damaged).toEqual([]);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('remember which scales are in them', () => {
		const scale = { id: 's', name: 'x', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null } as const;
		fc.assert(
			fc.property(anyPiece, (piece) => {
				const row = rowOf({ ...piece, weighing: { ...piece.weighing, scale: 's' } }, 'p-1');
				expect(sumsFromScratch('lot-1', [row], { scaleOf: (id) => (id === 's' ? scale : undefined), spreads: {} }).scales).toEqual(['s']);
				expect(sumsFromScratch('lot-1', [row], none).scales).toEqual(['s']);
			}),
			{ numRuns: 1_000 }
		);
	});
	it.each([null, {}, { gross: 'x' }, { gross: '1', net: '1', fine: { Au: 'x' }, byClass: {} }, 7])('are nothing when %j stands there', (stored) => {
		expect(decodeSums(stored)).toBeNull();
		expect(sumsWith({ lot: 'lot-1', sums: stored, scales: [], damaged: [] }, [], [], none)).toBeNull();
	});
	it('cannot be carried on without a piece that was added whole and is damaged now', () => {
		const [piece] = fc.sample(anyPiece, 1);
		const whole = rowOf(piece!, 'p-1');
		const sums = sumsFromScratch('lot-1', [whole], none);
		expect(sumsWith(sums, [{ ...whole, body: { colour: 'red' } }], [], none)).toBeNull();
		const without = sumsFromScratch('lot-1', [{ ...whole, body: { colour: 'red' } }], none);
		expect(without.damaged).toEqual(['p-1']);
		expect(sumsWith(without, [{ ...whole, body: { colour: 'red' } }], [whole], none)?.damaged).toEqual([]);
	});
});
