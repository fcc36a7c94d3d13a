import { emptySums, type LotSums } from '$trade/lot/sums.ts';
import type { Bodies, RecordKind } from '$trade/record/kind.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { byTime } from '$trade/record/union.ts';
import { decodeSums } from '$trade/lot/sums-stored.ts';
import { sumsFromScratch } from './lot-sums.ts';
import type { Session } from './open.ts';
import { entryOf, pieceShelf, type Entry } from './rows.ts';
import type { BookDatabase, CurrentRow } from './schema.ts';
import { pieceRows, SETTINGS, weighedBy } from './sums-after.ts';

/** Reads for pages. Each reads what is shown and no more; a row that cannot be read comes with its damage, and is announced. */

export type LotFound = { readonly lot: Entry<'lot'>; readonly sums: LotSums; readonly damaged: readonly string[] };

/** Where a page of purchases ended. */
export type PageEnd = { readonly boughtAt: number; readonly subject: string };

function shelf(db: BookDatabase, name: string) {
	return db.current.where('[shelf+order+subject]').between([name], [name, []]);
}

function entries<K extends RecordKind>(session: Session, kind: K, rows: readonly (CurrentRow | undefined)[]): (Entry<K> | null)[] {
	return rows.map((row) => {
		const entry = entryOf(kind, row);
		if (entry !== null && entry.damage !== null) {
			session.watchers.announce({ kind: 'damaged', subject: entry.subject, reason: entry.damage.kind });
		}
		return entry;
	});
}

const present = <T>(found: readonly (T | null)[]): T[] => found.filter((each) => each !== null);

export async function get<K extends RecordKind>(session: Session, kind: K, subject: string): Promise<Entry<K> | null> {
	return entries(session, kind, [await session.use((db) => db.current.get(subject))])[0]!;
}

/** The record that a subject's next change must name, deleted or not; null if there never was one. */
export async function standing(session: Session, subject: string): Promise<string | null> {
	return (await session.use((db) => db.current.get(subject)))?.record ?? null;
}

export async function latestSheet(session: Session): Promise<Entry<'prices'> | null> {
	const row = await session.use((db) => shelf(db, 'prices').last());
	return entries(session, 'prices', [row])[0]!;
}

/** Price sheets, newest first. */
export async function sheets(session: Session, limit: number): Promise<Entry<'prices'>[]> {
	const rows = await session.use((db) => shelf(db, 'prices').reverse().limit(limit).toArray());
	return present(entries(session, 'prices', rows));
}

export function settings(session: Session): Promise<Entry<'settings'> | null> {
	return get(session, 'settings', SETTINGS);
}

export async function scales(session: Session): Promise<Entry<'scale'>[]> {
	return present(entries(session, 'scale', await session.use((db) => shelf(db, 'scales').toArray())));
}

export async function testers(session: Session): Promise<Entry<'tester'>[]> {
	return present(entries(session, 'tester', await session.use((db) => shelf(db, 'testers').toArray())));
}

export async function lotsIn(session: Session, state: Bodies['lot']['state']): Promise<Entry<'lot'>[]> {
	return present(entries(session, 'lot', await session.use((db) => shelf(db, `lots:${state}`).toArray())));
}

/** One lot with its sums; the pieces themselves are not read. */
export async function lot(session: Session, subject: string): Promise<LotFound | null> {
	const found = await get(session, 'lot', subject);
	return found === null ? null : (await withSums(session, [found]))[0]!;
}

/** Lots of a state with their sums: what Stock shows of the bought ones. */
export async function lotsWithSums(session: Session, state: Bodies['lot']['state']): Promise<LotFound[]> {
	return withSums(session, await lotsIn(session, state));
}

