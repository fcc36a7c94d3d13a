import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findingKinds } from '../../../../src/trade/evidence/finding.ts';
import { exactToText } from '../../../../src/trade/number/exact.ts';
import { fineOf, netOf } from '../../../../src/trade/piece/piece.ts';
import { canonicalJson, type Json } from '../../../../src/trade/record/json.ts';
import { decodeBody, encodeBody } from '../../../../src/trade/record/kind.ts';
import { anyPiece } from '../../piece/some-pieces.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody, upgradedBody } from './frozen.ts';

describe('a piece', () => {
	it('reads version 1 as it was written', () => {
		const { lot, order, piece } = upgradedBody('piece');
		expect(piece.evidence).toBeUndefined();
		expect([lot, order, piece.article, piece.count, piece.mark]).toEqual(['lot-1', 1.5, 'ring with stones', 3, '14 kt']);
		expect(piece.weighing).toMatchObject({ typed: '12,40', unit: 'g', scale: 'scale-1' });
		expect(piece.contents.map(({ metal, taken }) => [metal, exactToText(taken.perMille)])).toEqual([['Au', '1750/3']]);
		expect(piece.deductions.map(({ what, mass, u }) => [what, mass.grams.toFixed(), u])).toEqual([
			['stones', '0.35', 0.035],
			['springs', '0.05', 0.005]
		]);
		expect(piece.deductions[0]?.stones?.gravity.toFixed()).toBe('3.52');
		expect(piece.photos).toHaveLength(1);
		// mean of 12.40, 12.41, 12.39 less 0.5 of tare and 0.40 of deductions; 14/24 of it is gold
		expect(netOf(piece).grams.toFixed()).toBe('11.5');
		expect(exactToText(fineOf(piece)[0]!.grams)).toBe('161/24');
	});
	it('reads version 2, with what was tested, as it was written', () => {
		const { evidence } = frozenBody('piece', 2).piece;
		expect(evidence?.findings.map(({ kind }) => kind)).toEqual(findingKinds);
		expect(evidence?.belief).toMatchObject({ metal: 'Au', mean: 471.25, odds: { layered: 0.19 }, shared: { 'tester-1': -0.25 } });
		expect(evidence?.taking?.rests).toEqual(['f1', 'f2']);
	});
	it('is checked field by field', () => {
		expectEveryFieldChecked('piece');
		// the parts of a doubt stand under the names of testers
		expectEveryFieldChecked('piece', 2, 'piece.evidence.belief.shared');
	});
	it.each([
		['two findings of one name', ['findings', 1, 'id'], 'f1'],
		['a belief that rests on nothing', ['findings'], []],
		['a fineness over the whole', ['belief', 'mean'], 1000.5],
		['odds over one', ['belief', 'odds', 'layered'], 1.01],
		['a belief of a metal that is none', ['belief', 'metal'], 'Xx'],
		['a reading without any doubt', ['findings', 1, 'u'], 0],
		['a kind of test that nobody knows', ['findings', 1, 'kind'], 'dowsing']
	])('is refused with %s', (_, place, value) => {
		const read = decodeBody('piece', 2, changedAt(frozen('piece', 2).body, ['piece', 'evidence', ...place], value));
		expect(read).toMatchObject({ ok: false, problem: { kind: 'record-body' } });
	});
	it('of version 1 holds no evidence', () => {
		const { evidence } = (frozen('piece', 2).body as { readonly piece: { readonly evidence: Json } }).piece;
		const added = changedAt(frozen('piece').body, ['piece', 'evidence'], evidence);
		expect(decodeBody('piece', 1, added)).toMatchObject({ ok: false, problem: { at: 'piece.evidence', expected: 'no such field' } });
		expect(decodeBody('piece', 2, added).ok).toBe(true);
	});
	it('reads back what was kept, whatever the piece is', () => {
		fc.assert(
			fc.property(anyPiece, (piece) => {
				const kept = encodeBody('piece', { lot: 'lot-1', order: 1, piece });
				const read = decodeBody('piece', 2, JSON.parse(JSON.stringify(kept)));
				if (!read.ok) throw new Error(JSON.stringify(read.problem));
				expect(canonicalJson(encodeBody('piece', read.value))).toBe(canonicalJson(kept));
				expect(netOf(read.value.piece).grams.equals(netOf(piece).grams)).toBe(true);
				expect(fineOf(read.value.piece).map(({ grams }) => exactToText(grams))).toEqual(fineOf(piece).map(({ grams }) => exactToText(grams)));
			}),
			{ numRuns: 1_000 }
		);
	});
	it.each([
		['deductions that weigh more than the piece', ['piece', 'deductions', 0, 'mass', 'grams'], '99'],
		['a count of nothing', ['piece', 'count'], 0],
		['more metal than there is', ['piece', 'contents', 0, 'taken', 'perMille'], '1001'],
		['less metal than none', ['piece', 'contents', 0, 'taken', 'perMille'], '-1'],
		['a doubt below zero', ['piece', 'deductions', 0, 'u'], -1],
		['a tare that is all of the load', ['piece', 'weighing', 'tare'], '50']
	])('is refused with %s', (_, place, value) => {
		const read = decodeBody('piece', 1, changedAt(frozen('piece').body, place, value));
		expect(read).toMatchObject({ ok: false, problem: { kind: 'record-body' } });
	});
});
