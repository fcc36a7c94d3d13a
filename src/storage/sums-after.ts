import type { Scale } from '$trade/mass/scale.ts';
import { canonicalJson } from '$trade/record/json.ts';
import type { Session } from './open.ts';
import { encodeSums } from '$trade/lot/sums-stored.ts';
import { sumsFromScratch, sumsWith, type Weighed } from './lot-sums.ts';
import { emptySums, type Spreads } from '$trade/lot/sums.ts';
import { entryOf, pieceShelf } from './rows.ts';
import type { BookDatabase, CurrentRow, SumsRow } from './schema.ts';

/** The lot that a row's piece is in; null for anything else. */
export function lotOf(row: CurrentRow | undefined): string | null {
	return row?.kind === 'piece' && row.shelf !== undefined ? row.shelf.slice(pieceShelf('').length) : null;
}

/** The pieces of a lot in their order. */
export function pieceRows(db: BookDatabase, lot: string): PromiseLike<CurrentRow[]> {
	const shelf = pieceShelf(lot);
	return db.current.where('[shelf+order+subject]').between([shelf], [shelf, []]).toArray();
}

/**
 * The sums of every lot that an act touches. Pieces that come and go are added and taken off; a lot is added up from
 * scratch when a scale or a spread that is in its sums changed, or when `scratch` says so (after a merge).
 */
export async function sumsAfter(
	session: Session,
	before: readonly (CurrentRow | undefined)[],
	after: readonly CurrentRow[],
	scratch = false
): Promise<{ readonly sums: SumsRow[]; readonly lots: string[] }> {
	const gone = new Map<string, CurrentRow[]>();
	const come = new Map<string, CurrentRow[]>();
	const put = (into: Map<string, CurrentRow[]>, row: CurrentRow | undefined) => {
		const lot = lotOf(row);
		if (lot === null || row === undefined) return;
		const known = into.get(lot);
		if (known === undefined) into.set(lot, [row]);
		else known.push(row);
	};
	for (const row of before) put(gone, row);
	for (const row of after) put(come, row);
	const again = await lotsToAddUp(session, before, after);
	const lots = [...new Set([...gone.keys(), ...come.keys(), ...again])];
	if (lots.length === 0) return { sums: [], lots: [] };
	const changed = new Map(after.map((row) => [row.subject, row]));
	const weighed = await weighedBy(session, changed);
	const known = await session.use((db) => db.sums.bulkGet(lots));
	const sums: SumsRow[] = [];
	for (const [index, lot] of lots.entries()) {
		const running =
			scratch || again.has(lot)
				? null
				: sumsWith(
						known[index] ?? { lot, sums: encodeSums(emptySums()), scales: [], damaged: [] },
						gone.get(lot) ?? [],
						come.get(lot) ?? [],
						weighed
					);
		if (running !== null) {
			sums.push(running);
			continue;
		}
		const rows = (await session.use((db) => pieceRows(db, lot))).filter(({ subject }) => !changed.has(subject));
		sums.push(sumsFromScratch(lot, [...rows, ...(come.get(lot) ?? [])], weighed));
	}
	return { sums, lots };
}

const bodyText = (row: CurrentRow | undefined) => (row === undefined ? '' : canonicalJson(row.body));

/** Lots whose sums hold the error of a scale that changed now, or all of them when the spreads of the classes changed. */
async function lotsToAddUp(
	session: Session,
	before: readonly (CurrentRow | undefined)[],
	after: readonly CurrentRow[]
): Promise<ReadonlySet<string>> {
	const scales: string[] = [];
	for (const [index, row] of after.entries()) {
		if (row.kind === 'settings' && row.subject === SETTINGS && spreadsText(row) !== spreadsText(before[index])) {
			return new Set(await session.use((db) => db.sums.toCollection().primaryKeys()));
		}
		if (row.kind === 'scale' && bodyText(row) !== bodyText(before[index])) scales.push(row.subject);
	}
	if (scales.length === 0) return new Set();
	return new Set(await session.use((db) => db.sums.where('scales').anyOf(scales).primaryKeys()));
}

/** The one subject of kind 'settings'. */
export const SETTINGS = 'settings';

function spreadsOf(row: CurrentRow | undefined): Spreads {
	const entry = entryOf('settings', row);
	return entry === null || entry.damage !== null ? {} : entry.body.spreads;
}

const spreadsText = (row: CurrentRow | undefined) => canonicalJson(spreadsOf(row) as Parameters<typeof canonicalJson>[0]);

/** The scales and spreads of the book as they are after the rows that are about to be written. */
export async function weighedBy(session: Session, changed: ReadonlyMap<string, CurrentRow>): Promise<Weighed> {
	const [rows, settings] = await session.use(
		async (db) =>
			[
				await db.current.where('[shelf+order+subject]').between(['scales'], ['scales', []]).toArray(),
				await db.current.get(SETTINGS)
			] as const
	);
	return weighedFrom([...rows.filter(({ subject }) => !changed.has(subject)), ...changed.values()], changed.get(SETTINGS) ?? settings);
}

export function weighedFrom(rows: Iterable<CurrentRow>, settings: CurrentRow | undefined): Weighed {
	const scales = new Map<string, Scale>();
	for (const row of rows) {
		const entry = entryOf('scale', row);
		if (entry !== null && entry.damage === null) scales.set(entry.subject, entry.body);
	}
	return { scaleOf: (id) => scales.get(id), spreads: spreadsOf(settings) };
}