async function withSums(session: Session, lots: readonly Entry<'lot'>[]): Promise<LotFound[]> {
	const rows = await session.use((db) => db.sums.bulkGet(lots.map(({ subject }) => subject)));
	const found: LotFound[] = [];
	for (const [index, each] of lots.entries()) {
		const row = rows[index];
		const sums = row === undefined ? emptySums() : decodeSums(row.sums);
		if (sums !== null) {
			found.push({ lot: each, sums, damaged: row?.damaged ?? [] });
			continue;
		}
		// sums that cannot be read are added up again for the page; check.ts writes them anew
		session.watchers.announce({ kind: 'damaged', subject: each.subject, reason: 'sums' });
		const again = sumsFromScratch(
			each.subject,
			await session.use((db) => pieceRows(db, each.subject)),
			await weighedBy(session, new Map())
		);
		found.push({ lot: each, sums: decodeSums(again.sums)!, damaged: again.damaged });
	}
	return found;
}

/** The pieces of a lot in their order, by name only: a list of ten thousand stays light. */
export function lotKeys(session: Session, subject: string): Promise<string[]> {
	return session.use((db) => shelf(db, pieceShelf(subject)).primaryKeys());
}

/** The order number of the last piece of a lot; 0 for an empty lot. */
export async function lastOrder(session: Session, subject: string): Promise<number> {
	return (await session.use((db) => shelf(db, pieceShelf(subject)).last()))?.order ?? 0;
}

/** The pieces of some keys, in the order asked; null where one has gone in the meantime. */
export async function pieces(session: Session, keys: readonly string[]): Promise<(Entry<'piece'> | null)[]> {
	return entries(session, 'piece', await session.use((db) => db.current.bulkGet(keys as string[])));
}

/** Purchases, newest first; `before`: the last one of the page before. */
export async function purchases(session: Session, limit: number, before: PageEnd | null = null): Promise<Entry<'purchase'>[]> {
	const end = before === null ? ['purchases', []] : ['purchases', before.boughtAt, before.subject];
	const rows = await session.use((db) =>
		db.current.where('[shelf+order+subject]').between(['purchases'], end, true, false).reverse().limit(limit).toArray()
	);
	return present(entries(session, 'purchase', rows));
}

/** Every record of a subject, oldest first: how it came to be what it is. */
export async function history(session: Session, subject: string): Promise<StoredRecord[]> {
	return (await session.use((db) => db.records.where('subject').equals(subject).toArray())).sort(byTime);
}

/** A subject on which two devices disagree: the later record counts until a person has looked. */
export type Conflict = { readonly subject: string; readonly kind: string; readonly winner: string; readonly standing: readonly StoredRecord[] };

export async function conflicts(session: Session): Promise<Conflict[]> {
	return session.use(async (db) => {
		const rows = await db.current.where('conflict').equals(1).toArray();
		const records = await db.records.bulkGet(rows.flatMap(({ heads }) => heads.map(({ id }) => id)));
		const byId = new Map(present(records.map((each) => each ?? null)).map((each) => [each.id, each]));
		return rows.map(({ subject, kind, record, heads }) => ({
			subject,
			kind,
			winner: record,
			standing: present(heads.map(({ id }) => byId.get(id) ?? null))
		}));
	});
}

export type Counts = {
	readonly records: number;
	/** Purchases that are in no backup: if this phone is lost, so are they. */
	readonly purchasesOnlyHere: number;
	readonly conflicts: number;
	readonly photos: number;
	/** Lines of a restored backup that could not be read; kept for the next backup. */
	readonly damaged: number;
	readonly lastBackup: number | null;
	/** The letter of this device's purchase numbers. */
	readonly letter: string;
};

export async function counts(session: Session): Promise<Counts> {
	return session.use(async (db) => {
		const book = await db.book.get('book');
		return {
			records: book?.records ?? 0,
			purchasesOnlyHere: await db.onlyHere.count(),
			conflicts: await db.current.where('conflict').equals(1).count(),
			photos: await db.photos.count(),
			damaged: await db.damaged.count(),
			lastBackup: book?.lastBackup ?? null,
			letter: book?.letter ?? 'A'
		};
	});
}
