import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, toNumber, type Exact } from '../../../src/trade/number/exact.ts';
import { addPieces, emptySums, estimateOf, removePiece, type Entry } from '../../../src/trade/lot/sums.ts';
import type { Scale } from '../../../src/trade/mass/scale.ts';
import { weighing } from '../../../src/trade/mass/weighing.ts';
import { fromKarat, fromPerMille } from '../../../src/trade/metal/fineness.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import { meltYield, type MeltYield } from '../../../src/trade/melt/yield.ts';
import { parcelsOf, yieldFromSums } from '../../../src/trade/melt/of-sums.ts';
import type { MeltParcel } from '../../../src/trade/melt/spread.ts';
import type { LossClassId } from '../../../src/trade/piece/loss-class.ts';
import { estimate, fineOf, netOf, type Content, type Piece } from '../../../src/trade/piece/piece.ts';
import { standardUncertainty, sumUncertain } from '../../../src/trade/uncertainty/uncertain.ts';
import { seeded } from './simulate.ts';

const scale: Scale = { id: 's1', name: 'counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null };

function piece(article: string, grams: string, mark: string, contents: readonly Content[], lossClass: LossClassId): Piece {
	const weighed = weighing(grams, 'g', { scale });
	if (!weighed.ok) throw new Error(weighed.problem.kind);
	return {
		article, count: 1, weighing: weighed.value, mark, origin: 'us-modern', contents,
		deductions: [], lossClass, moreThanMelt: false, note: '', photos: []
	};
}

const gold = (karats: string): Content[] => [{ metal: 'Au', taken: fromKarat(decimal(karats)) }];
const dental: Content[] = [
	{ metal: 'Au', taken: fromPerMille(decimal('625')) },
	{ metal: 'Pd', taken: fromPerMille(decimal('180')) },
	{ metal: 'Ag', taken: fromPerMille(decimal('120')) }
];

function drawn(many: number): Entry[] {
	const random = seeded(42);
	return Array.from({ length: many }, (_, i) => {
		const grams = (1 + random() * 40).toFixed(2);
		const kinds = [
			() => piece('chain', grams, '14 kt', gold('14'), 'worn'),
			() => piece('ring', grams, '14 kt', gold('14'), 'stone-set'),
			() => piece('ring', grams, '18 kt', gold('18'), 'clean'),
			() => piece('forks', grams, '925', [{ metal: 'Ag', taken: fromPerMille(decimal('925')) }], 'clean'),
			() => piece('dental', grams, '', dental, 'dental')
		];
		return { piece: kinds[i % kinds.length]!(), key: `p${i}`, scale };
	});
}

function good(found: ReturnType<typeof meltYield>): MeltYield {
	if (!found.ok) throw new Error(found.problem.kind);
	return found.value;
}

/** The long way: every piece a parcel of its own, with its own errors by name. */
function pieceByPiece(entries: readonly Entry[]): MeltParcel[] {
	return entries.map((entry) => {
		const { net, fine } = estimate(entry.piece, entry.key, scale);
		const grams: Partial<Record<MetalId, Exact>> = {};
		for (const each of fineOf(entry.piece)) grams[each.metal] = each.grams;
		return { lossClass: entry.piece.lossClass, net: netOf(entry.piece).grams, fine: grams, netDoubt: net, fineDoubt: fine };
	});
}

describe('the bar of a whole lot', () => {
	it('is the bar of its pieces one by one, to the last digit', () => {
		const entries = drawn(60);
		const fromSums = good(yieldFromSums(addPieces(emptySums(), entries)));
		const long = good(meltYield(pieceByPiece(entries)));
		for (const part of ['net', 'bar', 'nonMetal', 'metalLoss'] as const) expect(compareExact(fromSums[part], long[part])).toBe(0);
		for (const metal of ['Au', 'Ag', 'Pd'] as const) {
			expect(compareExact(fromSums.metals[metal]!.retained, long.metals[metal]!.retained)).toBe(0);
			expect(compareExact(fromSums.metals[metal]!.perMille, long.metals[metal]!.perMille)).toBe(0);
		}
	});

	it.each([1, 2, 5, 12, 60, 300])('has the doubt of its pieces one by one, within 3 %: %i pieces', (many) => {
		const entries = drawn(many);
		const fromSums = good(yieldFromSums(addPieces(emptySums(), entries)));
		const long = good(meltYield(pieceByPiece(entries)));
		const within = (a: number, b: number) => expect(Math.abs(a / b - 1), `${a} beside ${b}`).toBeLessThan(0.03);
		within(standardUncertainty(fromSums.barMass), standardUncertainty(long.barMass));
		for (const metal of Object.keys(long.metals) as MetalId[]) {
			within(standardUncertainty(fromSums.metals[metal]!.grams), standardUncertainty(long.metals[metal]!.grams));
			within(standardUncertainty(fromSums.metals[metal]!.fineness), standardUncertainty(long.metals[metal]!.fineness));
		}
	});

	it('splits the doubts of the lot into parcels without losing any', () => {
		const sums = addPieces(emptySums(), drawn(37));
		const parcels = parcelsOf(sums);
		for (const quantity of ['net', 'Au', 'Ag', 'Pd'] as const) {
			const parts = parcels.flatMap(({ netDoubt, fineDoubt }) => (quantity === 'net' ? netDoubt : fineDoubt?.[quantity]) ?? []);
			const whole = sumUncertain(parts);
			expect(whole.value).toBeCloseTo(estimateOf(sums, quantity).value, 9);
			expect(standardUncertainty(whole) / standardUncertainty(estimateOf(sums, quantity))).toBeCloseTo(1, 6);
		}
	});

	it('is empty again when the last piece is taken out', () => {
		const [entry] = drawn(1);
		const sums = removePiece(addPieces(emptySums(), [entry!]), entry!.piece, entry!.key, scale);
		expect(yieldFromSums(sums)).toEqual({ ok: false, problem: { kind: 'melt-empty' } });
	});

	it('uses the losses that the buyer set', () => {
		const sums = addPieces(emptySums(), [drawn(1)[0]!]);
		const none = { low: decimal('0'), high: decimal('0') };
		const whole = { low: decimal('1'), high: decimal('1') };
		const found = good(yieldFromSums(sums, { worn: { nonMetal: none, metalLoss: none, retention: whole } }));
		expect(compareExact(found.bar, exact(sums.net))).toBe(0);
		expect(toNumber(found.metals.Au!.perMille)).toBeCloseTo((1000 * 14) / 24, 10);
	});
});
