import { plus } from '../number/exact.ts';
import type { MetalId } from '../metal/metals.ts';
import { emptySums, type ClassSums, type FineSums, type LotSums } from './sums.ts';

/**
 * Several lots as one, such as the whole stock.
 * formula: every sum + the other lots' same sum; errors shared by lots (a scale, a class) add up with their sign.
 * rounding: none.
 * source: JCGM 100:2008 (GUM) 5.2 for shared errors; common practice, no source, for the sums.
 */
export function joinSums(lots: Iterable<LotSums>): LotSums {
	let all = emptySums();
	for (const lot of lots) {
		all = {
			entries: all.entries + lot.entries,
			pieces: all.pieces + lot.pieces,
			gross: all.gross.plus(lot.gross),
			net: all.net.plus(lot.net),
			fine: joinFine(all.fine, lot.fine),
			byClass: joinBy(all.byClass, lot.byClass, joinClass),
			shared: joinBy(all.shared, lot.shared, (a, b) => joinBy(a as Record<string, bigint>, b as Record<string, bigint>, addWhole)),
			expected: joinBy(all.expected as Record<string, bigint>, lot.expected as Record<string, bigint>, addWhole),
			own: joinBy(all.own, lot.own, addWhole)
		};
	}
	return all;
}

const addWhole = (a: bigint, b: bigint): bigint => a + b;

function joinBy<T>(a: Readonly<Record<string, T>>, b: Readonly<Record<string, T>>, join: (a: T, b: T) => T): Record<string, T> {
	const all = { ...a };
	for (const [key, value] of Object.entries(b)) {
		const known = all[key];
		all[key] = known === undefined ? value : join(known, value);
	}
	return all;
}

function joinFine(a: FineSums, b: FineSums): FineSums {
	return joinBy(a as Record<MetalId, NonNullable<FineSums[MetalId]>>, b as Record<MetalId, NonNullable<FineSums[MetalId]>>, plus);
}

function joinClass(a: ClassSums, b: ClassSums): ClassSums {
	return {
		...a,
		entries: a.entries + b.entries,
		pieces: a.pieces + b.pieces,
		net: a.net.plus(b.net),
		fine: joinFine(a.fine, b.fine)
	};
}
