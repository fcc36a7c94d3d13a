import { canonicalText, type StoredRecord } from '$trade/record/record.ts';

const encoder = new TextEncoder();

/** SHA-256 as hex. WebCrypto is asynchronous, so hashes are made before a transaction, never in it. */
export async function sha256(data: Uint8Array | string): Promise<string> {
	const bytes = typeof data === 'string' ? encoder.encode(data) : data;
	return hex(await crypto.subtle.digest('SHA-256', bytes as BufferSource));
}

function hex(digest: ArrayBuffer): string {
	let text = '';
	for (const byte of new Uint8Array(digest)) text += HEX[byte]!;
	return text;
}

const HEX = Array.from({ length: 256 }, (_, byte) => byte.toString(16).padStart(2, '0'));

/** The hash that a record should carry. */
export function hashOf(record: Omit<StoredRecord, 'hash'>): Promise<string> {
	return sha256(canonicalText(record));
}

/** Records in order, each with the hash of the one before it, from the device's last one on. */
export async function chained(records: readonly Omit<StoredRecord, 'hash' | 'previous'>[], head: string | null): Promise<StoredRecord[]> {
	const done: StoredRecord[] = [];
	let previous = head;
	for (const record of records) {
		const linked = { ...record, previous };
		const hash = await hashOf(linked);
		done.push({ ...linked, hash });
		previous = hash;
	}
	return done;
}
