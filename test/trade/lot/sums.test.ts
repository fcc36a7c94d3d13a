import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exact, exactToText, plus, EXACT_ZERO, type Exact } from '../../../src/trade/number/exact.ts';
import { metalIds, type MetalId } from '../../../src/trade/metal/metals.ts';
import type { Scale } from '../../../src/trade/mass/scale.ts';
import { massOf } from '../../../src/trade/mass/weighing.ts';
import { standardUncertainty, sumUncertain, type Uncertain } from '../../../src/trade/uncertainty/uncertain.ts';
import {
	addPiece, addPieces, combinedUncertainty, emptySums, estimateOf, fineInterval, removePiece, type LotSums
} from '../../../src/trade/lot/sums.ts';
import { encodeSums } from '../../../src/trade/lot/sums-stored.ts';
import { estimate, fineOf, netOf, type Piece } from '../../../src/trade/piece/piece.ts';
import { anyPiece, anyTestedPiece, pieceOf } from '../piece/some-pieces.ts';

// a thousand lots take a while on a busy machine
vi.setConfig({ testTimeout: 120_000 });

const scale: Scale = {
	id: 'counter', name: 'Counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null
};

/** Everything in the sums as text, with keys in order: equal text is equal to the last digit. */
function textOf(sums: LotSums): string {
	const sorted = (value: unknown): unknown =>
		value !== null && typeof value === 'object' && !Array.isArray(value)
			? Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, each]) => [key, sorted(each)]))
			: value;
	return JSON.stringify(sorted(encodeSums(sums)));
}

const onScale = (piece: Piece): Piece => ({ ...piece, weighing: { ...piece.weighing, scale: scale.id } });
const lot = fc.array(fc.tuple(fc.oneof(anyPiece, anyTestedPiece), fc.boolean()).map(([piece, used]) => (used ? onScale(piece) : piece)), { maxLength: 4 });
const entries = (pieces: readonly Piece[]) => pieces.map((piece, at) => ({ piece, key: `p${at}`, scale }));

