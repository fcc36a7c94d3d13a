import { assert, ZERO, type Decimal } from '../number/decimal.ts';
import { exact, minus, plus, times, toNumber, EXACT_ZERO, type Exact } from '../number/exact.ts';
import { shareOf } from '../metal/fineness.ts';
import type { MetalId } from '../metal/metals.ts';
import { massOf } from '../mass/weighing.ts';
import type { Scale } from '../mass/scale.ts';
import { interval } from '../uncertainty/coverage.ts';
import type { Uncertain } from '../uncertainty/uncertain.ts';
import { classKey } from '../piece/class.ts';
import type { Spread, SpreadId } from '../piece/class-spread.ts';
import type { LossClassId } from '../piece/loss-class.ts';
import { estimate, netOf, type Estimate, type Piece } from '../piece/piece.ts';

export type FineSums = Partial<Readonly<Record<MetalId, Exact>>>;

/** The pieces of one class that melt in one way. */
export type ClassSums = {
	/** The class, as `classKey` writes it. */
	readonly of: string;
	readonly lossClass: LossClassId;
	readonly entries: number;
	readonly pieces: number;
	/** Grams. */
	readonly net: Decimal;
	/** Exact grams by metal. */
	readonly fine: FineSums;
};

/** What an uncertainty is about: the net mass, or the fine mass of a metal. */
export type Quantity = 'net' | MetalId;

/**
 * The totals of a lot, kept as running sums: a piece costs the same to add or to remove however many there are, and a
 * new price costs one multiplication a metal. All of it is exact, so removing a piece undoes adding it to the last digit.
 */
export type LotSums = {
	readonly entries: number;
	readonly pieces: number;
	/** Grams. */
	readonly gross: Decimal;
	readonly net: Decimal;
	/** Exact grams by metal; a metal that sums to nothing has no key. */
	readonly fine: FineSums;
	/** Under "<class>|<loss class>". */
	readonly byClass: Readonly<Record<string, ClassSums>>;
	/** Standard uncertainties of errors that pieces share, added with their sign: nanograms, by source and quantity. */
	readonly shared: Readonly<Record<string, Partial<Readonly<Record<Quantity, bigint>>>>>;
	/** Nanograms by which the fine mass is expected to differ from what was taken, where findings say so. */
	readonly expected: Partial<Readonly<Record<MetalId, bigint>>>;
	/** Sums of products of the errors that each piece has for itself, in nanograms squared, under "Au Cu", "net net" and so on. */
	readonly own: Readonly<Record<string, bigint>>;
};

export function emptySums(): LotSums {
	return { entries: 0, pieces: 0, gross: ZERO, net: ZERO, fine: {}, byClass: {}, shared: {}, expected: {}, own: {} };
}

/** One entry of a lot with the name under which its own errors are kept apart from those of every other. */
export type Entry = { readonly piece: Piece; readonly key: string; readonly scale?: Scale | undefined };

export type Spreads = Partial<Readonly<Record<SpreadId, Spread>>>;

/**
 * The sums with one piece more. The sums given are not changed.
 * formula: each sum + the piece's own part.
 * rounding: none of mass and fine mass; each uncertainty to a whole nanogram, the same way when it is removed.
 * source: JCGM 100:2008 (GUM) 5.2 for shared errors; common practice, no source, for the sums.
 */
export function addPiece(sums: LotSums, piece: Piece, key: string, scale?: Scale, spreads?: Spreads): LotSums {
	return addPieces(sums, [{ piece, key, scale }], spreads);
}

/** The sums without a piece that is in them: piece, key, scale and spreads must be those it was added with. */
export function removePiece(sums: LotSums, piece: Piece, key: string, scale?: Scale, spreads?: Spreads): LotSums {
	const work = workingCopy(sums);
	apply(work, { piece, key, scale }, -1, spreads);
	assert(work.entries >= 0 && work.pieces >= 0, 'a piece was removed from a lot that it is not in');
	return work;
}

