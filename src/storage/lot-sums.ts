import { decodeSums, encodeSums } from '$trade/lot/sums-stored.ts';
import { addPieces, emptySums, removePiece, type Spreads } from '$trade/lot/sums.ts';
import type { Scale } from '$trade/mass/scale.ts';
import type { PieceBody } from '$trade/record/kinds/piece.ts';
import { entryOf, type Entry } from './rows.ts';
import type { CurrentRow, SumsRow } from './schema.ts';

/** What the sums of a lot need to know besides its pieces. */
export type Weighed = { readonly scaleOf: (id: string) => Scale | undefined; readonly spreads: Spreads };

/** The scale of a weighing, if the book has it. */
function added(entry: { subject: string; body: PieceBody }, { scaleOf }: Weighed) {
	const { piece } = entry.body;
	const { scale } = piece.weighing;
	return { piece, key: entry.subject, scale: scale === null ? undefined : scaleOf(scale) };
}

/** The sums of a lot from nothing. Pieces that cannot be read are named and left out. */
export function sumsFromScratch(lot: string, rows: Iterable<CurrentRow>, weighed: Weighed): SumsRow {
	return sumsWith({ lot, sums: encodeSums(emptySums()), scales: [], damaged: [] }, [], [...rows], weighed)!;
}

/** The sums after some rows have gone and others have come; null when they can only be made from scratch. */
export function sumsWith(row: SumsRow, gone: readonly CurrentRow[], come: readonly CurrentRow[], weighed: Weighed): SumsRow | null {
	let sums = decodeSums(row.sums);
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
		sums: encodeSums(addPieces(sums, entries, weighed.spreads)),
		scales: [...scales].sort(),
		damaged: [...damaged].sort()
	};
}
