import { decimal, type Decimal } from '../number/decimal.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { round } from '../number/rounding.ts';
import { propagate, type Uncertain } from '../uncertainty/uncertain.ts';

export type StoneCut = 'round' | 'round-diamond' | 'oval' | 'emerald-cut' | 'pear' | 'heart' | 'cabochon';

/** Stones of one size that stay in the piece, measured through the setting in millimetres. */
export type StoneSize = {
	readonly cut: StoneCut;
	readonly count: number;
	readonly length: Decimal;
	/** The same as the length for a round stone. */
	readonly width: Decimal;
	readonly depth: Decimal;
	/** Specific gravity; not used for the diamond formula, which holds it already. */
	readonly gravity: Decimal;
};

export type StoneProblem =
	| { readonly kind: 'stone-count-not-whole'; readonly count: number }
	| { readonly kind: 'stone-size-not-positive'; readonly length: Decimal; readonly width: Decimal; readonly depth: Decimal }
	| { readonly kind: 'stone-size-too-large'; readonly largest: Decimal; readonly most: Decimal }
	| { readonly kind: 'stone-gravity-unlikely'; readonly gravity: Decimal; readonly least: Decimal; readonly most: Decimal }
	| { readonly kind: 'stone-density-like-metal'; readonly metal: number; readonly stone: number }
	| { readonly kind: 'stone-water-impossible'; readonly grams: number; readonly gross: number };

/** Carats per cubic millimetre and unit of specific gravity. */
const factors: Readonly<Record<StoneCut, Decimal>> = {
	round: decimal('0.0018'),
	'round-diamond': decimal('0.0061'),
	oval: decimal('0.0020'),
	'emerald-cut': decimal('0.0025'),
	pear: decimal('0.0018'),
	heart: decimal('0.0018'),
	cabochon: decimal('0.0027')
};

export const stoneCuts = Object.keys(factors) as readonly StoneCut[];

const LARGEST = decimal('100');
const LEAST_GRAVITY = decimal('1');
const MOST_GRAVITY = decimal('7.5');
const STEP = decimal('0.001');

/**
 * Carats of measured stones, all of them together.
 * formula: round: diameter² x depth x gravity x 0.0018; round diamond: diameter² x depth x 0.0061; oval: (mean of length and
 * width)² x depth x gravity x 0.0020; emerald cut 0.0025, pear and heart 0.0018, cabochon 0.0027 x length x width x depth x
 * gravity; millimetres in, carats out, times the count.
 * rounding: half-even to 0.001 ct at the end; the formula itself is good to about 10 %.
 * source: printed gemmology formulas for stones in their settings.
 */
export function caratsBySize(size: StoneSize): Result<Decimal, StoneProblem> {
	const { length, width, depth, gravity, count, cut } = size;
	if (!Number.isSafeInteger(count) || count < 1 || count > 10_000) return fail({ kind: 'stone-count-not-whole', count });
	if (!length.gt(0) || !width.gt(0) || !depth.gt(0)) return fail({ kind: 'stone-size-not-positive', length, width, depth });
	const largest = [width, depth].reduce((most, value) => (value.gt(most) ? value : most), length);
	if (largest.gt(LARGEST)) return fail({ kind: 'stone-size-too-large', largest, most: LARGEST });
	const diamond = cut === 'round-diamond';
	if (!diamond && (gravity.lt(LEAST_GRAVITY) || gravity.gt(MOST_GRAVITY))) {
		return fail({ kind: 'stone-gravity-unlikely', gravity, least: LEAST_GRAVITY, most: MOST_GRAVITY });
	}
	const mean = length.plus(width).div(2);
	const area = cut === 'round' || diamond || cut === 'oval' ? mean.times(mean) : length.times(width);
	const one = area.times(depth).times(factors[cut]).times(diamond ? 1 : gravity);
	return ok(round(one.times(count), STEP, 'half-even'));
}

/**
 * The mass of stones in a closed setting, from the piece's mass and its volume in water.
 * formula: (V − m/ρ_metal) / (1/ρ_stone − 1/ρ_metal), with V in cm³, m in g, densities in g/cm³; grams out.
 * rounding: none (an estimate with its uncertainty).
 * source: two masses, two volumes, solved; common practice, no source.
 */
export function stonesByWater(
	volume: Uncertain,
	gross: Uncertain,
	metalDensity: Uncertain,
	stoneDensity: Uncertain
): Result<Uncertain, StoneProblem> {
	const [v, m, metal, stone] = [volume.value, gross.value, metalDensity.value, stoneDensity.value];
	if (!(stone > 0 && metal > stone * 1.05)) return fail({ kind: 'stone-density-like-metal', metal, stone });
	const gap = 1 / stone - 1 / metal;
	const grams = (v - m / metal) / gap;
	if (!(grams >= 0 && grams <= m)) return fail({ kind: 'stone-water-impossible', grams, gross: m });
	return ok(
		propagate(grams, [
			{ input: volume, sensitivity: 1 / gap },
			{ input: gross, sensitivity: -1 / (metal * gap) },
			{ input: metalDensity, sensitivity: (m - grams) / (metal * metal * gap) },
			{ input: stoneDensity, sensitivity: grams / (stone * stone * gap) }
		])
	);
}
