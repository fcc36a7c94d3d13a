import { decimal, type Decimal } from '../number/decimal.ts';
import { compareExact, exact, ratio } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import type { Mass } from './mass.ts';
import { toMass, type MassUnitId } from './units.ts';

export type AccuracyClass = 'I' | 'II' | 'III' | 'IIII';

/** A scale of the shop: what its display steps by (d), the interval it is verified to (e), and its accuracy class if it has one. */
export type Scale = {
	readonly id: string;
	readonly name: string;
	readonly unit: MassUnitId;
	/** d, in the scale's unit. */
	readonly division: Decimal;
	/** e, in the scale's unit. */
	readonly verification: Decimal;
	readonly accuracyClass: AccuracyClass | null;
	/** The day of its last check, as text; null: never. */
	readonly checkedOn: string | null;
};

export type ScaleProblem =
	| { readonly kind: 'scale-name-missing' }
	| {
			readonly kind: 'scale-verification-under-division';
			readonly verification: Decimal;
			readonly division: Decimal;
			readonly unit: MassUnitId;
	  };

/** A scale as described by the buyer: it has a name, and e is no finer than the display (OIML R 76-1:2006, 3.4.2, from memory). */
export function checkScale(scale: Scale): Result<Scale, ScaleProblem> {
	const { name, verification, division, unit } = scale;
	if (name.trim() === '') return fail({ kind: 'scale-name-missing' });
	if (verification.lt(division)) return fail({ kind: 'scale-verification-under-division', verification, division, unit });
	return ok(scale);
}

/** Loads in e up to which the error may be 0.5 e, and up to which it may be 1 e; above it is 1.5 e. */
const BANDS: Readonly<Record<AccuracyClass, readonly [half: bigint, whole: bigint]>> = {
	I: [50_000n, 200_000n],
	II: [5_000n, 20_000n],
	III: [500n, 2_000n],
	IIII: [50n, 200n]
};

/** Whether the scale has just been verified or has been at work since: then twice the error is allowed. */
export type Occasion = 'verification' | 'inService';

/**
 * What it is: the largest error that a verified scale may have at a load; null for a scale without a class.
 * formula: 0.5 e, 1 e or 1.5 e by the load counted in e (class II: to 5 000, to 20 000, above; class III: to 500, to 2 000,
 * above); a load on the boundary belongs to the lower band; doubled in service. In grams.
 * rounding: none.
 * source: OIML R 76-1:2006, 3.5.1 table 6 and 3.5.2.
 */
export function maximumPermissibleError(scale: Scale, load: Mass, occasion: Occasion = 'verification'): Mass | null {
	if (scale.accuracyClass === null) return null;
	const e = toMass(scale.verification, scale.unit).grams;
	const counted = ratio(load.grams.abs(), e);
	const [half, whole] = BANDS[scale.accuracyClass];
	const steps = compareExact(counted, exact(half)) <= 0 ? '0.5' : compareExact(counted, exact(whole)) <= 0 ? '1' : '1.5';
	const error = e.times(decimal(steps));
	return { grams: occasion === 'inService' ? error.times(2) : error };
}

export type ErrorBand = {
	/** The largest load of the band; null: whatever the scale can hold. */
	readonly upTo: Mass | null;
	readonly error: Mass;
};

/**
 * What it is: the permitted errors of a verified scale as bands of load, for a person to read; none without a class.
 * formula: 0.5 e up to the first limit, 1 e up to the second, 1.5 e above (limits in e as in maximumPermissibleError). In grams.
 * rounding: none.
 * source: OIML R 76-1:2006, 3.5.1 table 6.
 */
export function errorBands(scale: Scale): readonly ErrorBand[] {
	if (scale.accuracyClass === null) return [];
	const e = toMass(scale.verification, scale.unit).grams;
	const [half, whole] = BANDS[scale.accuracyClass];
	return [
		{ upTo: { grams: e.times(half.toString()) }, error: { grams: e.times(decimal('0.5')) } },
		{ upTo: { grams: e.times(whole.toString()) }, error: { grams: e } },
		{ upTo: null, error: { grams: e.times(decimal('1.5')) } }
	];
}

const FIRST_COARSE_E = decimal('0.1');

/**
 * What it is: the smallest load that a scale weighs with a fair relative error.
 * formula: 100 e (class I), 20 e (class II with e below 0.1 g, class III), 50 e (class II with e of 0.1 g and more), 10 e
 * (class IIII); 20 e for a scale without a class. In grams.
 * rounding: none.
 * source: OIML R 76-1:2006, 3.2 table 3; 20 e without a class: common practice, no source.
 */
export function minimumLoad(scale: Scale): Mass {
	const e = toMass(scale.verification, scale.unit).grams;
	return { grams: e.times(intervals(scale.accuracyClass, e)) };
}

function intervals(accuracyClass: AccuracyClass | null, e: Decimal): number {
	switch (accuracyClass) {
		case 'I':
			return 100;
		case 'II':
			return e.gte(FIRST_COARSE_E) ? 50 : 20;
		case 'IIII':
			return 10;
		case 'III':
		case null:
			return 20;
	}
}
