import { canonicalJson, isJson, type Json } from '$trade/record/json.ts';
import type { ChainBreak } from '$trade/record/chain.ts';
import { sha256 } from './hash.ts';

/**
 * A backup is lines of JSON, gzipped. The first line is the header; then one line for each record, for each row that could
 * not be read, and for each photo (base64). Decimals are text. Anyone can open it with gunzip and a text editor.
 */
export const FORMAT = 'meltbook-backup';
export const FORMAT_VERSION = 1;

export type BackupHeader = {
	readonly format: typeof FORMAT;
	readonly version: number;
	/** Which database it was made from. */
	readonly database: string;
	readonly madeAt: number;
	readonly records: number;
	readonly damaged: number;
	readonly photos: number;
	/** Where a device's chain did not hold when the backup was made; anything else missing was lost afterwards. */
	readonly breaks: readonly ChainBreak[];
	/** Over every line after the header, and then the header without this field. */
	readonly digest: string;
};

export type BackupLine =
	| { readonly record: Json }
	| { readonly damaged: { readonly key: string; readonly reason: string; readonly row: Json } }
	| { readonly photo: { readonly id: string; readonly type: string; readonly base64: string } };

export type BackupProblem =
	/** Not one of our files at all. */
	| { readonly kind: 'backup-not-ours' }
	/** The file ends before it should: the copy was broken off. */
	| { readonly kind: 'backup-cut-short'; readonly line: number }
	/** Something in the file is not as it was written. */
	| { readonly kind: 'backup-damaged'; readonly line: number; readonly what: string }
	/** Written by a newer app. */
	| { readonly kind: 'backup-newer'; readonly what: string; readonly version: number; readonly known: number }
	/** Another record stands here under the same id. */
	| { readonly kind: 'backup-differs'; readonly record: string }
	/** The person stopped it. Nothing was changed. */
	| { readonly kind: 'backup-cancelled' }
	/** The file was written and read back, and was not the same. */
	| { readonly kind: 'backup-not-verified'; readonly what: string };

/** One pass over many lines: how far it is. */
export type Progress = { readonly step: 'counting' | 'writing' | 'verifying' | 'reading' | 'merging'; readonly done: number; readonly total: number };
export type Running = { readonly onProgress?: (progress: Progress) => void; readonly signal?: AbortSignal };

export class BackupFailure extends Error {
	readonly problem: BackupProblem;

	constructor(problem: BackupProblem) {
		super(problem.kind);
		this.problem = problem;
	}
}

export function stopIfCancelled(signal: AbortSignal | undefined): void {
	if (signal?.aborted === true) throw new BackupFailure({ kind: 'backup-cancelled' });
}

const BLOCK = 65_536;

/**
 * The digest of a file of any length in little memory: lines are gathered until they make 64 Ki bytes or more, and
 * digest = SHA-256(digest before as hex + the block), beginning with an empty digest.
 */
export function makeDigest(): { add: (line: string) => Promise<void>; end: () => Promise<string> } {
	const encoder = new TextEncoder();
	let digest = '';
	let block: string[] = [];
	let size = 0;
	async function close() {
		digest = await sha256(encoder.encode(digest + block.join('')));
		block = [];
		size = 0;
	}
	return {
		async add(line) {
			block.push(line, '\n');
			size += line.length + 1;
			if (size >= BLOCK) await close();
		},
		async end() {
			await close();
			return digest;
		}
	};
}

export function headerText(header: Omit<BackupHeader, 'digest'> & { readonly digest?: string }): string {
	return canonicalJson(header as unknown as Json);
}

const isCount = (value: unknown) => typeof value === 'number' && Number.isSafeInteger(value) && value >= 0;

/** The header of a file; null when the line is no header of ours. A newer version is read as far as its number. */
export function readHeader(line: string): BackupHeader | null {
	let found: unknown;
	try {
		found = JSON.parse(line);
	} catch {
		return null;
	}
	if (typeof found !== 'object' || found === null || !isJson(found)) return null;
	const { format, version, database, madeAt, records, damaged, photos, breaks, digest } = found as Record<string, unknown>;
	if (format !== FORMAT || !isCount(version) || version === 0) return null;
	if (version !== FORMAT_VERSION) return found as unknown as BackupHeader;
	const whole = typeof database === 'string' && [madeAt, records, damaged, photos].every(isCount) && Array.isArray(breaks);
	return whole && typeof digest === 'string' && /^[0-9a-f]{64}$/.test(digest) ? (found as unknown as BackupHeader) : null;
}

export function breakText(broken: ChainBreak): string {
	return canonicalJson(broken as unknown as Json);
}
