import { decimal, ZERO, type Decimal } from '../number/decimal.ts';
import { ok, type Result } from '../number/result.ts';
import type { Mass } from '../mass/mass.ts';
import { caratsBySize, type StoneProblem, type StoneSize } from './stones.ts';

/** What is in or on a piece and is not its metal. */
export type DeductionKind = 'stones' | 'springs' | 'pins' | 'movement' | 'crystal' | 'filler' | 'enamel' | 'dirt' | 'other';

export const deductionKinds: readonly DeductionKind[] = [
	'stones',
	'springs',
	'pins',
	'movement',
	'crystal',
	'filler',
	'enamel',
	'dirt',
	'other'
];

export function isDeductionKind(text: string): text is DeductionKind {
	return (deductionKinds as readonly string[]).includes(text);
}

export type Deduction = {
	readonly what: DeductionKind;
	/** Of all pieces of the entry together. */
	readonly mass: Mass;
	/** Standard uncertainty in grams. */
	readonly u: number;
	/** What was typed, measured or taken by default, as the person reads it again. */
	readonly how: string;
	readonly stones?: StoneSize;
};

/** Relative standard uncertainty of an amount that is judged and not weighed apart. Working default, editable per piece. */
export const DEFAULT_RELATIVE_U = 0.1;

/**
 * A deduction of a stated mass.
 * formula: as typed in grams; standard uncertainty 10 % of it, since what is still in the piece is judged, not weighed.
 * rounding: none.
 * source: common practice, no source (a working default).
 */
export function statedDeduction(what: DeductionKind, mass: Mass, how: string): Deduction {
	return { what, mass, u: mass.grams.toNumber() * DEFAULT_RELATIVE_U, how };
}

const CARAT = decimal('0.2');

/**
 * The deduction for measured stones.
 * formula: carats by size x 0.2 g; standard uncertainty 10 %.
 * rounding: the carats, half-even to 0.001 ct.
 * source: printed gemmology formulas; the carat of 0.2 g: 4th CGPM (1907), from memory.
 */
export function stoneDeduction(size: StoneSize, how: string): Result<Deduction, StoneProblem> {
	const carats = caratsBySize(size);
	if (!carats.ok) return carats;
	const mass: Mass = { grams: carats.value.times(CARAT) };
	return ok({ what: 'stones', mass, u: mass.grams.toNumber() * DEFAULT_RELATIVE_U, how, stones: size });
}

const FILLER_SHARE = decimal('0.9');
const FILLER_RELATIVE_U = 0.03;
/** Marks a filler that nobody weighed. */
export const FILLER_BY_DEFAULT = 'default: 90 % of the mass';

/**
 * The filler of a weighted piece until it is opened: pitch, plaster or cement under a silver shell.
 * formula: 90 % of the gross mass; standard uncertainty 3 % of the gross mass.
 * rounding: none.
 * source: common practice, no source (a working default: about 10 % of a weighted piece is silver).
 */
export function fillerByDefault(gross: Mass): Deduction {
	const mass: Mass = { grams: gross.grams.times(FILLER_SHARE) };
	return { what: 'filler', mass, u: gross.grams.toNumber() * FILLER_RELATIVE_U, how: FILLER_BY_DEFAULT };
}

/**
 * All deductions of a piece together.
 * formula: sum of their masses in grams.
 * rounding: none.
 * source: common practice, no source.
 */
export function totalDeduction(deductions: readonly Deduction[]): Mass {
	let grams: Decimal = ZERO;
	for (const { mass } of deductions) grams = grams.plus(mass.grams);
	return { grams };
}

/**
 * The standard uncertainty of all deductions of a piece together.
 * formula: root of the sum of the squares in grams (each is judged by itself).
 * rounding: none (an estimate).
 * source: JCGM 100:2008 (GUM) 5.1.2.
 */
export function totalDeductionU(deductions: readonly Deduction[]): number {
	return Math.sqrt(deductions.reduce((squares, { u }) => squares + u * u, 0));
}
