import { assess } from '../evidence/assess.ts';
import type { Vector } from '../evidence/grid.ts';
import type { OwnOdds } from '../evidence/odds.ts';
import { startOf } from '../evidence/start.ts';
import type { Subject } from '../evidence/subject.ts';
import type { MetalId } from '../metal/metals.ts';
import { estimate, netOf, type Piece } from '../piece/piece.ts';
import { subjectOf } from '../piece/subject.ts';
import type { Uncertain } from '../uncertainty/uncertain.ts';
import { mixture, type Alike, type Mixture } from './mixture.ts';
import { SHARED, type Entry, type Spreads } from './sums.ts';

type Known = {
	/** What is believed of the lot's metal as a whole: of its contributions those that pieces share are used. */
	readonly estimate: Uncertain;
	readonly own?: OwnOdds;
	readonly spreads?: Spreads;
	readonly coverage?: number;
};

/**
 * Between what and what the fine mass of one metal of a lot lies, counting the chance that a piece is not what it is taken for.
 * formula: convolution (mixture) of net x bulk over all pieces that are bought for this metal: the belief after their findings, or before any test
 * by their mark and origin; pieces of one entry that nobody tested are each by itself. On top, as one bell: readings and deductions, errors of
 * class, scale and tester that pieces share, and the metal's fine mass in pieces bought for another one. Grams; null when none is.
 * rounding: none (an estimate). A tester's own error stands in each belief and again on top: the prudent side.
 * source: JCGM 101:2008, 5.2 (propagation of distributions); which errors are shared as in the sums of the lot.
 */
export function fineMixture(entries: readonly Entry[], metal: MetalId, { estimate: whole, own = {}, spreads, coverage }: Known): Mixture | null {
	const untested = new Map<string, Vector>();
	const pieces = new Map<string, Alike>();
	let value = 0;
	let variance = 0;
	for (const [source, u] of Object.entries(whole.contributions)) if (SHARED.test(source)) variance += u * u;
	for (const { piece, key, scale } of entries) {
		const fine = estimate(piece, key, scale, spreads).fine[metal];
		if (fine === undefined) continue;
		const subject = subjectOf(piece);
		const inDoubt = typeof subject !== 'string' && subject.metal === metal;
		for (const [source, u] of Object.entries(fine.contributions)) {
			// what a piece has of its own is in its belief
			if (!SHARED.test(source) && !(inDoubt && source.startsWith('piece:'))) variance += u * u;
		}
		if (!inDoubt) {
			value += fine.value;
			continue;
		}
		const net = netOf(piece).grams.toNumber();
		if (isTested(piece)) {
			pieces.set(key, { grams: net, count: 1, bulk: assess(startOf(subject, own), piece.evidence.findings).bulk });
			continue;
		}
		const name = JSON.stringify(subject);
		const bulk = untested.get(name) ?? beforeAnyTest(subject, own);
		untested.set(name, bulk);
		const grams = net / piece.count;
		const alike = `${grams} ${name}`;
		pieces.set(alike, { grams, count: (pieces.get(alike)?.count ?? 0) + piece.count, bulk });
	}
	return mixture([...pieces.values()], { value, u: Math.sqrt(variance) }, coverage);
}

function isTested(piece: Piece): piece is Piece & Required<Pick<Piece, 'evidence'>> {
	return piece.evidence !== undefined && piece.evidence.belief !== null;
}

function beforeAnyTest(subject: Subject, own: OwnOdds): Vector {
	return assess(startOf(subject, own), []).bulk;
}
