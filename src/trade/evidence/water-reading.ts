import { normalCdf } from '../uncertainty/normal.ts';
import { standardUncertainty } from '../uncertainty/uncertain.ts';
import { claimOf, densityRange, familiesOf } from '../metal/families.ts';
import { lookAlike, type LookAlikeId } from '../metal/look-alikes.ts';
import { idealDensity } from '../metal/density.ts';
import { metals } from '../metal/metals.ts';
import type { Build } from './belief.ts';
import type { Water } from './finding.ts';
import type { Balance } from './fluorescence.ts';
import { CELLS, type Vector } from './grid.ts';
import type { Observation } from './observation.ts';
import type { Density } from './pool.ts';
import type { MainMetal } from './subject.ts';
import { densityByWater } from './water-weighing.ts';

/** An honest piece that holds air or stone dust weighs too light in water: how often, and by what share on average. Working defaults. */
const INNOCENT: Readonly<Record<Build, { readonly chance: number; readonly share: number }>> = {
	solid: { chance: 0.005, share: 0.1 },
	jointed: { chance: 0.05, share: 0.15 },
	hollow: { chance: 0.25, share: 0.35 }
};
/** The chance of a slip of the pen or a wet thread, which may give any density from 1 to 25 g/cm³. */
const SLIP = 0.01;
const ANY_DENSITY = 1 / 24;
/** A balance that was read is the family's own with this chance; its parts are good to about so much in density. */
const BELIEVED = 0.97;
const BALANCE_U = 0.006;

/** Beyond this many standard deviations a family has no part in a reading. */
const REACH = 9;
/** The share below z; so far out nothing is left above it that a number could hold. */
const shareBelow = (z: number): number => (z > REACH ? 1 : normalCdf(z));

/** The chance of a density reading per g/cm³ when the truth lies evenly between two densities and the reading has a bell's error. */
export function evenly(density: number, low: number, high: number, u: number): number {
	if (high - low < u / 50) {
		const z = (density - (low + high) / 2) / u;
		return Math.exp((-z * z) / 2) / (u * Math.sqrt(2 * Math.PI));
	}
	const below = shareBelow((density - low) / u);
	const z = (density - high) / u;
	// what the bell leaves above is lost in the last digit of a share that is no longer small
	return (z < -REACH && below > 0.001 ? below : below - shareBelow(z)) / (high - low);
}

type Ranges = { readonly low: Vector; readonly high: Vector; readonly limit: Vector };
/** The densities of a family by fineness never change; they are worked out once. */
const RANGES = new Map<string, Ranges>();

function rangesOf(family: ReturnType<typeof familiesOf>[number]): Ranges {
	const known = RANGES.get(family.id);
	if (known !== undefined) return known;
	const made = { low: new Float64Array(CELLS), high: new Float64Array(CELLS), limit: new Float64Array(CELLS) };
	for (let cell = 0; cell < CELLS; cell += 1) {
		const { low, high } = densityRange(family, cell);
		const { bias, limit } = claimOf(family, cell);
		made.low[cell] = low * (1 + bias);
		made.high[cell] = high * (1 + bias);
		made.limit[cell] = limit;
	}
	RANGES.set(family.id, made);
	return made;
}

/**
 * How likely a density is for a piece of one alloy, by its fineness.
 * formula: sum over colour families of weight x evenly between the family's densities, with u = √(u of the reading² + (mixing limit x
 * density / √3)²); where the balance was read by fluorescence, 97 % of it by the density of that balance instead. Per g/cm³.
 * rounding: none.
 * source: ideal mixing (metal/density.ts) with the honest claim of each family; JCGM 100:2008, 4.3.7 for limits as rectangles.
 */