describe('the running sums of a lot', () => {
	it('the order of entry changes nothing', () => {
		const shuffled = lot.chain((pieces) =>
			fc.tuple(fc.constant(pieces), fc.shuffledSubarray([...pieces.keys()], { minLength: pieces.length }))
		);
		fc.assert(
			fc.property(shuffled, ([pieces, order]) => {
				const all = entries(pieces);
				expect(textOf(addPieces(emptySums(), order.map((at) => all[at]!)))).toBe(textOf(addPieces(emptySums(), all)));
			}),
			{ numRuns: 1_000 }
		);
	});

	it('removing undoes adding to the last digit', () => {
		fc.assert(
			fc.property(lot, lot, (kept, gone) => {
				const all = entries([...kept, ...gone]);
				let sums = addPieces(emptySums(), all);
				for (const { piece, key } of all.slice(kept.length)) sums = removePiece(sums, piece, key, scale);
				expect(textOf(sums)).toBe(textOf(addPieces(emptySums(), all.slice(0, kept.length))));
			}),
			{ numRuns: 1_000 }
		);
	});

	it('fine mass metal by metal, gross and net are the sums over the pieces', () => {
		fc.assert(
			fc.property(lot, (pieces) => {
				const sums = addPieces(emptySums(), entries(pieces));
				const fine = new Map<MetalId, Exact>();
				let [gross, net] = [EXACT_ZERO, EXACT_ZERO];
				for (const piece of pieces) {
					gross = plus(gross, exact(massOf(piece.weighing).grams));
					net = plus(net, exact(netOf(piece).grams));
					for (const { metal, grams } of fineOf(piece)) fine.set(metal, plus(fine.get(metal) ?? EXACT_ZERO, grams));
				}
				for (const metal of metalIds) {
					expect(exactToText(sums.fine[metal] ?? EXACT_ZERO)).toBe(exactToText(fine.get(metal) ?? EXACT_ZERO));
					const classes = Object.values(sums.byClass).reduce((a, { fine: of }) => plus(a, of[metal] ?? EXACT_ZERO), EXACT_ZERO);
					expect(exactToText(classes)).toBe(exactToText(fine.get(metal) ?? EXACT_ZERO));
				}
				expect([exactToText(exact(sums.gross)), exactToText(exact(sums.net))]).toEqual([exactToText(gross), exactToText(net)]);
				expect(sums.pieces).toBe(pieces.reduce((a, { count }) => a + count, 0));
			}),
			{ numRuns: 1_000 }
		);
	});

	it('the uncertainty is that of all pieces added source by source', () => {
		const some = ['14k chain 12.4g x3', '14k chain 30 g', '925 forks 316.9 g', 'dental Au 625 Pd 180 Ag 120 4.12 g', '18k ring 5.2 g -0.35 g stones'];
		const all = entries(some.map(pieceOf).map(onScale));
		const sums = addPieces(emptySums(), all);
		for (const quantity of ['Au', 'Ag', 'Pd', 'net'] as const) {
			const each = all.map(({ piece, key }) => estimate(piece, key, scale));
			const known = each.map(({ net, fine }): Uncertain | undefined => (quantity === 'net' ? net : fine[quantity]));
			const direct = sumUncertain(known.filter((value) => value !== undefined));
			expect(standardUncertainty(estimateOf(sums, quantity))).toBeCloseTo(standardUncertainty(direct), 7);
			expect(combinedUncertainty(sums, { [quantity]: 1 })).toBeCloseTo(standardUncertainty(direct), 7);
			expect(estimateOf(sums, quantity).value).toBeCloseTo(direct.value, 9);
		}
		// a value of two metals: what one piece does to both at once is not lost
		const valued = all.map(({ piece, key }) => estimate(piece, key, scale).fine).map((fine) => {
			const parts = [fine.Au, fine.Ag].map((metal, at) => (metal === undefined ? [] : [{ metal, weight: at === 0 ? 60 : 0.8 }])).flat();
			return sumUncertain(parts.map(({ metal, weight }) => ({
				value: metal.value * weight,
				contributions: Object.fromEntries(Object.entries(metal.contributions).map(([source, u]) => [source, u * weight]))
			})));
		});
		expect(combinedUncertainty(sums, { Au: 60, Ag: 0.8 })).toBeCloseTo(standardUncertainty(sumUncertain(valued)), 5);
	});

	it('a shared error does not average out', () => {
		const many = Array.from({ length: 40 }, (_, at) => ({ piece: onScale(pieceOf('14k chain 10.00 g')), key: `p${at}`, scale }));
		const [one, forty] = [addPieces(emptySums(), many.slice(0, 1)), addPieces(emptySums(), many)];
		const shared = (sums: LotSums) => estimateOf(sums, 'Au').contributions['class:14 kt|chain|us-modern']!;
		const own = (sums: LotSums) => estimateOf(sums, 'Au').contributions['pieces:Au']!;
		expect(shared(forty) / shared(one)).toBeCloseTo(40, 6);
		expect(own(forty) / own(one)).toBeCloseTo(Math.sqrt(40), 6);
	});

	it('expects what was found of the pieces, and takes what was decided', () => {
		const believed = (mean: number, line = '14k chain 10.00 g'): Piece => ({
			...pieceOf(line),
			evidence: {
				build: null,
				findings: [],
				belief: {
					metal: 'Au', mean, low: mean - 3, median: mean, high: mean + 3, own: 2, shared: { reader: -4 },
					odds: { honest: 1, under: 0, other: 0, layered: 0 }
				},
				taking: null
			}
		});
		const forty = addPieces(emptySums(), Array.from({ length: 40 }, (_, at) => ({ piece: believed(580), key: `p${at}` })));
		// 400 g at 14/24 were taken; at 580 ‰ they hold 232 g
		expect(exactToText(forty.fine.Au!)).toBe('700/3');
		const { value, contributions } = estimateOf(forty, 'Au');
		expect(value).toBeCloseTo(232, 6);
		// one tester read them all: 4 ‰ of 400 g; each piece by itself 2 ‰ of 10 g, and its reading
		expect(contributions['tester:reader']).toBeCloseTo(-1.6, 9);
		expect(contributions['pieces:Au']).toBeCloseTo(Math.sqrt(40) * Math.hypot(0.02, (0.01 / Math.sqrt(12)) * 0.58), 6);
		expect(Object.keys(contributions).some((source) => source.startsWith('class:'))).toBe(false);
		const mixed = addPiece(forty, pieceOf('14k chain 10.00 g'), 'q');
		expect(estimateOf(mixed, 'Au').value).toBeCloseTo(232 + 10 * (14 / 24), 6);
		expect(textOf(removePiece(mixed, pieceOf('14k chain 10.00 g'), 'q'))).toBe(textOf(forty));
	});

	it('a pure function: the sums given are not changed', () => {
		const before = addPiece(emptySums(), pieceOf('14k chain 12.4g'), 'a');
		const text = textOf(before);
		addPiece(before, pieceOf('14k chain 1 g'), 'b');
		removePiece(before, pieceOf('14k chain 12.4g'), 'a');
		expect(textOf(before)).toBe(text);
	});

	it('an interval lies around the sum and never below nothing', () => {
		const sums = addPiece(emptySums(), pieceOf('weighted sterling candlestick 412 g'), 'a');
		const { low, high } = fineInterval(sums, 'Ag', 0.9);
		expect(low > 0 && low < 38.11 && high > 38.11).toBe(true);
		expect(fineInterval(sums, 'Ag', 0.99999).low).toBe(0);
		expect(fineInterval(sums, 'Au', 0.9)).toEqual({ low: 0, high: 0 });
	});

	it('costs the same however many pieces are in it', () => {
		const thousand = Array.from({ length: 1_000 }, (_, at) => ({ piece: pieceOf(at % 2 === 0 ? '14k chain 10.00 g' : '925 fork 50.1 g'), key: `p${at}` }));
		const [few, many] = [addPieces(emptySums(), thousand.slice(0, 10)), addPieces(emptySums(), thousand)];
		const size = (sums: LotSums) => JSON.stringify(encodeSums(sums), (_, value: unknown) => (typeof value === 'string' ? '' : value)).length;
		expect(size(many) - size(few)).toBeLessThan(20);
	});
});
