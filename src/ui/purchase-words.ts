import { compareExact, type Exact } from '$trade/number/exact.ts';
import { metals, type MetalId } from '$trade/metal/metals.ts';
import type { Format } from './format.ts';
import { many } from './running-words.ts';

type Fine = Partial<Readonly<Record<MetalId, Exact>>>;

/** The fine metals of a purchase, the largest first; precious ones only, where there are any. */
export function purchaseFine(fine: Fine, format: Format, places = 2): string {
	return fineParts(fine)
		.map(([metal, grams]) => format.fine(metal, grams, places))
		.join(' · ');
}

function fineParts(fine: Fine): readonly [MetalId, Exact][] {
	const all = (Object.entries(fine) as [MetalId, Exact][]).sort(([, a], [, b]) => compareExact(b, a));
	const precious = all.filter(([metal]) => metals[metal].precious);
	return precious.length > 0 ? precious : all;
}

/** "4 entries, 15 pieces". */
export function pieceCounts({ entries, pieces }: { readonly entries: number; readonly pieces: number }, format: Format): string {
	return `${many(entries, 'entry', 'entries', format)}, ${many(pieces, 'piece', 'pieces', format)}`;
}
