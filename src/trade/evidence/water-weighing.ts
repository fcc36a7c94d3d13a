import type { Decimal } from '../number/decimal.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { propagate, standardUncertainty, uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { Water } from './finding.ts';
import { ROOM_AIR, waterDensity, type WaterTemperatureProblem } from './water.ts';

export type WaterProblem =
	| WaterTemperatureProblem
	| { readonly kind: 'water-mass-not-positive'; readonly air: Decimal; readonly water: Decimal; readonly division: Decimal }
	/** In water it weighs no less than in air: the readings are exchanged, or the beaker's gain was typed as a reading. */
	| { readonly kind: 'water-no-loss'; readonly air: Decimal; readonly water: Decimal }
	| { readonly kind: 'water-density-unlikely'; readonly density: number; readonly least: number; readonly most: number };

export type WaterDensity = {
	/** g/cm³, with what makes it uncertain: air, water, temperature, bubble. */
	readonly density: Uncertain;
	/** Whether it says anything of the fineness. */
	readonly useful: boolean;
	/** Grams that would be useful on this scale at this density. */
	readonly leastGrams: number;
	/** Division in grams that would be useful for this mass. */
	readonly leastDivision: number;
};

const LEAST_DENSITY = 1;
const MOST_DENSITY = 25;
/** From this relative standard uncertainty on a density says nothing of the fineness: 1 % is 15 to 30 parts per thousand of gold. */
const USEFUL = 0.01;
/** What the readings do not show, as standard uncertainties. */
export type WaterDoubts = {
	/** °C: a thermometer in a glass of water. */
	readonly temperatureU: number;
	/** mm³: air under a link or a claw. It can only lift, and is taken as a doubt to both sides. */
	readonly bubble: number;
};
/** Working defaults, no source. */
export const waterDoubts: WaterDoubts = { temperatureU: 1, bubble: 0.5 };

const MM3 = 0.001;
/** How far apart the two temperatures are between which the slope of water's density is taken, °C. */
const APART = 0.1;

/** What the readings say: grams in air, and grams by which the water bears the piece up. */
function lift({ method, air, water }: Pick<Water, 'method' | 'air' | 'water'>): number {
	return (method === 'suspended' ? air.minus(water) : water).toNumber();
}

/**
 * Density by weighing in water: hung in it, or by what a beaker on the scale gains when the piece hangs in its water.
 * formula: ρ = m (ρ water − ρ air) / lift + ρ air; lift = grams in air − grams in water, or the beaker's gain. Contributions: air and water by
 * division / √12 each (√6 for the gain, a difference of two readings), temperature by the slope of water's density, bubble by its lift; g/cm³.
 * rounding: none. Useful when u ≤ 1 % of the density; least mass: readings and bubble count less as the mass grows, the temperature does not.
 * source: hydrostatic weighing as in OIML R 111-1:2004, B.7; Tanaka et al. 2001 for water; JCGM 100:2008, 5.1.2.
 */
export function densityByWater(
	of: Pick<Water, 'method' | 'air' | 'water' | 'division' | 'temperature'>,
	{ temperatureU, bubble }: WaterDoubts = waterDoubts
): Result<WaterDensity, WaterProblem> {
	const { method, air, water, division } = of;
	const celsius = of.temperature.toNumber();
	const liquid = waterDensity(celsius);
	if (!liquid.ok) return liquid;
	if (!air.gt(0) || water.lt(0) || (method === 'beaker' && !water.gt(0)) || !division.gt(0)) {
		return fail({ kind: 'water-mass-not-positive', air, water, division });
	}
	if (water.gte(air)) return fail({ kind: 'water-no-loss', air, water });
	const mass = air.toNumber();
	const up = lift(of);
	const less = liquid.value - ROOM_AIR;
	const value = (mass * less) / up + ROOM_AIR;
	if (!(value >= LEAST_DENSITY && value <= MOST_DENSITY)) {
		return fail({ kind: 'water-density-unlikely', density: value, least: LEAST_DENSITY, most: MOST_DENSITY });
	}
	const d = division.toNumber();
	const perLift = ((value - ROOM_AIR) / up) * -1;
	const reading = d / Math.sqrt(12);
	const density = propagate(value, [
		// hung in water, the reading in air counts twice: as the mass, and in the lift
		{ input: uncertain(mass, 'air', reading), sensitivity: less / up + (method === 'suspended' ? perLift : 0) },
		{ input: uncertain(up, 'water', method === 'suspended' ? reading : d / Math.sqrt(6)), sensitivity: perLift },
		{ input: uncertain(liquid.value, 'temperature', slope(celsius, liquid.value) * temperatureU), sensitivity: mass / up },
		{ input: uncertain(0, 'bubble', bubble * MM3 * liquid.value), sensitivity: perLift }
	]);
	const useful = standardUncertainty(density) <= USEFUL * value;
	return ok({ density, useful, leastGrams: leastGrams(density, mass), leastDivision: leastDivision(density, d) });
}

/** What water gains in density per °C, taken toward the inside of the table. */
function slope(celsius: number, at: number): number {
	const step = celsius > APART ? -APART : APART;
	const beside = waterDensity(celsius + step);
	return beside.ok ? (beside.value - at) / step : 0;
}

/** The mass at which this scale is just useful; infinite where the doubt of the temperature alone is too much. */
function leastGrams({ value, contributions }: Uncertain, mass: number): number {
	const { air = 0, water = 0, temperature = 0, bubble = 0 } = contributions;
	const room = (value * USEFUL) ** 2 - temperature ** 2;
	return room > 0 ? (mass * Math.hypot(air, water, bubble)) / Math.sqrt(room) : Infinity;
}

/** The coarsest division of the series 1, 2, 5 at which this mass would be useful; 0 when the bubble alone is too much. */
function leastDivision(density: Uncertain, division: number): number {
	const { air = 0, water = 0, temperature = 0, bubble = 0 } = density.contributions;
	const scale = Math.hypot(air, water);
	const room = (density.value * USEFUL) ** 2 - temperature ** 2 - bubble ** 2;
	if (room <= 0 || scale === 0) return 0;
	const most = (division * Math.sqrt(room)) / scale;
	const power = 10 ** Math.floor(Math.log10(most));
	const step = [5, 2, 1].find((each) => each * power <= most * (1 + 1e-9)) ?? 1;
	return Number((step * power).toPrecision(1));
}
