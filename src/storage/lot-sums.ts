import { addPieces, emptySums, removePiece, type LotSums, type Spreads } from '$trade/lot/sums.ts';
import type { Scale } from '$trade/mass/scale.ts';
import { assert, decimal } from '$trade/number/decimal.ts';
import { exactFromText, exactToText, type Exact } from '$trade/number/exact.ts';
import type { PieceBody } from '$trade/record/kinds/piece.ts';
import { entryOf, type Entry } from './rows.ts';
import type { CurrentRow, SumsRow } from './schema.ts';

/** What the sums of a lot need to know besides its pieces. */
export type Weighed = { readonly scaleOf: (id: string) => Scale | undefined; readonly spreads: Spreads };

/** The sums as plain values, which a database can hold. BigInt it can hold too. */
export function storeSums(sums: LotSums): unknown {
	return {
		...sums,
		gross: sums.gross.toFixed(),
		net: sums.net.toFixed(),
		fine: storeFine(sums.fine),
		byClass: mapValues(sums.byClass, (each) => ({ ...each, net: each.net.toFixed(), fine: storeFine(each.fine) }))
	};
}

type Stored = Omit<LotSums, 'gross' | 'net' | 'fine' | 'byClass'> & {
	gross: string;
	net: string;
	fine: Record<string, string>;
	byClass: Record<string, Omit<LotSums['byClass'][string], 'net' | 'fine'> & { net: string; fine: Record<string, string> }>;
};

/** The sums of a row; null if it cannot be read: then they are made again from the pieces. */
export function loadSums(stored: unknown): LotSums | null {
	try {
		const found = stored as Stored;
		return {
			...found,
			// sums that an older release wrote hold no findings
			expected: found.expected ?? {},
			gross: decimal(found.gross),
			net: decimal(found.net),
			fine: loadFine(found.fine),
			byClass: mapValues(found.byClass, (each) => ({ ...each, net: decimal(each.net), fine: loadFine(each.fine) }))
		};
	} catch {
		return null;
	}
}

const storeFine = (fine: LotSums['fine']) => mapValues(fine as Record<string, Exact>, exactToText);

function loadFine(fine: Record<string, string>): LotSums['fine'] {
	return mapValues(fine, (text) => {
		const value = exactFromText(text);
		assert(value !== null, 'sums that cannot be read');
		return value;
	});
}

function mapValues<A, B>(from: Readonly<Record<string, A>>, make: (value: A) => B): Record<string, B> {
	return Object.fromEntries(Object.entries(from).map(([key, value]) => [key, make(value)]));
}

/** The scale of a weighing, if the book has it. */
function added(entry: { subject: string; body: PieceBody }, { scaleOf }: Weighed) {
	const { piece } = entry.body;
	const { scale } = piece.weighing;
	return { piece, key: entry.subject, scale: scale === null ? undefined : scaleOf(scale) };
}

/** The sums of a lot from nothing. Pieces that cannot be read are named and left out. */
export function sumsFromScratch(lot: string, rows: Iterable<CurrentRow>, weighed: Weighed): SumsRow {
	return sumsWith({ lot, sums: storeSums(emptySums()), scales: [], damaged: [] }, [], [...rows], weighed)!;
}

/** The sums after some rows have gone and others have come; null when they can only be made from scratch. */
export function sumsWith(row: SumsRow, gone: readonly CurrentRow[], come: readonly CurrentRow[], weighed: Weighed): SumsRow | null {
	let sums = loadSums(row.sums);
	if (sums === null) return null;
	const scales = new Set(row.scales);
	const damaged = new Set(row.damaged);
	for (const each of gone) {
		const entry = entryOf('piece', each);
		if (entry === null) continue;
		if (entry.damage !== null) {
			// damaged after it was added: what to take off is not known any more
			if (!damaged.delete(entry.subject)) return null;
			continue;
		}
		const { piece, key, scale } = added(entry, weighed);
		sums = removePiece(sums, piece, key, scale, weighed.spreads);
	}
	const entries: ReturnType<typeof added>[] = [];
	for (const each of come) {
		const entry: Entry<'piece'> | null = entryOf('piece', each);
		if (entry === null) continue;
		if (entry.damage !== null) {
			damaged.add(entry.subject);
			continue;
		}
		const { weighing } = entry.body.piece;
		if (weighing.scale !== null) scales.add(weighing.scale);
		entries.push(added(entry, weighed));
	}
	return {
		lot: row.lot,
		sums: storeSums(addPieces(sums, entries, weighed.spreads)),
		scales: [...scales].sort(),
		damaged: [...damaged].sort()
	};
}
