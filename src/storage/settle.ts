import { fail, ok, type Result } from '$trade/number/result.ts';
import { decodeBody, isRecordKind } from '$trade/record/kind.ts';
import type { Change } from './append.ts';
import type { StorageProblem } from './problem.ts';
import type { Conflict } from './read.ts';

/** The change with which a person settles a conflict: the record that is kept stands again, and names the others as settled. */
export function settlement({ kind, subject, winner, standing }: Conflict, keep: string): Result<Change, StorageProblem> {
	const kept = standing.find(({ id }) => id === keep);
	const missing = fail<StorageProblem>({ kind: 'storage-no-such-record', record: keep });
	if (kept === undefined || !isRecordKind(kind)) return missing;
	const settles = standing.map(({ id }) => id).filter((id) => id !== winner);
	if (kept.body === null) return ok({ kind, subject, body: null, replaces: winner, settles } as Change);
	const read = decodeBody(kind, kept.version, kept.body);
	return read.ok ? ok({ kind, subject, body: read.value, replaces: winner, settles } as Change) : missing;
}
