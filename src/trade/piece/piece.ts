import { assert, decimal, type Decimal } from '../number/decimal.ts';
import { compareExact, exact, plus, times, toNumber, EXACT_ZERO, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { propagate, uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { Mass } from '../mass/mass.ts';
import type { Scale } from '../mass/scale.ts';
import { massOf, massUncertainty, type Weighing } from '../mass/weighing.ts';
import { fineMass, type FineMass } from '../metal/fine-mass.ts';
import { shareOf, type Fineness } from '../metal/fineness.ts';
import type { MetalId } from '../metal/metals.ts';
import type { Belief, Evidence } from '../evidence/belief.ts';
import type { Origin } from '../evidence/origin.ts';
import { classKey } from './class.ts';
import { spreadFor, type Spread, type SpreadId } from './class-spread.ts';
import { totalDeduction, totalDeductionU, type Deduction } from './deduction.ts';
import type { LossClassId } from './loss-class.ts';

/** How much of one metal the buyer takes the piece to hold: the decision that everything after it is exact about. */
export type Content = { readonly metal: MetalId; readonly taken: Fineness };

/** One entry of a lot: one piece, or several alike that were weighed together. */
export type Piece = {
	readonly article: string;
	readonly count: number;
	/** Of all pieces of the entry together. */
	readonly weighing: Weighing;
	/** The stamp as text ("14 kt", "585"), empty without one. */
	readonly mark: string;
	readonly origin: Origin;
	readonly contents: readonly Content[];
	readonly deductions: readonly Deduction[];
	readonly lossClass: LossClassId;
	/** Worth more than its metal: flagged, not priced. */
	readonly moreThanMelt: boolean;
	readonly note: string;
	/** Names of photos, each the SHA-256 of its bytes. */
	readonly photos: readonly string[];
	/** What was tested, and what follows from it; absent while nothing was. */
	readonly evidence?: Evidence;
};

export type PieceProblem =
	| { readonly kind: 'piece-count-not-whole'; readonly count: number }
	| { readonly kind: 'piece-no-mass'; readonly gross: Decimal }
	| { readonly kind: 'piece-mass-too-many-digits'; readonly value: Decimal; readonly most: number; readonly mostPlaces: number }
	| { readonly kind: 'piece-division-not-positive'; readonly division: Decimal }
	| { readonly kind: 'piece-deduction-negative'; readonly what: string; readonly grams: Decimal }
	| { readonly kind: 'piece-deductions-over-gross'; readonly gross: Decimal; readonly deductions: Decimal }
	| { readonly kind: 'piece-metal-twice'; readonly metal: MetalId }
	| { readonly kind: 'piece-content-negative'; readonly metal: MetalId }
	| { readonly kind: 'piece-contents-over-1000'; readonly perMille: Exact };

const MOST_COUNT = 1_000_000;
/** 40 digits hold the sums of millions of pieces only while no reading is longer or finer than this. */
const MOST_DIGITS = 15;
const MOST_PLACES = 12;
/** For deductions, which are in grams already. */
const MOST_GRAM_DIGITS = 30;
const MOST_GRAM_PLACES = 22;
const THOUSAND = exact(decimal('1000'));

/**
 * Net mass: the gross mass of the entry less everything that is not its metal.
 * formula: gross grams − sum of deductions in grams.
 * rounding: none.
 * source: common practice, no source.
 */
export function netMass(piece: Piece): Result<Mass, PieceProblem> {
	const { count } = piece;
	if (!Number.isSafeInteger(count) || count < 1 || count > MOST_COUNT) return fail({ kind: 'piece-count-not-whole', count });
	const { reading, repeats, tare, division } = piece.weighing;
	if (division !== null && !division.gt(0)) return fail({ kind: 'piece-division-not-positive', division });
	for (const value of [reading, ...repeats, tare, division]) {
		if (value !== null && longer(value, MOST_DIGITS, MOST_PLACES)) return tooLong(value, MOST_DIGITS, MOST_PLACES);
	}
	const gross = massOf(piece.weighing).grams;
	if (!gross.gt(0)) return fail({ kind: 'piece-no-mass', gross });
	for (const { mass } of piece.deductions) {
		if (longer(mass.grams, MOST_GRAM_DIGITS, MOST_GRAM_PLACES)) return tooLong(mass.grams, MOST_GRAM_DIGITS, MOST_GRAM_PLACES);
	}
	for (const { what, mass } of piece.deductions) {
		if (mass.grams.lt(0)) return fail({ kind: 'piece-deduction-negative', what, grams: mass.grams });
	}
	const deductions = totalDeduction(piece.deductions).grams;
	if (deductions.gt(gross)) return fail({ kind: 'piece-deductions-over-gross', gross, deductions });
	const contents = checkContents(piece.contents);
	return contents.ok ? ok({ grams: gross.minus(deductions) }) : contents;
}

function longer(value: Decimal, digits: number, places: number): boolean {
	return !value.isFinite() || value.precision(true) > digits || value.decimalPlaces() > places;
}

function tooLong(value: Decimal, most: number, mostPlaces: number): Result<never, PieceProblem> {
	return fail({ kind: 'piece-mass-too-many-digits', value, most, mostPlaces });
}

function checkContents(contents: readonly Content[]): Result<null, PieceProblem> {
	const seen = new Set<MetalId>();
	let total = EXACT_ZERO;
	for (const { metal, taken } of contents) {
		if (seen.has(metal)) return fail({ kind: 'piece-metal-twice', metal });
		seen.add(metal);
		if (taken.perMille.n < 0n) return fail({ kind: 'piece-content-negative', metal });
		total = plus(total, taken.perMille);
	}
	return compareExact(total, THOUSAND) > 0 ? fail({ kind: 'piece-contents-over-1000', perMille: total }) : ok(null);
}

/** The piece itself, if its net mass and contents are possible. Every piece passes here before it is kept. */
export function checkPiece(piece: Piece): Result<Piece, PieceProblem> {
	const net = netMass(piece);
	return net.ok ? ok(piece) : net;
}

/** The net mass of a piece that was checked when it was taken in. */
export function netOf(piece: Piece): Mass {
	const net = netMass(piece);
	assert(net.ok, `an unchecked piece reached the sums: ${net.ok ? '' : net.problem.kind}`);
	return net.value;
}

/**
 * Fine mass by metal.
 * formula: net grams x parts per thousand ÷ 1000, for each metal of the piece.
 * rounding: none; an exact fraction until it is printed.
 * source: common practice, no source.
 */
export function fineOf(piece: Piece): FineMass[] {
	const net = netOf(piece);
	return piece.contents.map(({ metal, taken }) => fineMass(net, metal, taken));
}

export type Estimate = {
	/** Net mass in grams. */
	readonly net: Uncertain;
	/** Fine mass in grams, for each metal in the piece. */
	readonly fine: Partial<Readonly<Record<MetalId, Uncertain>>>;
};

/**
 * Net and fine mass with everything that makes them uncertain, each under its source.
 * formula: fine = net x share taken, or net x mean of the belief where findings made one. Sources: reading:<key> and scale:<id> as in
 * mass/weighing; deduction:<key> = root of the sum of squares of the deductions; then either class:<class> = fine x shared spread and
 * piece:<key> = fine x own spread / √count, or, with a belief, tester:<id> = net x shared and piece:<key> = net x own. Grams throughout.
 * rounding: none (an estimate). The class's error is taken to move all metals of a piece the same way, which is the prudent side.
 * source: JCGM 100:2008 (GUM) 5.1.2 and F.1.2; the spreads are working defaults, common practice, no source.
 */
export function estimate(
	piece: Piece,
	key: string,
	scale?: Scale,
	spreads: Partial<Readonly<Record<SpreadId, Spread>>> = {}
): Estimate {
	const exactNet = netOf(piece).grams;
	const used = scale !== undefined && scale.id === piece.weighing.scale ? scale : null;
	const gross = massUncertainty(piece.weighing, key, used);
	const deducted = uncertain(0, `deduction:${key}`, -totalDeductionU(piece.deductions));
	const net = propagate(exactNet.toNumber(), [
		{ input: gross, sensitivity: 1 },
		{ input: deducted, sensitivity: 1 }
	]);
	const spread = spreadFor(piece.mark, piece.origin, spreads);
	const shared = `class:${classKey({ stamp: piece.mark, article: piece.article, origin: piece.origin })}`;
	const fine: Partial<Record<MetalId, Uncertain>> = {};
	const belief = piece.evidence?.belief ?? null;
	for (const { metal, taken } of piece.contents) {
		if (belief?.metal === metal) {
			fine[metal] = believed(belief, net, key);
			continue;
		}
		const share = toNumber(shareOf(taken));
		const value = toNumber(times(exact(exactNet), shareOf(taken)));
		fine[metal] = propagate(value, [
			{ input: net, sensitivity: share },
			{ input: uncertain(1, shared, spread.shared), sensitivity: value },
			{ input: uncertain(1, `piece:${key}`, spread.own / Math.sqrt(piece.count)), sensitivity: value }
		]);
	}
	return { net, fine };
}

/** Fine mass by what was found: the doubt of the class gives way to that of the findings. */
function believed({ mean, shared, own }: Belief, net: Uncertain, key: string): Uncertain {
	const part = (source: string, perMille: number) => ({ input: uncertain(0, source, perMille / 1000), sensitivity: net.value });
	return propagate((net.value * mean) / 1000, [
		{ input: net, sensitivity: mean / 1000 },
		...Object.entries(shared).map(([tester, u]) => part(`tester:${tester}`, u)),
		part(`piece:${key}`, own)
	]);
}