export function solidDensity(density: number, u: number, metal: MainMetal, balance: Balance | null): Vector {
	const values = new Float64Array(CELLS);
	const families = familiesOf(metal);
	const total = families.reduce((sum, { weight }) => sum + weight, 0);
	const share = (balance === null ? 1 : 1 - BELIEVED) / total;
	for (const family of families) {
		const { low, high, limit } = rangesOf(family);
		for (let cell = 0; cell < CELLS; cell += 1) {
			const mixing = (limit[cell]! * density) / Math.sqrt(3);
			const all = Math.sqrt(u * u + mixing * mixing);
			if (density < low[cell]! - REACH * all || density > high[cell]! + REACH * all) continue;
			values[cell]! += family.weight * share * evenly(density, low[cell]!, high[cell]!, all);
		}
	}
	if (balance === null) return values;
	const rest = idealDensity(balance.map((part) => ({ share: part.share, density: metals[part.metal].density })));
	const limits = families.map((family) => rangesOf(family).limit);
	for (let cell = 0; cell < CELLS; cell += 1) {
		const ideal = 1 / (cell / 1000 / metals[metal].density + (1 - cell / 1000) / rest);
		const mixing = (limits.reduce((least, limit) => Math.min(least, limit[cell]!), 1) * density) / Math.sqrt(3);
		const balanceU = BALANCE_U * (1 - cell / 1000) * ideal;
		const all = Math.sqrt(u * u + mixing * mixing + balanceU * balanceU);
		if (Math.abs(density - ideal) < REACH * all) values[cell]! += BELIEVED * evenly(density, ideal, ideal, all);
	}
	return values;
}

/** The share of a layer in the mass of a layered piece: it makes the whole a little denser than its core. */
const LAYER = 0.08;

function coreDensity(core: LookAlikeId, density: number, u: number, metal: MainMetal): number {
	const { low, high } = lookAlike(core);
	const over = idealDensity([{ share: 1 - LAYER, density: high }, { share: LAYER, density: Math.max(high, metals[metal].density * 0.7) }]);
	return evenly(density, low, over, u);
}

/** An honest piece that weighs too light: the shortfall is exponential, up to nearly all of the density. */
function tooLight(density: number, build: Build): (truth: number) => number {
	const { share } = INNOCENT[build];
	const whole = share * (1 - Math.exp(-0.95 / share));
	return (truth) => {
		const short = (truth - density) / truth;
		return short < 0 || short > 0.95 ? 0 : Math.exp(-short / share) / (whole * truth);
	};
}

/**
 * A density: what it says of a solid piece by its fineness, and of what may lie under a layer.
 * formula: (1 − slip) x ((1 − innocent) x solid or core density + innocent x exponential shortfall below it) + slip x flat from 1 to 25, per
 * g/cm³. Tungsten under gold of 985 ‰ and more is as likely as the honest piece: whoever builds it trims it to match.
 * rounding: none.
 * source: common practice, no source, for the chances (working defaults); densities as in solidDensity and metal/look-alikes.ts.
 */
export function densityObservation(
	density: number,
	u: number,
	of: { readonly metal: MainMetal; readonly build: Build; readonly matched: boolean },
	balance: Balance | null
): Observation {
	const { chance } = INNOCENT[of.build];
	const solid = solidDensity(density, u, of.metal, balance);
	const { low: lows, high: highs } = rangesOf(familiesOf(of.metal)[0]!);
	const light = tooLight(density, of.build);
	const mix = (as: number, truth: number) => (1 - SLIP) * ((1 - chance) * as + chance * light(truth)) + SLIP * ANY_DENSITY;
	const values = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) values[cell] = mix(solid[cell]!, (lows[cell]! + highs[cell]!) / 2);
	return {
		solid: values,
		core: (core) => {
			if (of.matched && core === 'tungsten') return 'as solid';
			const { low, high } = lookAlike(core);
			return mix(coreDensity(core, density, u, of.metal), (low + high) / 2);
		}
	};
}

/** The density of a water weighing; null when the piece is too light on its scale to say anything. */
export function usefulDensity(finding: Pick<Water, 'method' | 'air' | 'water' | 'division' | 'temperature'>): Density | null {
	const found = densityByWater(finding);
	return found.ok && found.value.useful ? { density: found.value.density.value, u: standardUncertainty(found.value.density) } : null;
}
