import { allocate } from '$trade/number/allocation.ts';
import { decimal, type Decimal } from '$trade/number/decimal.ts';
import { compareExact, EXACT_ZERO, sum, type Exact } from '$trade/number/exact.ts';
import { round } from '$trade/number/rounding.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import { fineOf, type Piece } from '$trade/piece/piece.ts';
import type { PurchaseBody } from '$trade/record/kinds/purchase.ts';
import type { Book } from '$storage/book.ts';
import type { Entry } from '$storage/rows.ts';
import { printedPieces } from './open-lot.svelte.ts';

/** Fine mass is printed to this many grams. */
const FINE_STEP = decimal('0.01');

/** A purchase with its lot and the pieces that were paid for. */
export type Bought = {
	readonly entry: Entry<'purchase'>;
	readonly lot: Entry<'lot'> | null;
	readonly pieces: readonly Entry<'piece'>[];
};

export async function readBought(book: Book, id: string): Promise<Bought | null> {
	const entry = await book.get('purchase', id);
	if (entry === null) return null;
	if (entry.body === null) return { entry, lot: null, pieces: [] };
	const [lot, keys] = await Promise.all([book.get('lot', entry.body.lot), book.lotKeys(entry.body.lot)]);
	const pieces = await book.pieces(keys);
	return { entry, lot, pieces: pieces.filter((each) => each !== null) };
}

/** The number of a purchase that was taken back; null if there never was such a purchase, or it stands. */
export async function takenBackNumber(book: Book, id: string): Promise<string | null> {
	const records = await book.history(id);
	if (records[records.length - 1]?.body !== null) return null;
	const numbers = records.flatMap(({ kind, body }) => {
		const number = kind === 'purchase' ? (body as { readonly number?: unknown } | null)?.number : null;
		return typeof number === 'string' ? [number] : [];
	});
	return numbers[0] ?? null;
}

/** One row of a purchase as it is printed. */
export type BoughtRow = {
	readonly subject: string;
	/** Null: the piece cannot be read. */
	readonly piece: Piece | null;
	/** Null: none of its metals had a price. */
	readonly value: Decimal | null;
	readonly fine: readonly { readonly metal: MetalId; readonly grams: Decimal }[];
};

export type BoughtTable = {
	readonly rows: readonly BoughtRow[];
	/** The printed fine mass of each metal: the sum of its column. */
	readonly fine: readonly { readonly metal: MetalId; readonly grams: Decimal }[];
	/** The pieces are not those that were paid for: one was changed, added or lost since. */
	readonly changed: boolean;
};

/** The rows of a purchase at the prices it was bought at; values add up to the printed value, fine masses to the printed fine mass. */
export function boughtTable(body: PurchaseBody, pieces: readonly Entry<'piece'>[]): BoughtTable {
	const values = printedPieces(pieces, body.prices);
	const parts = new Map<MetalId, { readonly subject: string; readonly grams: Exact }[]>();
	for (const { subject, body: held } of pieces) {
		for (const { metal, grams } of held === null ? [] : fineOf(held.piece)) {
			const known = parts.get(metal);
			if (known === undefined) parts.set(metal, [{ subject, grams }]);
			else known.push({ subject, grams });
		}
	}
	const printed = new Map<string, { metal: MetalId; grams: Decimal }[]>();
	const totals: { metal: MetalId; grams: Decimal }[] = [];
	let changed = pieces.length !== body.entries;
	for (const [metal, column] of parts) {
		const exact = sum(column.map(({ grams }) => grams));
		if (compareExact(exact, body.totals.fine[metal] ?? EXACT_ZERO) !== 0) changed = true;
		const total = round(exact, FINE_STEP, 'half-even');
		totals.push({ metal, grams: total });
		const own = allocate(column.map(({ grams }) => grams), total, FINE_STEP);
		for (const [index, { subject }] of column.entries()) {
			printed.set(subject, [...(printed.get(subject) ?? []), { metal, grams: own[index]! }]);
		}
	}
	const rows = pieces.map(({ subject, body: held }) => ({
		subject,
		piece: held?.piece ?? null,
		value: values.get(subject) ?? null,
		fine: printed.get(subject) ?? []
	}));
	return { rows, fine: totals, changed };
}