/** The sums with many pieces more, with one copy for all of them. */
export function addPieces(sums: LotSums, entries: Iterable<Entry>, spreads?: Spreads): LotSums {
	const work = workingCopy(sums);
	for (const entry of entries) apply(work, entry, 1, spreads);
	return work;
}

type Writable<T> = { -readonly [K in keyof T]: T[K] };
type Working = Writable<Omit<LotSums, 'fine' | 'byClass' | 'shared' | 'expected' | 'own'>> & {
	fine: Partial<Record<MetalId, Exact>>;
	byClass: Record<string, ClassSums>;
	shared: Record<string, Partial<Readonly<Record<Quantity, bigint>>>>;
	expected: Partial<Record<MetalId, bigint>>;
	own: Record<string, bigint>;
};

/** As large as the metals and classes of the lot, not as its pieces. */
function workingCopy(sums: LotSums): Working {
	const { fine, byClass, shared, expected, own } = sums;
	return { ...sums, fine: { ...fine }, byClass: { ...byClass }, shared: { ...shared }, expected: { ...expected }, own: { ...own } };
}

function apply(work: Working, { piece, key, scale }: Entry, sign: 1 | -1, spreads: Spreads | undefined): void {
	const net = netOf(piece).grams;
	const fine: [MetalId, Exact][] = piece.contents.map(({ metal, taken }) => [metal, times(exact(net), shareOf(taken))]);
	work.entries += sign;
	work.pieces += sign * piece.count;
	work.gross = work.gross.plus(massOf(piece.weighing).grams.times(sign));
	work.net = work.net.plus(net.times(sign));
	moveFine(work.fine, fine, sign);
	const of = classKey({ stamp: piece.mark, article: piece.article, origin: piece.origin });
	const group = `${of}|${piece.lossClass}`;
	const before = work.byClass[group];
	const entries = (before?.entries ?? 0) + sign;
	if (entries === 0) delete work.byClass[group];
	else {
		const ofClass = { ...before?.fine };
		moveFine(ofClass, fine, sign);
		work.byClass[group] = {
			of,
			lossClass: piece.lossClass,
			entries,
			pieces: (before?.pieces ?? 0) + sign * piece.count,
			net: (before?.net ?? ZERO).plus(net.times(sign)),
			fine: ofClass
		};
	}
	const estimated = estimate(piece, key, scale, spreads);
	moveErrors(work, estimated, sign);
	const believed = piece.evidence?.belief?.metal;
	if (believed !== undefined) moveExpected(work.expected, fine.filter(([metal]) => metal === believed), estimated, sign);
}

function moveExpected(into: Partial<Record<MetalId, bigint>>, taken: readonly [MetalId, Exact][], { fine }: Estimate, sign: 1 | -1): void {
	for (const [metal, grams] of taken) {
		const apart = nanograms(fine[metal]!.value - toNumber(grams));
		const after = (into[metal] ?? 0n) + (sign === 1 ? apart : -apart);
		if (after === 0n) delete into[metal];
		else into[metal] = after;
	}
}

function moveFine(into: Partial<Record<MetalId, Exact>>, fine: readonly [MetalId, Exact][], sign: 1 | -1): void {
	for (const [metal, grams] of fine) {
		const before = into[metal] ?? EXACT_ZERO;
		const after = sign === 1 ? plus(before, grams) : minus(before, grams);
		if (after.n === 0n) delete into[metal];
		else into[metal] = after;
	}
}

function nanograms(grams: number): bigint {
	assert(Number.isFinite(grams), 'an uncertainty is a finite number of grams');
	return BigInt(Math.round(grams * 1e9));
}

/** The sources whose errors are the same in several pieces, and so add up with their sign. */
export const SHARED = /^(?:scale|class|tester):/;

