import { fail, ok, type Result } from '$trade/number/result.ts';
import { chainBreaks } from '$trade/record/chain.ts';
import { asJson, canonicalJson, type Json } from '$trade/record/json.ts';
import { checkBody } from '$trade/record/kind.ts';
import { readRecord, type StoredRecord } from '$trade/record/record.ts';
import {
	BackupFailure,
	FORMAT,
	FORMAT_VERSION,
	headerText,
	makeDigest,
	stopIfCancelled,
	type BackupProblem,
	type Running
} from './backup-format.ts';
import { toBase64 } from './base64.ts';
import { hashOf } from './hash.ts';
import type { Session } from './open.ts';
import { isWhole } from './photos.ts';
import { problemOf, type StorageProblem } from './problem.ts';
import { readBackup } from './read-backup.ts';
import type { PhotoRow } from './schema.ts';

/** Where a backup goes: chunks as they come, and the way to read them back. */
export type BackupTarget = {
	readonly write: (chunk: Uint8Array<ArrayBuffer>) => Promise<void> | void;
	/** Ends the file and gives it back for the check. */
	readonly end: () => Promise<Blob> | Blob;
};

export type BackupFile = {
	readonly name: string;
	readonly blob: Blob;
	readonly madeAt: number;
	readonly records: number;
	readonly photos: number;
	readonly damaged: number;
	/** Purchases in it that were in no backup before; given back to `handedOver` once the person has the file. */
	readonly purchases: readonly string[];
};

/** Gathers the file in a Blob, which browsers keep out of memory when it grows. */
export function blobTarget(): BackupTarget {
	const parts: Uint8Array<ArrayBuffer>[] = [];
	return { write: (chunk) => void parts.push(chunk), end: () => new Blob(parts, { type: 'application/gzip' }) };
}

const AT_ONCE = 500;

/**
 * The whole book as one file. Records are only ever added and photos never change, so a list of their ids is a picture of
 * the book at one moment: it is gone through once for the digest and once for the file, which is then read back and checked.
 */
export async function makeBackup(
	session: Session,
	{ target = blobTarget(), ...running }: Running & { readonly target?: BackupTarget } = {}
): Promise<Result<BackupFile, BackupProblem | StorageProblem>> {
	try {
		const book = await session.use((db) => db.book.get('book'));
		const purchases = await session.use((db) => db.onlyHere.toCollection().primaryKeys());
		const ids = await session.use((db) => db.records.toCollection().primaryKeys());
		const photoIds = await session.use((db) => db.photos.toCollection().primaryKeys());
		const madeAt = session.environment.now();
		const found = { records: 0, damaged: 0, photos: 0 };
		const links: Link[] = [];
		const digest = makeDigest();
		for await (const { line, holds } of bodyLines(session, ids, photoIds, running, 'counting')) {
			await digest.add(line);
			if (holds === 'damage') found.damaged += 1;
			else if (holds === 'photo') found.photos += 1;
			else {
				found.records += 1;
				links.push(holds);
			}
		}
		const database = book?.database ?? session.name;
		const bare = { format: FORMAT, version: FORMAT_VERSION, database, madeAt, ...found, breaks: chainBreaks(links) } as const;
		await digest.add(headerText(bare));
		const header = headerText({ ...bare, digest: await digest.end() });
		const writer = compressedWriter(target);
		await writer.line(header);
		for await (const { line } of bodyLines(session, ids, photoIds, running, 'writing')) await writer.line(line);
		await writer.end();
		const blob = await target.end();
		await verify(blob, header, running, ids.length + photoIds.length);
		const name = `meltbook-${new Date(madeAt).toISOString().slice(0, 16).replace('T', '-').replace(':', '')}.jsonl.gz`;
		return ok({ name, blob, madeAt, purchases, ...found });
	} catch (thrown) {
		return fail(thrown instanceof BackupFailure ? thrown.problem : problemOf(thrown));
	}
}

/** The person has the file: its purchases are not only on this phone any more. */
export async function handedOver(session: Session, { purchases, madeAt }: BackupFile): Promise<Result<null, StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	try {
		await session.alone(() =>
			session.use((db) =>
				db.transaction('rw', db.onlyHere, db.book, async () => {
					await db.onlyHere.bulkDelete(purchases as string[]);
					await db.book.update('book', { lastBackup: madeAt });
				})
			)
		);
		session.watchers.tell({ kinds: ['backup'], lots: [] });
		return ok(null);
	} catch (thrown) {
		return fail(problemOf(thrown));
	}
}

