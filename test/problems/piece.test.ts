import { describe, expect, it } from 'vitest';
import { decimal } from '../../src/trade/number/decimal.ts';
import type { Result } from '../../src/trade/number/result.ts';
import { certain } from '../../src/trade/uncertainty/uncertain.ts';
import { fromPerMille } from '../../src/trade/metal/fineness.ts';
import { checkPiece, netMass, type Piece, type PieceProblem } from '../../src/trade/piece/piece.ts';
import { caratsBySize, stonesByWater, type StoneProblem, type StoneSize } from '../../src/trade/piece/stones.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';

function problemOf<P>(result: Result<unknown, P>): P {
	if (result.ok) throw new Error('no problem where one was wanted');
	return result.problem;
}
const ring = pieceOf('14k ring 5.20 g');
const with_ = (change: Partial<Piece>) => problemOf(checkPiece({ ...ring, ...change }));
const stone = (change: Partial<StoneSize>) => {
	const round: StoneSize = { cut: 'round', count: 1, length: decimal('6'), width: decimal('6'), depth: decimal('4'), gravity: decimal('4') };
	return problemOf(caratsBySize({ ...round, ...change }));
};
const content = (metal: 'Au' | 'Ag', perMille: string) => ({ metal, taken: fromPerMille(decimal(perMille)) });
const off = (grams: string) => [{ what: 'stones' as const, mass: { grams: decimal(grams) }, u: 0, how: '' }];

/** Each kind from what a person would really enter. A kind without a row does not compile. */
const reproductions: Record<PieceProblem['kind'] | StoneProblem['kind'], () => { readonly kind: string }> = {
	'piece-count-not-whole': () => with_({ count: 1.5 }),
	'piece-no-mass': () => with_({ weighing: { ...ring.weighing, tare: decimal('6') } }),
	'piece-mass-too-many-digits': () => with_({ weighing: { ...ring.weighing, reading: decimal('5.2000000000001') } }),
	'piece-division-not-positive': () => with_({ weighing: { ...ring.weighing, division: decimal('0') } }),
	'piece-deduction-negative': () => with_({ deductions: off('-0.35') }),
	'piece-deductions-over-gross': () => problemOf(netMass({ ...ring, deductions: off('6') })),
	'piece-metal-twice': () => with_({ contents: [content('Au', '585'), content('Au', '100')] }),
	'piece-content-negative': () => with_({ contents: [{ metal: 'Au', taken: { perMille: { n: -1n, d: 1n } } }] }),
	'piece-contents-over-1000': () => with_({ contents: [content('Au', '900'), content('Ag', '101')] }),
	'stone-count-not-whole': () => stone({ count: 0 }),
	'stone-size-not-positive': () => stone({ depth: decimal('0') }),
	'stone-size-too-large': () => stone({ depth: decimal('400') }),
	'stone-gravity-unlikely': () => stone({ gravity: decimal('19.3') }),
	'stone-density-like-metal': () => problemOf(stonesByWater(certain(1), certain(5), certain(3.6), certain(3.5))),
	'stone-water-impossible': () => problemOf(stonesByWater(certain(0.1), certain(5), certain(13), certain(3.5)))
};

describe('what can be wrong with a piece', () => {
	it.each(Object.entries(reproductions))('%s happens', (kind, reproduce) => expect(reproduce().kind).toBe(kind));

	it('carries the numbers that a sentence needs', () => {
		expect(reproductions['piece-deductions-over-gross']()).toEqual({
			kind: 'piece-deductions-over-gross', gross: decimal('5.20'), deductions: decimal('6')
		});
		expect(reproductions['piece-contents-over-1000']()).toEqual({ kind: 'piece-contents-over-1000', perMille: { n: 1001n, d: 1n } });
		expect(reproductions['stone-gravity-unlikely']()).toMatchObject({ gravity: decimal('19.3'), most: decimal('7.5') });
	});
});
