import { decimal } from '../number/decimal.ts';
import { ok, type Result } from '../number/result.ts';
import { propagate, standardUncertainty, uncertain } from '../uncertainty/uncertain.ts';
import type { Water } from '../evidence/finding.ts';
import { densityByWater, type WaterProblem } from '../evidence/water-weighing.ts';
import type { Deduction } from './deduction.ts';
import { stonesByWater, type StoneProblem } from './stones.ts';

/** Relative standard uncertainty of a density that is taken from a table: alloys of one karat differ, stones of one kind less. Working defaults. */
const METAL_U = 0.02;
const STONE_U = 0.01;

export type StonesInWater = Pick<Water, 'method' | 'air' | 'water' | 'division' | 'temperature'> & {
	/** g/cm³ */
	readonly metalDensity: number;
	readonly stoneDensity: number;
};

/**
 * The deduction for stones that cannot be measured through their setting, by weighing the piece in water.
 * formula: volume = grams in air / density of the whole by water; stones = (volume − grams / density of the metal) / (1 / density of the stone
 * − 1 / density of the metal), grams; its doubt from the weighing, 2 % of the metal's density and 1 % of the stone's.
 * rounding: half to even, to 0.001 g, as typed amounts are; the doubt is an estimate.
 * source: two masses, two volumes, solved; JCGM 100:2008, 5.1.2; the two percentages are working defaults, common practice, no source.
 */
export function stonesInWater(of: StonesInWater, how: string): Result<Deduction, WaterProblem | StoneProblem> {
	const found = densityByWater(of);
	if (!found.ok) return found;
	const { density } = found.value;
	const mass = of.air.toNumber();
	const volume = propagate(mass / density.value, [{ input: density, sensitivity: -mass / density.value ** 2 }]);
	const stones = stonesByWater(
		volume,
		uncertain(mass, 'air', of.division.toNumber() / Math.sqrt(12)),
		uncertain(of.metalDensity, 'metal', METAL_U * of.metalDensity),
		uncertain(of.stoneDensity, 'stone', STONE_U * of.stoneDensity)
	);
	if (!stones.ok) return stones;
	const grams = decimal(stones.value.value.toFixed(3));
	return ok({ what: 'stones', mass: { grams }, u: standardUncertainty(stones.value), how });
}
