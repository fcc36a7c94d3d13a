import { decimal } from '$trade/number/decimal.ts';
import type { Fineness } from '$trade/metal/fineness.ts';
import { fromKarat, perMilleNumber } from '$trade/metal/fineness.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import type { Format } from '../format.ts';

/** The karats that acids are sold for and pieces are made to. */
export const KARATS = [8, 9, 10, 12, 14, 18, 20, 22, 24] as const;

const karats: readonly { readonly karat: number; readonly fineness: Fineness }[] = KARATS.map((karat) => ({
	karat,
	fineness: fromKarat(decimal(String(karat)))
}));

/** "14 kt" where gold is within 3 ‰ of a karat, "560 ‰" otherwise. */
export function karatWords(perMille: number, metal: MetalId, format: Format): string {
	const near = metal === 'Au' ? karats.find(({ fineness }) => Math.abs(perMilleNumber(fineness) - perMille) <= 3) : undefined;
	return near === undefined ? `${format.estimate(perMille, 3)}\u00a0‰` : format.karats(near.fineness);
}

/** What acids and standards can be chosen, as a value for a list and its words. */
export function standardsOf(metal: MetalId, format: Format): { readonly value: string; readonly label: string; readonly fineness: Fineness }[] {
	if (metal === 'Au') {
		return karats.map(({ karat, fineness }) => ({ value: `${karat}k`, label: `${format.karats(fineness)} · ${format.fineness(fineness)}`, fineness }));
	}
	const figures = metal === 'Ag' ? ['500', '800', '835', '900', '925', '950', '999'] : ['500', '850', '900', '950', '999'];
	return figures.map((value) => {
		const fineness = { perMille: { n: BigInt(value), d: 1n } };
		return { value, label: format.fineness(fineness), fineness };
	});
}
