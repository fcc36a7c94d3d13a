import { claimOf, densityRange, familiesOf, type Family, type FamilyId } from '../metal/families.ts';
import type { MainMetal } from './subject.ts';

export type Span = { readonly low: number; readonly high: number };
export type FamilySpan = Span & { readonly family: FamilyId };

/** The densities of a family at one fineness with its bias, and so many of its limits on either side. */
function withClaim(family: Family, perMille: number, limits: number): Span {
	const { low, high } = densityRange(family, perMille);
	const { bias, limit } = claimOf(family, perMille);
	return { low: low * (1 + bias - limits * limit), high: high * (1 + bias + limits * limit) };
}

/**
 * Between what and what the density of a piece lies, for each colour family, when its fineness is known.
 * formula: range over the family's balances x (1 + bias ± limit), g/cm³.
 * rounding: none.
 * source: metal/families.ts.
 */
export function densitiesOf(metal: MainMetal, perMille: number, limits = 1): FamilySpan[] {
	return familiesOf(metal).map((family) => ({ family: family.id, ...withClaim(family, perMille, limits) }));
}

/**
 * Between what and what the fineness lies, for each colour family, when only the density is known: why a density seldom decides.
 * formula: all tenths of a part per thousand within which the family's range of density, with so many limits of its claim, meets density ± u.
 * rounding: outward to a tenth of a part per thousand, so that nothing that is possible is left out.
 * source: metal/families.ts.
 */
export function finenessesOf(
	metal: MainMetal,
	density: number,
	u: number,
	limits = 1,
	among: readonly Family[] = familiesOf(metal)
): FamilySpan[] {
	return among.flatMap((family) => {
		let low = Infinity;
		let high = -Infinity;
		let before = withClaim(family, 0, limits);
		for (let tenth = 1; tenth <= 10_000; tenth += 1) {
			const after = withClaim(family, tenth / 10, limits);
			if (density + u >= Math.min(before.low, after.low) && density - u <= Math.max(before.high, after.high)) {
				low = Math.min(low, (tenth - 1) / 10);
				high = tenth / 10;
			}
			before = after;
		}
		return low > high ? [] : [{ family: family.id, low, high }];
	});
}

/** From the lowest to the highest of several spans; null for none. */
export function allOf(spans: readonly Span[]): Span | null {
	if (spans.length === 0) return null;
	return { low: Math.min(...spans.map(({ low }) => low)), high: Math.max(...spans.map(({ high }) => high)) };
}