function moveErrors(work: Working, { net, fine }: Estimate, sign: 1 | -1): void {
	const quantities: [Quantity, Uncertain][] = [['net', net], ...(Object.entries(fine) as [MetalId, Uncertain][])];
	const move = (sums: Record<string, bigint>, name: string, by: bigint) => {
		const after = (sums[name] ?? 0n) + (sign === 1 ? by : -by);
		if (after === 0n) delete sums[name];
		else sums[name] = after;
	};
	const own = new Map<string, [Quantity, bigint][]>();
	for (const [quantity, value] of quantities) {
		for (const [source, u] of Object.entries(value.contributions)) {
			const ng = nanograms(u);
			if (ng === 0n) continue;
			if (SHARED.test(source)) {
				const sums = { ...work.shared[source] };
				move(sums, quantity, ng);
				if (Object.keys(sums).length === 0) delete work.shared[source];
				else work.shared[source] = sums;
			} else {
				const found = own.get(source);
				if (found === undefined) own.set(source, [[quantity, ng]]);
				else found.push([quantity, ng]);
			}
		}
	}
	for (const parts of own.values()) {
		parts.forEach(([a, x], i) => {
			for (const [b, y] of parts.slice(i)) move(work.own, pairName(a, b), x * y);
		});
	}
}

function pairName(a: Quantity, b: Quantity): string {
	return a < b ? `${a} ${b}` : `${b} ${a}`;
}

/**
 * The fine mass of each metal of the lot, or its net mass, with what makes it uncertain by source.
 * formula: value = the exact sum in grams, moved by what findings lead to expect beside what was taken; each shared source its sum;
 * "pieces:<quantity>" = root of the sum of squares of all errors that single pieces have for themselves.
 * rounding: none (an estimate).
 * source: JCGM 100:2008 (GUM) 5.2.2.
 */
export function estimateOf(sums: LotSums, quantity: Quantity): Uncertain {
	const value =
		quantity === 'net' ? sums.net.toNumber() : toNumber(sums.fine[quantity] ?? EXACT_ZERO) + Number(sums.expected[quantity] ?? 0n) / 1e9;
	const contributions: Record<string, number> = {};
	for (const [source, by] of Object.entries(sums.shared)) {
		const ng = by[quantity];
		if (ng !== undefined) contributions[source] = Number(ng) / 1e9;
	}
	const squares = sums.own[pairName(quantity, quantity)];
	if (squares !== undefined) contributions[`pieces:${quantity}`] = Math.sqrt(Number(squares)) / 1e9;
	return { value, contributions };
}

/**
 * The standard uncertainty of a weighted sum of the lot's quantities, such as its value with prices per gram as weights.
 * formula: √( Σ over shared sources (Σ weight x sum)² + Σ over pairs weight x weight x sum of products ), pairs of two twice.
 * rounding: none (an estimate).
 * source: JCGM 100:2008 (GUM) 5.2.2 equation 13.
 */
export function combinedUncertainty(sums: LotSums, weights: Partial<Readonly<Record<Quantity, number>>>): number {
	const weight = (quantity: string) => weights[quantity as Quantity] ?? 0;
	let variance = 0;
	for (const by of Object.values(sums.shared)) {
		let moved = 0;
		for (const [quantity, ng] of Object.entries(by)) moved += (weight(quantity) * Number(ng)) / 1e9;
		variance += moved * moved;
	}
	for (const [pair, product] of Object.entries(sums.own)) {
		const [a = '', b = ''] = pair.split(' ');
		variance += (a === b ? 1 : 2) * weight(a) * weight(b) * (Number(product) / 1e18);
	}
	return Math.sqrt(Math.max(0, variance));
}

/**
 * Between what and what the lot's fine mass of a metal lies, in grams.
 * formula: value ± normal quantile x standard uncertainty, cut at zero.
 * rounding: none (an estimate). It assumes that no piece is something else altogether; fineMixture counts that chance.
 * source: JCGM 100:2008 (GUM) 6.2 and G.1.
 */
export function fineInterval(sums: LotSums, metal: MetalId, coverage: number): { low: number; high: number } {
	const { low, high } = interval(estimateOf(sums, metal), coverage);
	return { low: Math.max(0, low), high };
}