type Link = Pick<StoredRecord, 'id' | 'device' | 'previous' | 'hash'>;
type Line = { readonly line: string; readonly holds: Link | 'photo' | 'damage' };

/** Every line after the header: records, then what an earlier backup could not read, then photos, one by one. */
async function* bodyLines(
	session: Session,
	ids: readonly string[],
	photoIds: readonly string[],
	{ onProgress, signal }: Running,
	step: 'counting' | 'writing'
): AsyncGenerator<Line> {
	const total = ids.length + photoIds.length;
	for (let from = 0; from < ids.length; from += AT_ONCE) {
		stopIfCancelled(signal);
		const some = ids.slice(from, from + AT_ONCE);
		const rows = await session.use((db) => db.records.bulkGet(some));
		for (const [index, row] of rows.entries()) yield await recordLine(some[index]!, row);
		onProgress?.({ step, done: Math.min(from + AT_ONCE, ids.length), total });
	}
	for (const { key, reason, row } of await session.use((db) => db.damaged.toArray())) yield damagedLine(key, reason, row);
	for (const [index, id] of photoIds.entries()) {
		stopIfCancelled(signal);
		yield await photoLine(id, await session.use((db) => db.photos.get(id)));
		onProgress?.({ step, done: ids.length + index + 1, total });
	}
}

async function recordLine(key: string, row: unknown): Promise<Line> {
	const reason = await whatIsWrong(row);
	if (reason !== null) return damagedLine(key, reason, row);
	return { line: canonicalJson({ record: row as Json }), holds: row as StoredRecord };
}

/** What cannot be true of a row that we wrote; a kind that only a newer app knows is not wrong. */
export async function whatIsWrong(row: unknown): Promise<string | null> {
	const read = readRecord(row);
	if (!read.ok) return `${read.problem.kind} ${read.problem.field}`.trim();
	const { kind, version, body, hash } = read.value;
	if ((await hashOf(read.value)) !== hash) return 'record-changed';
	const problem = checkBody(kind, version, body);
	return problem === null || problem.kind === 'record-newer' ? null : problem.kind;
}

async function photoLine(id: string, photo: PhotoRow | undefined): Promise<Line> {
	const base64 = photo?.bytes instanceof ArrayBuffer ? toBase64(new Uint8Array(photo.bytes)) : '';
	const type = String(photo?.type);
	if (photo === undefined || !(await isWhole(photo))) return damagedLine(`photo ${id}`, 'photo-damaged', { id, type, base64 });
	return { line: canonicalJson({ photo: { id, type, base64 } }), holds: 'photo' };
}

function damagedLine(key: string, reason: string, row: unknown): Line {
	return { line: canonicalJson({ damaged: { key, reason, row: asJson(row) } }), holds: 'damage' };
}

/** Lines through gzip to the target, in order. */
function compressedWriter(target: BackupTarget) {
	const zip = new CompressionStream('gzip');
	const into = zip.writable.getWriter();
	const encoder = new TextEncoder();
	const out = zip.readable.getReader();
	const pumped = (async () => {
		for (;;) {
			const { done, value } = await out.read();
			if (done) return;
			await target.write(value as Uint8Array<ArrayBuffer>);
		}
	})();
	// a target that refuses ends the stream; the refusal is thrown at the next line or at the end
	pumped.catch((reason: unknown) => into.abort(reason).catch(() => undefined));
	return {
		line: (text: string) => into.write(encoder.encode(`${text}\n`)),
		async end() {
			await into.close();
			await pumped;
		}
	};
}

/** Reads the finished file as a restore would, and compares its header with what was meant. */
async function verify(blob: Blob, header: string, running: Running, total: number): Promise<void> {
	const { signal, onProgress } = running;
	const read = await readBackup(blob, {
		...(signal === undefined ? {} : { signal }),
		...(onProgress === undefined ? {} : { onProgress: ({ done }) => onProgress({ step: 'verifying', done, total }) })
	});
	if (!read.ok) {
		if (read.problem.kind === 'backup-cancelled') throw new BackupFailure(read.problem);
		// a record of a newer app is exported unread; everything else must read back
		if (read.problem.kind === 'backup-newer') return;
		throw new BackupFailure({ kind: 'backup-not-verified', what: read.problem.kind });
	}
	if (headerText(read.value.header) !== header) throw new BackupFailure({ kind: 'backup-not-verified', what: 'header' });
}
