import { assert, decimal, type Decimal } from '../number/decimal.ts';
import { exact, times } from '../number/exact.ts';
import { round } from '../number/rounding.ts';
import { shareOf, type Fineness } from './fineness.ts';

/**
 * The gross mass at which a large gold bar is booked, in troy ounces.
 * formula: the largest multiple of 0.025 ozt that the bar exceeds by at least 0.002 ozt.
 * rounding: down to 0.025 ozt after taking off 0.002 ozt, once.
 * source: LBMA Good Delivery Rules, Annex B (weighing of gold bars).
 */
export function goldBarGross(weighed: Decimal): Decimal {
	const turn = decimal('0.002');
	assert(weighed.gte(turn), 'a bar weighs more than the turn of the scale');
	return round(weighed.minus(turn), decimal('0.025'), 'floor');
}

/**
 * The gross mass at which a large silver bar is booked, in troy ounces.
 * formula: the largest multiple of 0.1 ozt in the bar.
 * rounding: down to 0.1 ozt, once.
 * source: LBMA Good Delivery Rules, specification for silver bars (multiples of 0.10, rounded down), seen in a copy.
 */
export function silverBarGross(weighed: Decimal): Decimal {
	return round(weighed, decimal('0.1'), 'floor');
}

/**
 * The fine gold of a booked bar, in troy ounces.
 * formula: gross troy ounces x parts per thousand / 1000.
 * rounding: to 0.001 ozt, halves up, once.
 * source: LBMA Good Delivery Rules, Annex C (weight lists: 401.125 ozt at 995.8 is 399.440).
 */
export function barFineOunces(gross: Decimal, fineness: Fineness): Decimal {
	return round(times(exact(gross), shareOf(fineness)), decimal('0.001'), 'half-up');
}
