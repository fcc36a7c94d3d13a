import { assert, decimal, type Decimal, ONE } from '../number/decimal.ts';
import { divide, exact, sum, type Exact } from '../number/exact.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { round } from '../number/rounding.ts';
import { minusUncertain, propagate, standardUncertainty, uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import { minusMass, type Mass } from './mass.ts';
import { maximumPermissibleError, minimumLoad, type Scale } from './scale.ts';
import { toMass, type MassUnitId } from './units.ts';

const TEN = decimal('10');

/** One load as it was weighed: what was typed is kept beside what it means. */
export type Weighing = {
	/** The number as typed, without its unit: "12.30" is not "12.3". */
	readonly typed: string;
	readonly reading: Decimal;
	readonly unit: MassUnitId;
	/** The step of the display, in the unit; null: taken from the digits typed. */
	readonly division: Decimal | null;
	/** Which scale of the shop, if it is known. */
	readonly scale: string | null;
	/** Further readings of the same load, in the unit. */
	readonly repeats: readonly Decimal[];
	/** The reading of the empty container, in the unit; null: none was taken off. */
	readonly tare: Decimal | null;
};

export type WeighingProblem =
	| NumberProblem
	| { readonly kind: 'mass-tare-not-less'; readonly reading: Decimal; readonly tare: Decimal; readonly unit: MassUnitId };

export type WeighingOptions = {
	readonly mark?: DecimalMark | undefined;
	readonly division?: Decimal | null | undefined;
	/** The scale used; its division is taken if it shows the same unit and no other division is given. */
	readonly scale?: Scale | null | undefined;
	readonly repeats?: readonly string[] | undefined;
	readonly tare?: string | null | undefined;
};

/** Reads one weighing as typed; every reading must be positive and more than the tare. */
export function weighing(typed: string, unit: MassUnitId, options: WeighingOptions = {}): Result<Weighing, WeighingProblem> {
	const rules = options.mark === undefined ? {} : { mark: options.mark };
	const readings: Decimal[] = [];
	for (const text of [typed, ...(options.repeats ?? [])]) {
		const reading = parseNumber(text, { ...rules, positive: true });
		if (!reading.ok) return reading;
		readings.push(reading.value);
	}
	let tare: Decimal | null = null;
	if (options.tare !== undefined && options.tare !== null) {
		const read = parseNumber(options.tare, rules);
		if (!read.ok) return read;
		tare = read.value;
		const least = readings.reduce((a, b) => (b.lt(a) ? b : a));
		if (tare.gte(least)) return fail({ kind: 'mass-tare-not-less', reading: least, tare, unit });
	}
	const scale = options.scale ?? null;
	const ofScale = scale !== null && scale.unit === unit ? scale.division : null;
	const division = options.division ?? ofScale;
	assert(division === null || division.gt(0), 'a scale division must be positive');
	const [reading, ...repeats] = readings;
	return ok({ typed: typed.trim(), reading: reading!, unit, division, scale: scale?.id ?? null, repeats, tare });
}

/** The step of the reading in its unit: the scale's, or one of the last digit typed ("12.30" steps by 0.01). */
export function divisionOf(w: Weighing): Decimal {
	if (w.division !== null) return w.division;
	const digits = w.typed.replace(/\D/g, '');
	let step = ONE;
	for (let place = 0; place < digits.length; place += 1) {
		if (w.reading.div(step).equals(decimal(digits))) return step;
		step = step.div(TEN);
	}
	// the text does not tell: one of the last digit of the number itself
	return ONE.div(TEN.pow(w.reading.decimalPlaces()));
}

function readingsOf(w: Weighing): readonly Decimal[] {
	return [w.reading, ...w.repeats];
}

function meanOf(w: Weighing): Exact {
	return divide(sum(readingsOf(w).map((reading) => exact(reading))), exact(BigInt(1 + w.repeats.length)));
}

/** The mean reading in the unit, container included. */
function grossReading(w: Weighing): Decimal {
	return w.repeats.length === 0 ? w.reading : round(meanOf(w), divisionOf(w).div(TEN), 'half-even');
}

/**
 * What it is: the mass that a weighing found, its container taken off.
 * formula: (mean of the readings - tare) in the unit x grams in one of the unit.
 * rounding: a single reading: none; the mean of repeated readings: half-even to a tenth of the division, before the tare.
 * source: common practice, no source.
 */
export function massOf(w: Weighing): Mass {
	const gross = toMass(grossReading(w), w.unit);
	return w.tare === null ? gross : minusMass(gross, toMass(w.tare, w.unit));
}

/**
 * What it is: the mass of a weighing with its doubt, in grams: "reading:key" is its own, "scale:id" is shared by every
 * weighing on that scale.
 * formula: reading: square root of (d squared / 12 + variance of the repeats / n), with d squared / 6 where a tare reading is
 * taken off; scale: largest permitted error at the load on the pan / square root of 3, for a scale with a class.
 * rounding: none.
 * source: JCGM 100:2008, 4.3.7 and F.2.2.1 (resolution), 4.2.3 (repeats); OIML R 76-1:2006, table 6.
 */
export function massUncertainty(w: Weighing, key: string, scale?: Scale | null): Uncertain {
	const grams = toMass(ONE, w.unit).grams.toNumber();
	const d = divisionOf(w).toNumber() * grams;
	const resolution = (d * d) / (w.tare === null ? 12 : 6);
	const value = massOf(w).grams.toNumber();
	const reading = uncertain(value, `reading:${key}`, Math.sqrt(resolution + varianceOfMean(w) * grams * grams));
	const permitted = scale === undefined || scale === null ? null : maximumPermissibleError(scale, toMass(grossReading(w), w.unit));
	if (scale === undefined || scale === null || permitted === null) return reading;
	assert(w.scale === null || w.scale === scale.id, `weighed on ${w.scale}, not on ${scale.id}`);
	const shared = uncertain(0, `scale:${scale.id}`, permitted.grams.toNumber() / Math.sqrt(3));
	return propagate(value, [reading, shared].map((input) => ({ input, sensitivity: 1 })));
}

function varianceOfMean(w: Weighing): number {
	const readings = readingsOf(w).map((reading) => reading.toNumber());
	const n = readings.length;
	if (n < 2) return 0;
	const mean = readings.reduce((a, b) => a + b, 0) / n;
	return readings.reduce((total, x) => total + (x - mean) ** 2, 0) / (n * (n - 1));
}

/** What a buyer should know of a weighing that is right as it stands. Masses in grams. */
export type WeighingWarning =
	| { readonly kind: 'load-under-minimum'; readonly load: Mass; readonly minimum: Mass; readonly scale: string }
	| { readonly kind: 'load-under-fifty-divisions'; readonly load: Mass; readonly least: Mass }
	| { readonly kind: 'reading-between-divisions'; readonly reading: Decimal; readonly division: Decimal; readonly unit: MassUnitId };

const FEWEST_DIVISIONS = 50;

/**
 * What it is: what makes a reading doubtful: too small a load, or digits that the display cannot show.
 * formula: net load < least load of the scale; net load < 50 d; reading not a whole multiple of d.
 * rounding: none.
 * source: OIML R 76-1:2006, table 3; NIST Handbook 44, G-UR.1.1, as read by Oregon Department of Agriculture (50 divisions).
 */
export function warnings(w: Weighing, scale: Scale | null = null): WeighingWarning[] {
	const found: WeighingWarning[] = [];
	const load = massOf(w);
	const division = divisionOf(w);
	const minimum = scale === null ? null : minimumLoad(scale);
	if (scale !== null && minimum !== null && load.grams.lt(minimum.grams)) {
		found.push({ kind: 'load-under-minimum', load, minimum, scale: scale.name });
	}
	const least = toMass(division.times(FEWEST_DIVISIONS), w.unit);
	if (load.grams.lt(least.grams)) found.push({ kind: 'load-under-fifty-divisions', load, least });
	const odd = readingsOf(w).find((reading) => !reading.mod(division).isZero());
	if (odd !== undefined) found.push({ kind: 'reading-between-divisions', reading: odd, division, unit: w.unit });
	return found;
}

/** The load changed between test and payment. All in grams; `allowed` is three standard uncertainties of the difference. */
export type SameLoadProblem = {
	readonly kind: 'mass-changed';
	readonly first: Mass;
	readonly second: Mass;
	readonly difference: Mass;
	readonly allowed: number;
};

/** Standard uncertainties of a difference that two weighings of one load may lie apart. */
export const TIMES_ALLOWED = 3;

/**
 * What it is: whether two weighings can be of the same load (weigh twice: at the test and at the payment).
 * formula: absolute difference <= 3 x standard uncertainty of the difference, in grams; the error of a scale that was used
 * for both weighings cancels.
 * rounding: none.
 * source: common practice, no source (three standard uncertainties); JCGM 100:2008, 5.2.2 for the difference.
 */
export function sameLoad(
	first: Weighing,
	second: Weighing,
	scales: readonly Scale[] = []
): Result<{ readonly difference: Mass; readonly allowed: number }, SameLoadProblem> {
	const scaleOf = (w: Weighing) => scales.find((scale) => scale.id === w.scale) ?? null;
	const off = minusUncertain(massUncertainty(first, 'first', scaleOf(first)), massUncertainty(second, 'second', scaleOf(second)));
	const allowed = TIMES_ALLOWED * standardUncertainty(off);
	const difference = minusMass(massOf(second), massOf(first));
	if (difference.grams.abs().toNumber() <= allowed) return ok({ difference, allowed });
	return fail({ kind: 'mass-changed', first: massOf(first), second: massOf(second), difference, allowed });
}
