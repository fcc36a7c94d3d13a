import { fail, ok, type Result } from '$trade/number/result.ts';
import { chainBreaks } from '$trade/record/chain.ts';
import { isJson, type Json } from '$trade/record/json.ts';
import { checkBody } from '$trade/record/kind.ts';
import { readRecord, type StoredRecord } from '$trade/record/record.ts';
import {
	BackupFailure,
	breakText,
	FORMAT_VERSION,
	headerText,
	makeDigest,
	readHeader,
	stopIfCancelled,
	type BackupHeader,
	type BackupProblem,
	type Running
} from './backup-format.ts';
import { fromBase64 } from './base64.ts';
import { hashOf, sha256 } from './hash.ts';
import type { DamagedRow, PhotoRow } from './schema.ts';

/** A backup that was read to its end and found whole. Photos are checked and not kept: they are read again when restored. */
export type BackupContents = {
	readonly header: BackupHeader;
	readonly records: readonly StoredRecord[];
	readonly damaged: readonly DamagedRow[];
	readonly photoIds: readonly string[];
};

/** The longest line that is read: a photo of 24 million bytes. A longer one is no line of ours. */
const LONGEST = 32 * 1024 * 1024;

function damage(line: number, what: string): never {
	throw new BackupFailure({ kind: 'backup-damaged', line, what });
}

/** The lines of a file, gzipped or plain, one after the other. */
async function* linesOf(file: Blob, signal: AbortSignal | undefined): AsyncGenerator<{ line: string }> {
	const start = new Uint8Array(await file.slice(0, 2).arrayBuffer());
	const zipped = start[0] === 0x1f && start[1] === 0x8b;
	const stream = zipped ? file.stream().pipeThrough(new DecompressionStream('gzip')) : file.stream();
	const reader = stream.getReader() as ReadableStreamDefaultReader<Uint8Array<ArrayBuffer>>;
	const decoder = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });
	let parts: string[] = [];
	let length = 0;
	let count = 0;
	try {
		for (;;) {
			stopIfCancelled(signal);
			const { done, value } = await reader.read();
			const text = done ? decoder.decode() : decoder.decode(value, { stream: true });
			const pieces = text.split('\n');
			for (const piece of pieces.slice(0, -1)) {
				parts.push(piece);
				const line = parts.join('');
				parts = [];
				length = 0;
				count += 1;
				yield { line };
			}
			const rest = pieces[pieces.length - 1]!;
			parts.push(rest);
			length += rest.length;
			if (length > LONGEST) damage(count + 1, 'too long');
			if (!done) continue;
			if (length > 0) throw new BackupFailure({ kind: 'backup-cut-short', line: count + 1 });
			return;
		}
	} catch (thrown) {
		if (thrown instanceof BackupFailure) throw thrown;
		// the unpacker and the decoder say in their own words that bytes are missing or wrong
		if (!zipped && count === 0) throw new BackupFailure({ kind: 'backup-not-ours' });
		const short = /unexpected end|incomplete|premature|terminated|truncated/i.test(String(thrown));
		throw new BackupFailure(short ? { kind: 'backup-cut-short', line: count + 1 } : { kind: 'backup-damaged', line: count + 1, what: 'gzip' });
	} finally {
		await reader.cancel().catch(() => undefined);
	}
}

