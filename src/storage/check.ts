import { ok, fail, type Result } from '$trade/number/result.ts';
import { canonicalJson, type Json } from '$trade/record/json.ts';
import { chainBreaks, type ChainBreak } from '$trade/record/chain.ts';
import { readPurchaseNumber } from '$trade/record/kinds/purchase.ts';
import { readRecord, type StoredRecord } from '$trade/record/record.ts';
import { whatIsWrong } from './backup.ts';
import { stopIfCancelled, type Running } from './backup-format.ts';
import { decodeSums, encodeSums } from '$trade/lot/sums-stored.ts';
import { sumsFromScratch } from './lot-sums.ts';
import type { Session } from './open.ts';
import { isWhole } from './photos.ts';
import { problemOf, type StorageProblem } from './problem.ts';
import { entryOf, rowOf } from './rows.ts';
import type { CurrentRow, SumsRow } from './schema.ts';
import { lotOf, SETTINGS, weighedFrom } from './sums-after.ts';
import { emptySums } from '$trade/lot/sums.ts';

/** What a check of the whole book found. Each names the record or the thing. */
export type Finding =
	/** The record is not what was written: its own hash says so, or its shape. */
	| { readonly kind: 'check-record-changed'; readonly record: string; readonly subject: string; readonly why: string }
	| { readonly kind: 'check-record-missing'; readonly device: string; readonly after: string | null }
	| { readonly kind: 'check-record-before-missing'; readonly device: string; readonly record: string }
	| { readonly kind: 'check-copied-device'; readonly device: string; readonly record: string; readonly other: string }
	/** What stands now is not what the records say; `rebuild` puts it right. */
	| { readonly kind: 'check-current-differs'; readonly subject: string }
	| { readonly kind: 'check-sums-differ'; readonly lot: string }
	| { readonly kind: 'check-photo-missing'; readonly photo: string; readonly subject: string }
	| { readonly kind: 'check-photo-damaged'; readonly photo: string }
	| { readonly kind: 'check-number-twice'; readonly number: string }
	| { readonly kind: 'check-number-missing'; readonly letter: string; readonly count: number };

const AT_ONCE = 500;

/** Goes through every record, chain, number, photo and sum. Reads only. */
export async function checkBook(session: Session, { onProgress, signal }: Running = {}): Promise<readonly Finding[]> {
	const findings: Finding[] = [];
	const ids = await session.use((db) => db.records.toCollection().primaryKeys());
	const whole: StoredRecord[] = [];
	const shaped: StoredRecord[] = [];
	const claimed = new Set<string>();
	for (let from = 0; from < ids.length; from += AT_ONCE) {
		stopIfCancelled(signal);
		const rows = await session.use((db) => db.records.bulkGet(ids.slice(from, from + AT_ONCE)));
		for (const [index, row] of rows.entries()) {
			const why = await whatIsWrong(row);
			if (readRecord(row).ok) shaped.push(row!);
			if (why === null) whole.push(row!);
			else {
				findings.push({ kind: 'check-record-changed', record: ids[from + index]!, subject: textOf(row?.subject), why });
				claimed.add(textOf(row?.hash));
			}
		}
		onProgress?.({ step: 'reading', done: Math.min(from + AT_ONCE, ids.length), total: ids.length });
	}
	// a changed record is named above; the one after it still points to the hash that it carries
	findings.push(...chainBreaks(whole, (hash) => claimed.has(hash)).map(chainFinding));
	const book = await session.use((db) => db.book.get('book'));
	if (book !== undefined && book.head !== null && !claimed.has(book.head) && !whole.some(({ hash }) => hash === book.head)) {
		findings.push({ kind: 'check-record-missing', device: book.device, after: lastOf(whole, book.device) });
	}
	findings.push(...numberFindings(whole), ...(await standingFindings(session, shaped)), ...(await photoFindings(session, signal)));
	return findings;
}

const textOf = (found: unknown) => (typeof found === 'string' ? found : '');

function chainFinding(broken: ChainBreak): Finding {
	const { device, record } = broken;
	if (broken.kind === 'chain-gap') return { kind: 'check-record-before-missing', device, record };
	return { kind: 'check-copied-device', device, record, other: broken.other };
}

function lastOf(records: readonly StoredRecord[], device: string): string | null {
	const own = records.filter((record) => record.device === device);
	const followed = new Set(own.map(({ previous }) => previous));
	return own.find(({ hash }) => !followed.has(hash))?.id ?? null;
}

