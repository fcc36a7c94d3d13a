import { assert, decimal, type Decimal } from '../number/decimal.ts';
import { compareExact, exact, EXACT_ZERO, times, type Exact } from '../number/exact.ts';
import type { Mass } from '../mass/mass.ts';
import { propagate, type Uncertain } from '../uncertainty/uncertain.ts';
import { perMilleNumber, shareOf, type Fineness } from './fineness.ts';
import type { FineMass } from './fine-mass.ts';
import type { MetalId } from './metals.ts';

/**
 * The fine metal in the layer of a filled or rolled article, by its stamp.
 * formula: fine grams = grams of the whole x layer's share of the mass x parts per thousand of the layer / 1000.
 * rounding: none; 1/20 14 kt is 14/480 of the whole.
 * source: 16 CFR 23.3 (gold filled, rolled gold plate: the fraction is of the weight of the metal in the whole article).
 */
export function layerFineMass<M extends MetalId>(whole: Mass, layerShare: Exact, metal: M, layer: Fineness): FineMass<M> {
	const share = compareExact(layerShare, EXACT_ZERO) >= 0 && compareExact(layerShare, exact(1n)) <= 0;
	assert(share, 'a layer is a share from 0 to 1 of the whole');
	return { metal, grams: times(times(exact(whole.grams), layerShare), shareOf(layer)) };
}

/**
 * The fine metal of a coating in grams, from what it covers: for vermeil and electroplate, where the mass says nothing.
 * formula: fine grams = area (cm²) x thickness (µm) x 0.0001 x density of the layer (g/cm³) x parts per thousand / 1000.
 * rounding: none; an estimate with its uncertainty, because area and thickness are estimates.
 * source: geometry; common practice, no source.
 */
export function coatingFineMass(area: Uncertain, thickness: Uncertain, density: Uncertain, layer: Fineness): Uncertain {
	assert(area.value >= 0 && thickness.value >= 0 && density.value > 0, 'a coating has an area, a thickness and a density');
	const k = 1e-4 * (perMilleNumber(layer) / 1000);
	return propagate(k * area.value * thickness.value * density.value, [
		{ input: area, sensitivity: k * thickness.value * density.value },
		{ input: thickness, sensitivity: k * area.value * density.value },
		{ input: density, sensitivity: k * area.value * thickness.value }
	]);
}

export type CoatingName = 'vermeil' | 'heavy-gold-electroplate' | 'gold-electroplate';

/**
 * The least thickness, in micrometres of fine gold, that a coating's name promises.
 * formula: vermeil and heavy gold electroplate 2.5 µm; gold electroplate 7 millionths of an inch = 0.175 µm as printed.
 * rounding: as printed in the guides.
 * source: 16 CFR 23.4 (vermeil, 2018 edition); 16 CFR 23.3 (electroplate), from memory.
 */
export const coatingMinimum: Readonly<Record<CoatingName, Decimal>> = {
	vermeil: decimal('2.5'),
	'heavy-gold-electroplate': decimal('2.5'),
	'gold-electroplate': decimal('0.175')
};