/** Reads and checks all of a file and changes nothing: shape, bodies, hashes, the chains, the photos, the digest. */
export async function readBackup(file: Blob, { onProgress, signal }: Running = {}): Promise<Result<BackupContents, BackupProblem>> {
	try {
		let header: BackupHeader | null = null;
		const digest = makeDigest();
		const records = new Map<string, StoredRecord>();
		const damaged: DamagedRow[] = [];
		const photoIds = new Set<string>();
		let number = 0;
		let total = 0;
		for await (const { line } of linesOf(file, signal)) {
			number += 1;
			if (header === null) {
				header = readHeader(line);
				if (header === null) throw new BackupFailure({ kind: 'backup-not-ours' });
				if (header.version > FORMAT_VERSION) {
					throw new BackupFailure({ kind: 'backup-newer', what: 'file', version: header.version, known: FORMAT_VERSION });
				}
				total = header.records + header.damaged + header.photos;
				continue;
			}
			await digest.add(line);
			const content = contentOf(line, number);
			if ('record' in content) {
				const record = await wholeRecord(content.record, number);
				if (records.has(record.id)) damage(number, 'twice');
				records.set(record.id, record);
			} else if ('photo' in content) {
				const { id } = await photoFrom(content.photo, number);
				if (photoIds.has(id)) damage(number, 'twice');
				photoIds.add(id);
			} else damaged.push(damagedFrom(content.damaged, number));
			if (number % 100 === 0) onProgress?.({ step: 'reading', done: number - 1, total });
		}
		if (header === null) throw new BackupFailure({ kind: 'backup-not-ours' });
		if (number - 1 < total) throw new BackupFailure({ kind: 'backup-cut-short', line: number + 1 });
		const { digest: stated, ...bare } = header;
		await digest.add(headerText(bare));
		if ((await digest.end()) !== stated) damage(number, 'digest');
		const counted = records.size === header.records && damaged.length === header.damaged && photoIds.size === header.photos;
		if (!counted) damage(number, 'counts');
		const allowed = new Set(header.breaks.map(breakText));
		const broken = chainBreaks(records.values()).find((each) => !allowed.has(breakText(each)));
		if (broken !== undefined) damage(number, `${broken.kind} ${broken.record}`);
		onProgress?.({ step: 'reading', done: total, total });
		return ok({ header, records: [...records.values()], damaged, photoIds: [...photoIds] });
	} catch (thrown) {
		if (thrown instanceof BackupFailure) return fail(thrown.problem);
		throw thrown;
	}
}

/** The photos of a file that was checked before, one by one; each is checked again, should the file have changed since. */
export async function* photosOf(file: Blob, signal: AbortSignal | undefined): AsyncGenerator<PhotoRow> {
	let number = 0;
	for await (const { line } of linesOf(file, signal)) {
		number += 1;
		if (!line.startsWith('{"photo":')) continue;
		const content = contentOf(line, number);
		if ('photo' in content) yield await photoFrom(content.photo, number);
	}
}

type Content = { readonly record: Json } | { readonly photo: Json } | { readonly damaged: Json };

function contentOf(line: string, number: number): Content {
	let found: unknown;
	try {
		found = JSON.parse(line);
	} catch {
		return damage(number, 'json');
	}
	const keys = typeof found === 'object' && found !== null ? Object.keys(found) : [];
	if (keys.length !== 1 || !['record', 'photo', 'damaged'].includes(keys[0]!)) return damage(number, 'line');
	return found as Content;
}

async function wholeRecord(found: Json, number: number): Promise<StoredRecord> {
	const read = readRecord(found);
	if (!read.ok) return damage(number, `${read.problem.kind} ${read.problem.field}`);
	const record = read.value;
	if ((await hashOf(record)) !== record.hash) damage(number, 'hash');
	const problem = checkBody(record.kind, record.version, record.body);
	if (problem === null) return record;
	if (problem.kind === 'record-newer') {
		throw new BackupFailure({ kind: 'backup-newer', what: problem.record, version: problem.version, known: problem.known });
	}
	return damage(number, `${problem.kind} ${problem.at}`);
}

async function photoFrom(found: Json, number: number): Promise<PhotoRow> {
	const { id, type, base64 } = (found ?? {}) as { readonly [key: string]: Json };
	if (typeof id !== 'string' || typeof type !== 'string' || typeof base64 !== 'string') return damage(number, 'photo');
	const bytes = fromBase64(base64);
	if (bytes === null || (await sha256(bytes)) !== id) return damage(number, 'photo');
	return { id, type, bytes: bytes.buffer };
}

function damagedFrom(found: Json, number: number): DamagedRow {
	const { key, reason, row } = (found ?? {}) as { readonly [key: string]: Json };
	if (typeof key !== 'string' || typeof reason !== 'string' || !isJson(row)) return damage(number, 'line');
	return { key, reason, row };
}