/** Each purchase number once, and none left out between the first and the last of a letter. */
function numberFindings(records: readonly StoredRecord[]): Finding[] {
	const subjects = new Map<string, Set<string>>();
	const counts = new Map<string, Set<number>>();
	for (const { kind, subject, body } of records) {
		const number = kind === 'purchase' ? String((body as { readonly number?: Json } | null)?.number ?? '') : '';
		const read = readPurchaseNumber(number);
		if (read === null) continue;
		subjects.set(number, (subjects.get(number) ?? new Set()).add(subject));
		counts.set(read.letter, (counts.get(read.letter) ?? new Set()).add(read.count));
	}
	const findings: Finding[] = [];
	for (const [number, own] of subjects) if (own.size > 1) findings.push({ kind: 'check-number-twice', number });
	for (const [letter, own] of counts) {
		const last = [...own].reduce((a, b) => Math.max(a, b), 0);
		for (let count = 1; count <= last && findings.length < 1_000; count += 1) {
			if (!own.has(count)) findings.push({ kind: 'check-number-missing', letter, count });
		}
	}
	return findings;
}

/** Everything that stands now, made again from the records; also from a changed one, which is named and not passed over. */
export function standingFrom(records: readonly StoredRecord[]): { readonly current: CurrentRow[]; readonly sums: SumsRow[] } {
	const bySubject = new Map<string, StoredRecord[]>();
	for (const record of records) {
		const known = bySubject.get(record.subject);
		if (known === undefined) bySubject.set(record.subject, [record]);
		else known.push(record);
	}
	const current = [...bySubject.values()].map(rowOf);
	const weighed = weighedFrom(
		current,
		current.find(({ subject }) => subject === SETTINGS)
	);
	const lots = new Map<string, CurrentRow[]>();
	for (const row of current) {
		const lot = lotOf(row);
		if (lot === null) continue;
		const known = lots.get(lot);
		if (known === undefined) lots.set(lot, [row]);
		else known.push(row);
	}
	return { current, sums: [...lots].map(([lot, rows]) => sumsFromScratch(lot, rows, weighed)) };
}

async function standingFindings(session: Session, records: readonly StoredRecord[]): Promise<Finding[]> {
	const made = standingFrom(records);
	const [current, sums] = await session.use(async (db) => [await db.current.toArray(), await db.sums.toArray()] as const);
	const findings: Finding[] = [];
	const compare = <T>(should: ReadonlyMap<string, T>, is: ReadonlyMap<string, T>, text: (row: T | undefined) => string, found: (key: string) => Finding) => {
		for (const key of new Set([...should.keys(), ...is.keys()])) {
			if (text(should.get(key)) !== text(is.get(key))) findings.push(found(key));
		}
	};
	const bySubject = (rows: readonly CurrentRow[]) => new Map(rows.map((row) => [row.subject, row]));
	const byLot = (rows: readonly SumsRow[]) => new Map(rows.map((row) => [row.lot, row]));
	compare(bySubject(made.current), bySubject(current), rowText, (subject) => ({ kind: 'check-current-differs', subject }));
	compare(byLot(made.sums), byLot(sums), sumsText, (lot) => ({ kind: 'check-sums-differ', lot }));
	return findings;
}

function rowText(row: CurrentRow | undefined): string {
	try {
		return row === undefined ? '' : canonicalJson(row as unknown as Json);
	} catch {
		return 'unreadable';
	}
}

/** Sums as one text; a lot without pieces is the same as no sums. Scales that once were in it do not count. */
function sumsText(row: SumsRow | undefined): string {
	const sums = row === undefined ? emptySums() : decodeSums(row.sums);
	if (sums === null) return 'unreadable';
	return canonicalJson([encodeSums(sums) as Json, [...(row?.damaged ?? [])]]);
}

async function photoFindings(session: Session, signal: AbortSignal | undefined): Promise<Finding[]> {
	const findings: Finding[] = [];
	const ids = await session.use((db) => db.photos.toCollection().primaryKeys());
	for (const id of ids) {
		stopIfCancelled(signal);
		const photo = await session.use((db) => db.photos.get(id));
		if (photo !== undefined && !(await isWhole(photo))) findings.push({ kind: 'check-photo-damaged', photo: id });
	}
	const there = new Set(ids);
	await session.use((db) =>
		db.current.each((row) => {
			const entry = entryOf('piece', row);
			if (entry === null || entry.damage !== null) return;
			for (const photo of entry.body.piece.photos) {
				if (!there.has(photo)) findings.push({ kind: 'check-photo-missing', photo, subject: entry.subject });
			}
		})
	);
	return findings;
}

/** Makes what stands now again from the records, in one transaction. Records are not touched. */
export async function rebuild(session: Session): Promise<Result<null, StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	try {
		await session.alone(() =>
			session.use((db) =>
				db.transaction('rw', db.records, db.current, db.sums, db.book, async () => {
					const { current, sums } = standingFrom((await db.records.toArray()).filter((row) => readRecord(row).ok));
					await db.current.clear();
					await db.sums.clear();
					await db.current.bulkPut(current);
					await db.sums.bulkPut(sums);
					const book = (await db.book.get('book'))!;
					await db.book.put({ ...book, revision: book.revision + 1 });
				})
			)
		);
		session.watchers.tell({ kinds: ['lot', 'piece'], lots: [] });
		return ok(null);
	} catch (thrown) {
		return fail(problemOf(thrown));
	}
}
