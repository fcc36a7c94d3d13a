import { assert } from '../number/decimal.ts';
import { toNumber } from '../number/exact.ts';
import { propagate, uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { Alloy, Share } from './alloy.ts';
import { metals, type MetalId } from './metals.ts';

/** A share of the mass as a float, with the density (g/cm³) to use for it. */
export type Part = { readonly share: number; readonly density: number };

/**
 * The density of a mixture whose volumes add.
 * formula: 1/density = sum of share/density of each part; the harmonic mean by mass, never the arithmetic one.
 * rounding: none; a float, because density is an estimate.
 * source: conservation of volume; common practice, no source (checked against a printed worked example).
 */
export function idealDensity(parts: readonly Part[]): number {
	const whole = parts.reduce((total, part) => total + part.share, 0);
	assert(Math.abs(whole - 1) < 1e-9, `shares of a mixture sum to one, not ${whole}`);
	assert(parts.every((part) => part.share >= 0 && part.density > 0), 'a mixture has no negative share and no density of zero');
	return 1 / parts.reduce((volume, part) => volume + part.share / part.density, 0);
}

/** How far the adding of volumes can be trusted for a family of alloys: real = ideal x (1 + bias ± limit). */
export type MixingClaim = { readonly family: string; readonly bias: number; readonly limit: number };

const CLAIMS: readonly (MixingClaim & { readonly metals: readonly MetalId[] })[] = [
	{ family: 'Ag-Cu', metals: ['Ag', 'Cu'], bias: 0, limit: 0.003 },
	{ family: 'Au-Ag', metals: ['Au', 'Ag'], bias: 0, limit: 0.008 },
	{ family: 'Au-Cu', metals: ['Au', 'Cu'], bias: -0.007, limit: 0.005 },
	{ family: 'Au-Ag-Cu', metals: ['Au', 'Ag', 'Cu'], bias: 0, limit: 0.01 }
];

/** Every other alloy: from the ideal density up to 4 % above it. */
const OTHERS: MixingClaim = { family: 'others', bias: 0.02, limit: 0.02 };
const PURE: MixingClaim = { family: 'pure', bias: 0, limit: 0 };

/**
 * The claim that the mixing model makes for an alloy.
 * formula: the family's bias and limit x min(1, 2 (1 − sum of squared shares by atoms)): whole at equal atoms, nothing at a pure metal.
 * rounding: none.
 * source: family figures from measured alloys (working values of ours); the fading toward the pure metals is our own choice.
 */
export function mixingClaim(shares: readonly Share[]): MixingClaim {
	const held = shares.filter((part) => part.share.n !== 0n);
	if (held.length < 2) return PURE;
	const family =
		CLAIMS.find((claim) => claim.metals.length === held.length && held.every((part) => claim.metals.includes(part.metal))) ?? OTHERS;
	const atoms = held.map((part) => toNumber(part.share) / metals[part.metal].atomicMass);
	const all = atoms.reduce((a, b) => a + b, 0);
	const fade = Math.min(1, 2 * (1 - atoms.reduce((total, n) => total + (n / all) ** 2, 0)));
	return { family: family.family, bias: family.bias * fade, limit: family.limit * fade };
}

/**
 * The density of an alloy in g/cm³, with its uncertainty: ideal mixing moved by the known bias of its family.
 * formula: density = ideal x (1 + bias), kept between the lightest and the heaviest of its metals; contributions
 * `density:<metal>` = share x (density/metal density)² x u, and `mixing:<family>` = ideal x limit / √3.
 * rounding: none; a float, because density is an estimate.
 * source: CRC Handbook densities (metals.ts); family figures as in mixingClaim; limits rectangular as in JCGM 100:2008, 4.3.7.
 */
export function densityOf(alloy: Pick<Alloy, 'shares'>): Uncertain {
	const parts = alloy.shares.map(({ metal, share }) => ({ metal, share: toNumber(share), density: metals[metal].density }));
	const ideal = idealDensity(parts);
	const claim = mixingClaim(alloy.shares);
	const all = parts.filter((part) => part.share > 0).map((part) => part.density);
	const value = Math.min(Math.max(ideal * (1 + claim.bias), Math.min(...all)), Math.max(...all));
	const terms = parts.map(({ metal, share, density }) => ({
		input: uncertain(density, `density:${metal}`, metals[metal].densityU),
		sensitivity: share * (value / density) ** 2
	}));
	if (claim.limit === 0) return propagate(value, terms);
	const mixing = uncertain(0, `mixing:${claim.family}`, (ideal * claim.limit) / Math.sqrt(3));
	return propagate(value, [...terms, { input: mixing, sensitivity: 1 }]);
}
