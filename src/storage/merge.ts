import { fail, type Result } from '$trade/number/result.ts';
import { freeLetter, readPurchaseNumber } from '$trade/record/kinds/purchase.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { unionOf } from '$trade/record/union.ts';
import { write, type Prepared } from './append.ts';
import { newId } from './ids.ts';
import type { Session } from './open.ts';
import { StorageFailure, type StorageProblem } from './problem.ts';
import { rowOf } from './rows.ts';
import type { BookRow, CurrentRow, DamagedRow } from './schema.ts';
import { sumsAfter } from './sums-after.ts';

/** What a merge would bring, worked out without writing anything. */
export type MergePlan = {
	readonly fresh: readonly StoredRecord[];
	readonly known: number;
	readonly rows: readonly CurrentRow[];
	readonly before: readonly (CurrentRow | undefined)[];
	/** Subjects on which the two books would newly disagree. */
	readonly conflicts: readonly string[];
};

/** Compares records from elsewhere with those here. They must have been checked: shape, body, hash. */
export async function planMerge(session: Session, records: readonly StoredRecord[]): Promise<MergePlan> {
	const ids = records.map(({ id }) => id);
	return session.use(async (db) => {
		const here = await db.records.bulkGet(ids);
		for (const [index, known] of here.entries()) {
			if (known !== undefined && known.hash !== records[index]!.hash) {
				throw new StorageFailure({ kind: 'storage-record-differs', record: known.id });
			}
		}
		const fresh = records.filter((_, index) => here[index] === undefined);
		const subjects = [...new Set(fresh.map(({ subject }) => subject))];
		const before = await db.current.bulkGet(subjects);
		const known = subjects.filter((_, index) => before[index] !== undefined);
		const own = await db.records.where('subject').anyOf(known).toArray();
		const bySubject = new Map<string, StoredRecord[]>(subjects.map((subject) => [subject, []]));
		for (const record of unionOf(own, fresh).values()) bySubject.get(record.subject)!.push(record);
		const rows = subjects.map((subject) => rowOf(bySubject.get(subject)!));
		const conflicts = rows.filter((row, index) => row.conflict === 1 && before[index]?.conflict !== 1).map(({ subject }) => subject);
		return { fresh, known: records.length - fresh.length, rows, before, conflicts };
	});
}

export type MergeOptions = {
	/** What it brings is in a backup, so it is not on this phone only. */
	readonly fromBackup?: boolean;
	/** Lines that could not be read; kept for the next backup. */
	readonly damaged?: readonly DamagedRow[];
};

/**
 * Joins records from another phone or a backup to those here: a union, the same in any order and any number of times. One
 * transaction; the sums of the lots it touches are added up from scratch.
 */
export async function mergeRecords(
	session: Session,
	records: readonly StoredRecord[],
	{ fromBackup = false, damaged = [] }: MergeOptions = {}
): Promise<Result<readonly StoredRecord[], StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	return write(session, async () => {
		const book = (await session.use((db) => db.book.get('book')))!;
		const plan = await planMerge(session, records);
		if (plan.fresh.length === 0 && damaged.length === 0) return { done: [] };
		const { sums, lots } = await sumsAfter(session, plan.before, plan.rows, true);
		const purchases = fromBackup ? [] : plan.rows.filter(({ kind, body }) => kind === 'purchase' && body !== null);
		const prepared: Prepared = {
			revision: book.revision,
			records: plan.fresh,
			rows: plan.rows,
			sums,
			lots,
			photos: [],
			damaged,
			draft: null,
			onlyHere: purchases.map(({ subject }) => subject),
			notOnlyHere: [],
			book: bookAfter(book, plan.fresh, newId(session.environment.now()))
		};
		return prepared;
	});
}

/** This device after a merge: another letter if others number with ours, another name if our own chain went on elsewhere. */
function bookAfter(book: BookRow, fresh: readonly StoredRecord[], otherName: string): BookRow {
	const taken = new Set(book.taken);
	for (const { kind, body, device } of fresh) {
		if (kind !== 'purchase' || body === null || device === book.device) continue;
		const number = readPurchaseNumber(String((body as { readonly number?: unknown }).number));
		if (number !== null) taken.add(number.letter);
	}
	const copied = fresh.some(({ device }) => device === book.device);
	const own = { device: book.device, head: book.head, letter: book.letter, numbered: book.numbered };
	if (copied) {
		taken.add(book.letter);
		Object.assign(own, { device: otherName, head: null });
	}
	if (taken.has(own.letter)) Object.assign(own, { letter: freeLetter(taken), numbered: 0 });
	return {
		...book,
		...own,
		taken: [...taken].sort(),
		records: book.records + fresh.length,
		revision: book.revision + 1
	};
}
