import { describe, expect, it } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { beliefOf } from '../../../src/trade/evidence/belief-of.ts';
import { momentsOf } from '../../../src/trade/evidence/grid.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { fineMixture } from '../../../src/trade/lot/fine-mixture.ts';
import { mixture } from '../../../src/trade/lot/mixture.ts';
import { addPieces, emptySums, estimateOf, type Entry } from '../../../src/trade/lot/sums.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import type { Piece } from '../../../src/trade/piece/piece.ts';
import { subjectOf } from '../../../src/trade/piece/subject.ts';
import { core, reading, water } from '../evidence/some-findings.ts';
import { pieceOf } from '../piece/some-pieces.ts';

const entries = (pieces: readonly Piece[]): Entry[] => pieces.map((piece, at) => ({ piece, key: `p${at}` }));
const of = (pieces: readonly Piece[], metal: MetalId, own = {}, coverage = 0.9) => {
	const all = entries(pieces);
	return fineMixture(all, metal, { estimate: estimateOf(addPieces(emptySums(), all), metal), own, coverage });
};
function subject(piece: Piece) {
	const found = subjectOf(piece);
	if (typeof found === 'string') throw new Error(found);
	return found;
}
const bulkOf = (piece: Piece) => assess(startOf(subject(piece)), piece.evidence?.findings ?? []).bulk;
function tested(piece: Piece, ...findings: Parameters<typeof beliefOf>[1]): Piece {
	return { ...piece, evidence: { build: null, findings, belief: beliefOf(subject(piece), findings), taking: null } };
}

const ring = pieceOf('14k ring 10.00g');
const fork = pieceOf('925 fork 40.00g');

describe('between what and what the fine mass of a lot lies', () => {
	it('one untested ring: its belief before any test, with the reading and the class on top', () => {
		const whole = estimateOf(addPieces(emptySums(), entries([ring])), 'Au');
		const found = fineMixture(entries([ring]), 'Au', { estimate: whole })!;
		expect(found.mean).toBeCloseTo((10 * momentsOf(bulkOf(ring)).mean) / 1000, 9);
		const shared = Object.entries(whole.contributions).flatMap(([source, u]) => (source.startsWith('class:') ? [u] : []));
		// read to a hundredth of a gram, the division unknown: a step of the last digit, at the fineness that was taken
		const u = Math.hypot(...shared, ((0.01 / Math.sqrt(12)) * 14) / 24);
		const byHand = mixture([{ grams: 10, count: 1, bulk: bulkOf(ring) }], { value: 0, u })!;
		expect(shared.length).toBe(1);
		expect(Math.abs(found.u - byHand.u)).toBeLessThan(0.01 * byHand.u);
		expect(Math.abs(found.low - byHand.low)).toBeLessThan(0.05 * (byHand.high - byHand.low));
	});

	it('reaches lower than the interval that takes every piece for what it says', () => {
		const lot = Array.from({ length: 12 }, () => ring);
		const found = of(lot, 'Au')!;
		const whole = estimateOf(addPieces(emptySums(), entries(lot)), 'Au');
		expect(found.mean).toBeLessThan(whole.value);
		expect(found.low).toBeLessThan(0.95 * whole.value);
		expect(found.low).toBeLessThan(found.median);
		expect(found.median).toBeLessThan(found.high);
	});

	it('a core test takes nearly all of that doubt away', () => {
		const before = of([ring], 'Au', {}, 0.98)!;
		const after = of([tested(ring, core(584, { u: 2 }), reading(585, { u: 2 }))], 'Au', {}, 0.98)!;
		expect(after.high - after.low).toBeLessThan((before.high - before.low) / 4);
	});

	it('four pieces of one entry are each by itself while nobody tested them, and one when somebody did', () => {
		const four = pieceOf('14k ring 40.00g x4');
		const apart = of([ring, ring, ring, ring], 'Au')!;
		const together = of([four], 'Au')!;
		expect(together.mean).toBeCloseTo(apart.mean, 9);
		expect(Math.abs(together.low - apart.low)).toBeLessThan(0.01 * (apart.high - apart.low));
		const findings = [reading(580)];
		const asOne = of([tested(four, ...findings)], 'Au')!;
		const bulk = assess(startOf(subject(four)), findings).bulk;
		expect(asOne.mean).toBeCloseTo((40 * momentsOf(bulk).mean) / 1000, 9);
		expect(asOne.u).toBeGreaterThan((40 * momentsOf(bulk).sd) / 1000);
	});

	it('uses the odds of the buyer', () => {
		const sure = of([ring], 'Au', { [ring.origin]: { honest: 1, under: 0, other: 0, layered: 0 } })!;
		const wary = of([ring], 'Au', { [ring.origin]: { honest: 0.5, under: 0, other: 0, layered: 0.5 } })!;
		expect(sure.low).toBeGreaterThan(5.5);
		expect(wary.low).toBeLessThan(1);
		expect(wary.mean).toBeLessThan(0.6 * sure.mean);
	});

	it('takes metal of pieces bought for another metal as it stands, and says nothing where no piece is bought for it', () => {
		const dental: Piece = { ...ring, mark: '', article: 'dental', contents: [...pieceOf('625 dental 10.00g').contents, ...pieceOf('Ag 120 dental 10.00g').contents] };
		expect(of([dental], 'Ag')).toBeNull();
		const silver = of([fork], 'Ag')!;
		const both = of([fork, dental], 'Ag')!;
		expect(both.mean).toBeCloseTo(silver.mean + 1.2, 9);
		expect(of([fork], 'Au')).toBeNull();
		expect(of([], 'Au')).toBeNull();
	});

	it('the order of entries changes nothing', () => {
		const lot = [ring, fork, tested(pieceOf('18k chain 7.50g'), water(14)), pieceOf('10k ring 3.00g x2')];
		const [one, other] = [of(lot, 'Au')!, of([...lot].reverse(), 'Au')!];
		expect(one.low).toBeCloseTo(other.low, 6);
		expect(one.high).toBeCloseTo(other.high, 6);
		expect(one.mean).toBeCloseTo(other.mean, 9);
	});
});
