import type { StoredRecord } from './record.ts';

/** What a subject is now: the winning record, and every record that nothing has replaced or settled (more than one: a conflict). */
export type SubjectState = { readonly winner: StoredRecord; readonly heads: readonly StoredRecord[] };

/** Ordered by time, then by id: the same order on every device. */
export function byTime(a: { at: number; id: string }, b: { at: number; id: string }): number {
	return a.at - b.at || (a.id < b.id ? -1 : a.id > b.id ? 1 : 0);
}

/**
 * Two books put together: every record of both, once. The same result in any order and any number of times.
 * Two different records under one id cannot come from this program; the one with the smaller hash is kept, on every device.
 */
export function unionOf(a: Iterable<StoredRecord>, b: Iterable<StoredRecord>): Map<string, StoredRecord> {
	const all = new Map<string, StoredRecord>();
	for (const records of [a, b]) {
		for (const record of records) {
			const known = all.get(record.id);
			if (known === undefined || record.hash < known.hash) all.set(record.id, record);
		}
	}
	return all;
}

/** The records of one subject that no other record of it replaces or settles, latest first. */
export function headsOf(records: readonly StoredRecord[]): StoredRecord[] {
	const gone = new Set<string>();
	for (const record of records) {
		if (record.replaces !== null) gone.add(record.replaces);
		for (const settled of record.settles) gone.add(settled);
	}
	const heads = records.filter((record) => !gone.has(record.id));
	// records that replace one another in a circle cannot come from this program: then all of them stand
	return (heads.length > 0 ? heads : [...records]).sort((a, b) => byTime(b, a));
}

/** The state of each subject. Where two records replace the same one, the later wins and both are kept. */
export function statesOf(records: Iterable<StoredRecord>): Map<string, SubjectState> {
	const bySubject = new Map<string, StoredRecord[]>();
	for (const record of records) {
		const known = bySubject.get(record.subject);
		if (known === undefined) bySubject.set(record.subject, [record]);
		else known.push(record);
	}
	const states = new Map<string, SubjectState>();
	for (const [subject, own] of bySubject) {
		const heads = headsOf(own);
		states.set(subject, { winner: heads[0]!, heads });
	}
	return states;
}
