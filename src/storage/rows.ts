import { decodeBody, isRecordKind, type Bodies, type BodyProblem, type RecordKind } from '$trade/record/kind.ts';
import type { Json } from '$trade/record/json.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { headsOf } from '$trade/record/union.ts';
import type { CurrentRow } from './schema.ts';

/** Something of the book as a page reads it: its body, or why the body could not be read. */
export type Entry<K extends RecordKind> =
	| { readonly subject: string; readonly record: string; readonly at: number; readonly conflict: boolean; readonly damage: null; readonly body: Bodies[K] }
	| {
			readonly subject: string;
			readonly record: string;
			readonly at: number;
			readonly conflict: boolean;
			readonly damage: BodyProblem;
			readonly body: null;
			/** What stands in the row, as it was found. */
			readonly raw: Json;
	  };

/** The row of a subject from all of its records. */
export function rowOf(records: readonly StoredRecord[]): CurrentRow {
	return rowFrom(headsOf(records));
}

/** The row of a subject whose standing records these are, latest first. */
function rowFrom(heads: readonly StoredRecord[]): CurrentRow {
	const winner = heads[0]!;
	const standing = heads.map(({ id, at }) => ({ id, at }));
	return withBody(winner, standing);
}

/** The row after a record that was made as the latest one of its subject. */
export function rowAfter(before: CurrentRow | undefined, record: StoredRecord): CurrentRow {
	const gone = new Set([record.replaces, ...record.settles]);
	const others = (before?.heads ?? []).filter(({ id }) => !gone.has(id));
	return withBody(record, [{ id: record.id, at: record.at }, ...others]);
}

function withBody(winner: StoredRecord, heads: CurrentRow['heads']): CurrentRow {
	const { subject, kind, version, at, body, id } = winner;
	return {
		subject,
		kind,
		record: id,
		version,
		at,
		body,
		heads,
		...placeOf(kind, body),
		...(heads.length > 1 ? { conflict: 1 as const } : {})
	};
}

/** Which list a subject stands in. Read leniently, so that a damaged body still shows up where it belongs. */
function placeOf(kind: string, body: Json | null): { shelf?: string; order?: number } {
	if (body === null || typeof body !== 'object' || Array.isArray(body)) return {};
	const fields = body as { readonly [key: string]: Json };
	const at = (field: string) => (typeof fields[field] === 'number' ? fields[field] : 0);
	switch (kind) {
		case 'piece':
			return { shelf: pieceShelf(String(fields.lot)), order: at('order') };
		case 'lot':
			return { shelf: `lots:${String(fields.state)}`, order: at('openedAt') };
		case 'prices':
			return { shelf: 'prices', order: at('at') };
		case 'purchase':
			return { shelf: 'purchases', order: at('boughtAt') };
		case 'scale':
			return { shelf: 'scales', order: 0 };
		case 'tester':
			return { shelf: 'testers', order: 0 };
		default:
			return {};
	}
}

export function pieceShelf(lot: string): string {
	return `lot:${lot}`;
}

/** The body of a row as its kind; null for a subject that is deleted or of another kind. */
export function entryOf<K extends RecordKind>(kind: K, row: CurrentRow | undefined): Entry<K> | null {
	if (row === undefined || row.kind !== kind || row.body === null || row.body === undefined) return null;
	const { subject, record, at } = row;
	const conflict = row.conflict === 1;
	const read = decodeBody(kind, row.version, row.body);
	if (read.ok) return { subject, record, at, conflict, damage: null, body: read.value };
	return { subject, record, at, conflict, damage: read.problem, body: null, raw: row.body };
}

export function kindOf(row: CurrentRow): RecordKind | null {
	return isRecordKind(row.kind) ? row.kind : null;
}
