import { idealDensity } from './density.ts';
import { metals, type MetalId } from './metals.ts';

export type FamilyId = 'yellow' | 'red' | 'green' | 'white-nickel' | 'white-palladium' | 'silver' | 'platinum' | 'palladium';

/** What stands beside the main metal: the corners between which the balance of a family may lie, each as shares that sum to one. */
export type Family = {
	readonly id: FamilyId;
	readonly metal: 'Au' | 'Ag' | 'Pt' | 'Pd';
	/** How common the family is among the alloys of its metal. */
	readonly weight: number;
	readonly corners: readonly Partial<Readonly<Record<MetalId, number>>>[];
	/** Real density = ideal x (1 + bias ± limit), away from the pure metal. */
	readonly bias: number;
	readonly limit: number;
};

type Corner = Family['corners'][number];
/** Silver against copper at two ratios, with the least and the most zinc; shares of the balance. */
const redToGreen = (leastSilver: number, mostSilver: number, mostZinc: number): readonly Corner[] =>
	[0, mostZinc].flatMap((Zn) => [leastSilver, mostSilver].map((silver): Corner => ({ Ag: silver * (1 - Zn), Cu: (1 - silver) * (1 - Zn), Zn })));

/**
 * The colour families of gold and the usual balances of the other metals: working defaults.
 * formula: shares of the balance: yellow Ag:(Ag+Cu) 25 to 80 %, zinc up to 20 %; red up to 30 % silver, zinc up to 12 %; green 80 % silver and more;
 * white with nickel 20 to 55 %, zinc 10 to 30 %, rest copper; white with palladium 30 to 70 %, copper up to 20 %, rest silver.
 * rounding: none.
 * source: common practice, no source; limits of ideal mixing as in metal/density.ts: red covers gold with copper alone and gold with silver and
 * copper, green gold with silver alone and with both. What zinc adds to yellow, red and silver is not in their limits.
 */
export const families: readonly Family[] = [
	{ id: 'yellow', metal: 'Au', weight: 0.62, corners: redToGreen(0.25, 0.8, 0.2), bias: 0, limit: 0.01 },
	{
		id: 'red', metal: 'Au', weight: 0.13, bias: -0.001, limit: 0.011,
		corners: [{ Cu: 1 }, { Ag: 0.3, Cu: 0.7 }, { Cu: 0.88, Zn: 0.12 }, { Ag: 0.3, Cu: 0.58, Zn: 0.12 }]
	},
	{ id: 'green', metal: 'Au', weight: 0.05, corners: [{ Ag: 1 }, { Ag: 0.8, Cu: 0.2 }], bias: 0, limit: 0.01 },
	{
		id: 'white-nickel', metal: 'Au', weight: 0.1, bias: 0.02, limit: 0.02,
		corners: [{ Ni: 0.2, Zn: 0.1, Cu: 0.7 }, { Ni: 0.2, Zn: 0.3, Cu: 0.5 }, { Ni: 0.55, Zn: 0.1, Cu: 0.35 }, { Ni: 0.55, Zn: 0.3, Cu: 0.15 }]
	},
	{
		id: 'white-palladium', metal: 'Au', weight: 0.1, bias: 0.02, limit: 0.02,
		corners: [{ Pd: 0.3, Ag: 0.7 }, { Pd: 0.3, Cu: 0.2, Ag: 0.5 }, { Pd: 0.7, Ag: 0.3 }, { Pd: 0.7, Cu: 0.2, Ag: 0.1 }]
	},
	{ id: 'silver', metal: 'Ag', weight: 1, corners: [{ Cu: 1 }, { Cu: 0.7, Zn: 0.3 }], bias: 0, limit: 0.003 },
	{
		id: 'platinum', metal: 'Pt', weight: 1, bias: 0.01, limit: 0.02,
		corners: [{ Cu: 1 }, { Co: 1 }, { Ru: 1 }, { Pd: 1 }, { Ir: 1 }, { W: 1 }]
	},
	{ id: 'palladium', metal: 'Pd', weight: 1, bias: 0.01, limit: 0.02, corners: [{ Ag: 1 }, { Cu: 1 }, { Ru: 1 }, { Ga: 0.5, Cu: 0.5 }] }
];

export function familiesOf(metal: Family['metal']): readonly Family[] {
	return families.filter((family) => family.metal === metal);
}

/** A corner as it is reckoned with: its density in g/cm³, and moles of each of its metals in a gram. */
type Balance = { readonly density: number; readonly moles: readonly number[] };

function balanceOf(corner: Corner): Balance {
	const parts = (Object.entries(corner) as [MetalId, number][]).map(([metal, share]) => ({ share, of: metals[metal] }));
	return {
		density: idealDensity(parts.map(({ share, of }) => ({ share, density: of.density }))),
		moles: parts.map(({ share, of }) => share / of.atomicMass)
	};
}

/** Of the families in the table, worked out once; any other family is worked out when it is asked for. */
const BALANCES = new Map(families.map((family) => [family, family.corners.map(balanceOf)]));

function balancesOf(family: Family): readonly Balance[] {
	return BALANCES.get(family) ?? family.corners.map(balanceOf);
}

/**
 * Between what and what the density of a family lies at one fineness, volumes adding up.
 * formula: least and most over the corners of 1 / (share of the main metal / its density + rest / density of the corner), g/cm³; volume is
 * linear in the shares, so the extremes are at corners.
 * rounding: none.
 * source: conservation of volume (metal/density.ts).
 */
export function densityRange(family: Family, perMille: number): { readonly low: number; readonly high: number } {
	const share = perMille / 1000;
	const all = balancesOf(family).map((rest) => 1 / (share / metals[family.metal].density + (1 - share) / rest.density));
	return { low: Math.min(...all), high: Math.max(...all) };
}

/** How far from a pure metal an alloy is: 0 pure, 1 halves by atoms; moles of the main metal, and of the rest by so many grams of a balance. */
function mixedness(main: number, rest: number, { moles }: Balance): number {
	let all = main;
	let squares = main * main;
	for (const each of moles) {
		all += rest * each;
		squares += (rest * each) ** 2;
	}
	return 2 * (1 - squares / (all * all));
}

/**
 * The honest claim of ideal mixing for a family at one fineness.
 * formula: bias and limit of the family x the most over its corners of min(1, 2 (1 − sum of squared shares by atoms)), as in metal/density.ts.
 * rounding: none.
 * source: family figures from measured alloys (working values of ours); the fading toward the pure metal is our own choice.
 */
export function claimOf(family: Family, perMille: number): { readonly bias: number; readonly limit: number } {
	const share = perMille / 1000;
	const main = share / metals[family.metal].atomicMass;
	const fade = Math.min(1, Math.max(...balancesOf(family).map((balance) => mixedness(main, 1 - share, balance))));
	return fade > 0 ? { bias: family.bias * fade, limit: family.limit * fade } : { bias: 0, limit: 0 };
}
