import { allocate } from '$trade/number/allocation.ts';
import type { Decimal } from '$trade/number/decimal.ts';
import { round } from '$trade/number/rounding.ts';
import { sum, type Exact } from '$trade/number/exact.ts';
import { emptySums, type LotSums } from '$trade/lot/sums.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import { fineOf, type Piece } from '$trade/piece/piece.ts';
import { minorUnit } from '$trade/price/currency.ts';
import { valueOf } from '$trade/price/value.ts';
import type { Bodies } from '$trade/record/kind.ts';
import type { Entry } from '$storage/rows.ts';
import type { Shop } from './shop.svelte.ts';

/** Up to here every piece of a lot is read, so that the printed values of the rows add up to the printed total. */
const ALL_UP_TO = 200;

/**
 * One lot as a page shows it: its running sums, the names of its pieces in order, and the few pieces that are in sight.
 * However long the lot is, only a window of it is read; `revision` says when to draw again.
 */
export class OpenLot {
	id = $state.raw<string | null>(null);
	entry = $state.raw<Entry<'lot'> | null>(null);
	sums = $state.raw<LotSums>(emptySums());
	/** Pieces of the lot that could not be read. */
	damaged = $state.raw<readonly string[]>([]);
	keys = $state.raw<readonly string[]>([]);
	revision = $state(0);
	/** False until the first read has ended. */
	ready = $state(false);

	readonly #shop: Shop;
	#pieces = new Map<string, Entry<'piece'>>();
	#window = { from: 0, to: 40 };
	#reads = 0;
	/** The lot that the last read was asked for; `id` follows when it is there. */
	#wanted: string | null = null;

	constructor(shop: Shop) {
		this.#shop = shop;
	}

	get body(): Bodies['lot'] | null {
		return this.entry?.body ?? null;
	}

	/** Shows another lot, or none; the one shown stays until the other has been read. */
	async open(id: string | null): Promise<void> {
		this.#wanted = id;
		this.#reads += 1;
		const turn = this.#reads;
		const { book } = this.#shop;
		const [found, keys] = id === null ? [null, []] : await Promise.all([book.lot(id), book.lotKeys(id)]);
		const { from, to } = keys.length <= ALL_UP_TO ? { from: 0, to: keys.length } : this.#window;
		const pieces = await this.#load(keys.slice(from, to));
		// a later read has begun meanwhile: it will show what is newer
		if (turn !== this.#reads) return;
		this.id = id;
		this.entry = found?.lot ?? null;
		this.sums = found?.sums ?? emptySums();
		this.damaged = found?.damaged ?? [];
		this.keys = keys;
		this.#pieces = pieces;
		this.ready = true;
		this.revision += 1;
	}

	/** Reads the lot again as it stands. */
	read(): Promise<void> {
		return this.open(this.#wanted);
	}

	async #load(keys: readonly string[]): Promise<Map<string, Entry<'piece'>>> {
		const found = keys.length === 0 ? [] : await this.#shop.book.pieces(keys);
		return new Map(found.flatMap((each) => (each === null ? [] : [[each.subject, each] as const])));
	}

	/** The rows now in sight: reads those that are not here yet. */
	async look(from: number, to: number): Promise<void> {
		this.#window = { from, to };
		const missing = this.keys.slice(from, to).filter((key) => !this.#pieces.has(key));
		if (missing.length === 0) return;
		const more = await this.#load(missing);
		for (const [key, piece] of more) this.#pieces.set(key, piece);
		if (more.size > 0) this.revision += 1;
	}

	piece(index: number): Entry<'piece'> | null {
		const key = this.keys[index];
		return key === undefined ? null : (this.#pieces.get(key) ?? null);
	}

	/** Every piece, in order; null while the lot is too long to hold all of them. */
	all(): readonly Entry<'piece'>[] | null {
		if (this.keys.length > ALL_UP_TO) return null;
		return this.keys.flatMap((key) => this.#pieces.get(key) ?? []);
	}
}

/** The exact value of one piece at a sheet; null where the sheet prices none of its metals. */
export function pieceValue(piece: Piece, sheet: Bodies['prices']): Exact | null {
	const fine: Partial<Record<MetalId, Exact>> = {};
	for (const { metal, grams } of fineOf(piece)) fine[metal] = grams;
	const value = valueOf(fine, sheet);
	return Object.keys(value.byMetal).length === 0 ? null : value.total;
}

/** Values of pieces as printed, so that they add up to the printed value of the lot. */
export function printedPieces(entries: readonly Entry<'piece'>[], sheet: Bodies['prices']): ReadonlyMap<string, Decimal> {
	const priced = entries.flatMap(({ subject, body }) => {
		const value = body === null ? null : pieceValue(body.piece, sheet);
		return value === null ? [] : [{ subject, value }];
	});
	const parts = priced.map(({ value }) => value);
	const step = minorUnit(sheet.currency);
	const printed = allocate(parts, round(sum(parts), step, 'half-even'), step);
	return new Map(priced.map(({ subject }, index) => [subject, printed[index]!]));
}
