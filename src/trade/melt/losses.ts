import { assert, decimal, ONE, type Decimal } from '../number/decimal.ts';
import { exact, minus, plus, times, toNumber, type Exact } from '../number/exact.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { LossClassId } from '../piece/loss-class.ts';

/** From the least to the most that a share is thought to be (0.005 = 0.5 %). */
export type Range = { readonly low: Decimal; readonly high: Decimal };

/** What a melt takes from metal of one loss class. */
export type Losses = {
	/** Dirt, wax, stones, flux: the share of the net mass that never was metal. */
	readonly nonMetal: Range;
	/** Fume, slag and scale: the share of the metal's mass that is gone after the melt, fine and base together. */
	readonly metalLoss: Range;
	/** The share of the precious metal that is in the bar. */
	readonly retention: Range;
};

export type LossPart = keyof Losses;
/** What the buyer set himself; parts not set keep the default. */
export type LossOverrides = Partial<Record<LossClassId, Partial<Losses>>>;

export type LossProblem =
	| { readonly kind: 'loss-range-reversed'; readonly low: Decimal; readonly high: Decimal }
	| {
			readonly kind: 'loss-range-outside';
			readonly part: LossPart;
			readonly value: Decimal;
			readonly least: Decimal;
			readonly most: Decimal;
	  };

const between = (low: string, high: string): Range => ({ low: decimal(low), high: decimal(high) });

/**
 * Working defaults, editable and shown as such: common practice and memory, no source.
 * 'bar' and 'base' are ours; single trade figures (0.998) are given one thousandth to either side.
 */
export const defaultLosses: Readonly<Record<LossClassId, Losses>> = {
	clean: { nonMetal: between('0', '0.005'), metalLoss: between('0.002', '0.008'), retention: between('0.999', '0.9995') },
	worn: { nonMetal: between('0.002', '0.01'), metalLoss: between('0.003', '0.01'), retention: between('0.998', '0.9995') },
	'stone-set': { nonMetal: between('0.02', '0.15'), metalLoss: between('0.004', '0.01'), retention: between('0.997', '0.999') },
	lemel: { nonMetal: between('0.02', '0.15'), metalLoss: between('0.005', '0.02'), retention: between('0.99', '0.998') },
	dental: { nonMetal: between('0.05', '0.3'), metalLoss: between('0.005', '0.01'), retention: between('0.99', '0.998') },
	'zinc-solder': { nonMetal: between('0.005', '0.02'), metalLoss: between('0.008', '0.015'), retention: between('0.997', '0.999') },
	base: { nonMetal: between('0.005', '0.03'), metalLoss: between('0.01', '0.04'), retention: between('0.97', '0.99') },
	bar: { nonMetal: between('0', '0.0002'), metalLoss: between('0.0005', '0.002'), retention: between('0.9995', '1') }
};

/** No class of scrap is more than nine parts in ten dirt, or loses more than half of its metal: such a figure is a slip of the hand. */
const LIMITS: Readonly<Record<LossPart, Range>> = {
	nonMetal: between('0', '0.9'),
	metalLoss: between('0', '0.5'),
	retention: between('0.5', '1')
};

/** A range as set by the buyer. */
export function lossRange(part: LossPart, low: Decimal, high: Decimal): Result<Range, LossProblem> {
	const { low: least, high: most } = LIMITS[part];
	for (const value of [low, high]) {
		if (value.lt(least) || value.gt(most)) return fail({ kind: 'loss-range-outside', part, value, least, most });
	}
	return low.gt(high) ? fail({ kind: 'loss-range-reversed', low, high }) : ok({ low, high });
}

const PERCENT = decimal('100');

/** A range as typed in two fields, in percent. */
export function parseLossRange(
	part: LossPart,
	low: string,
	high: string,
	mark: DecimalMark = 'dot'
): Result<Range, NumberProblem | LossProblem> {
	const least = parseNumber(low, { mark, most: '100' });
	if (!least.ok) return least;
	const most = parseNumber(high, { mark, most: '100' });
	return most.ok ? lossRange(part, least.value.div(PERCENT), most.value.div(PERCENT)) : most;
}

export function lossesOf(lossClass: LossClassId, own: LossOverrides = {}): Losses {
	return { ...defaultLosses[lossClass], ...own[lossClass] };
}

/**
 * The one value that a range is calculated with.
 * formula: (low + high) ÷ 2
 * rounding: none, a fraction.
 * source: JCGM 100:2008 (GUM) 4.3.7, the middle of a rectangular distribution; from memory.
 */
export function expected({ low, high }: Range): Exact {
	return times(plus(exact(low), exact(high)), { n: 1n, d: 2n });
}

/**
 * A range as a value with a standard uncertainty from one source, shared by all metal of the class.
 * formula: u = (high − low) ÷ (2 √3)
 * rounding: none, an estimate.
 * source: JCGM 100:2008 (GUM) 4.3.7, rectangular distribution; from memory.
 */
export function uncertainRange(range: Range, source: string): Uncertain {
	assert(range.low.lte(range.high) && range.low.gte(0) && range.high.lte(ONE), 'a loss is a share');
	const half = toNumber(minus(exact(range.high), exact(range.low))) / 2;
	return uncertain(toNumber(expected(range)), source, half / Math.sqrt(3));
}
