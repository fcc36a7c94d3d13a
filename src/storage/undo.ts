import { fail, ok, type Result } from '$trade/number/result.ts';
import { decodeBody, isRecordKind } from '$trade/record/kind.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import type { Change } from './append.ts';
import type { Session } from './open.ts';
import type { StorageProblem } from './problem.ts';

/**
 * The changes that bring back what was before these records: each subject's body before, or its deletion when there was
 * none. Refused when a subject has been changed since. The undo is an act like any other and can be undone
 * itself. What a settlement settled stays settled: the records it named are kept and can be looked at.
 */
export async function undoOf(session: Session, recordIds: readonly string[]): Promise<Result<readonly Change[], StorageProblem>> {
	const records = await session.use((db) => db.records.bulkGet(recordIds as string[]));
	const changes: Change[] = [];
	for (const [index, record] of records.entries()) {
		const missing = fail<StorageProblem>({ kind: 'storage-no-such-record', record: recordIds[index]! });
		if (record === undefined) return missing;
		const change = await changeBack(session, record);
		if (!change.ok) return change;
		changes.push(change.value);
	}
	return ok(changes);
}

async function changeBack(session: Session, record: StoredRecord): Promise<Result<Change, StorageProblem>> {
	const { id, kind, subject, replaces } = record;
	const missing = fail<StorageProblem>({ kind: 'storage-no-such-record', record: id });
	if (!isRecordKind(kind)) return missing;
	const [row, before] = await session.use(
		async (db) => [await db.current.get(subject), replaces === null ? undefined : await db.records.get(replaces)] as const
	);
	if (row?.record !== id) {
		return fail({ kind: 'storage-changed-since', subject, expected: id, found: row?.record ?? null });
	}
	if (replaces !== null && before === undefined) return fail({ kind: 'storage-no-such-record', record: replaces });
	const old = before?.body ?? null;
	const body = old === null ? null : decodeBody(kind, before!.version, old);
	if (body !== null && !body.ok) return fail({ kind: 'storage-no-such-record', record: before!.id });
	return ok({ kind, subject, body: body === null ? null : body.value, replaces: id } as Change);
}
