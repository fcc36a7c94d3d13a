import { fail, ok, type Result } from '../number/result.ts';
import { canonicalJson, isJson, type Json } from './json.ts';

/**
 * One entry of the book. Records are only ever added: a correction is a new record, a deletion is a record with no body.
 * `hash` is the SHA-256 (hex) of `canonicalText`; `previous` is the hash of the record that the same device wrote before.
 */
export type StoredRecord = {
	/** Unique and ordered by time; made by the one who writes, so that a retry is harmless. */
	readonly id: string;
	/** What the subject is: 'lot', 'piece' ... A newer app may write kinds that this one does not know. */
	readonly kind: string;
	/** The version of the body of this kind. */
	readonly version: number;
	/** The thing it is about. */
	readonly subject: string;
	/** The record of the same subject that this one was made from; null for the first. */
	readonly replaces: string | null;
	/** Further records of the same subject that this one settles after a conflict. */
	readonly settles: readonly string[];
	/** Milliseconds since 1970-01-01 UTC. */
	readonly at: number;
	readonly device: string;
	/** The whole new state of the subject; null: deleted. */
	readonly body: Json | null;
	readonly previous: string | null;
	readonly hash: string;
};

export type RecordProblem = { readonly kind: 'record-shape'; readonly field: string; readonly found: string };

/** The text whose hash a record carries: everything but the hash itself, keys in order. */
export function canonicalText(record: Omit<StoredRecord, 'hash'>): string {
	const { id, kind, version, subject, replaces, settles, at, device, body, previous } = record;
	return canonicalJson({ id, kind, version, subject, replaces, settles, at, device, body, previous });
}

const NAME = /^[A-Za-z0-9._:-]{1,80}$/;
const HASH = /^[0-9a-f]{64}$/;
const isName = (value: unknown): value is string => typeof value === 'string' && NAME.test(value);
const isHash = (value: unknown): value is string => typeof value === 'string' && HASH.test(value);
const isCount = (value: unknown): value is number => typeof value === 'number' && Number.isSafeInteger(value) && value >= 0;

const FIELDS: { readonly [K in keyof StoredRecord]: (value: unknown, record: { [key: string]: unknown }) => boolean } = {
	id: isName,
	kind: isName,
	version: (value) => isCount(value) && value >= 1,
	subject: isName,
	replaces: (value, record) => value === null || (isName(value) && value !== record.id),
	settles: (value, record) => Array.isArray(value) && value.every((each) => isName(each) && each !== record.id),
	at: (value) => isCount(value) && value <= 8.64e15,
	device: isName,
	body: (value) => isJson(value),
	previous: (value) => value === null || isHash(value),
	hash: isHash
};

/** A record from a file or a damaged row: exactly the fields above, each of its shape. The body is judged by its kind. */
export function readRecord(value: unknown): Result<StoredRecord, RecordProblem> {
	if (typeof value !== 'object' || value === null || Array.isArray(value)) return fail({ kind: 'record-shape', field: '', found: shown(value) });
	const fields = value as { [key: string]: unknown };
	for (const [field, accepts] of Object.entries(FIELDS)) {
		const found = Object.hasOwn(fields, field) ? fields[field] : undefined;
		if (!accepts(found, fields)) return fail({ kind: 'record-shape', field, found: shown(found) });
	}
	for (const field of Object.keys(fields)) {
		if (!Object.hasOwn(FIELDS, field)) return fail({ kind: 'record-shape', field, found: shown(fields[field]) });
	}
	return ok(value as StoredRecord);
}

function shown(value: unknown): string {
	if (value === undefined) return 'nothing';
	const written = isJson(value) ? JSON.stringify(value) : `something that is no JSON (${typeof value})`;
	return written.length > 60 ? `${written.slice(0, 57)}...` : written;
}
