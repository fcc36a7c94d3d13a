/** Bytes as base64 text and back. Strict: only the one canonical text of some bytes is read. */
export function toBase64(bytes: Uint8Array): string {
	let binary = '';
	for (let from = 0; from < bytes.length; from += CHUNK) binary += String.fromCharCode(...bytes.subarray(from, from + CHUNK));
	return btoa(binary);
}

const CHUNK = 0x8000;

export function fromBase64(text: string): Uint8Array<ArrayBuffer> | null {
	if (!/^[A-Za-z0-9+/]*={0,2}$/.test(text) || text.length % 4 !== 0) return null;
	try {
		const binary = atob(text);
		const bytes = new Uint8Array(binary.length);
		for (let index = 0; index < binary.length; index += 1) bytes[index] = binary.charCodeAt(index);
		// the last four signs could say the same bytes in more than one way
		return toBase64(bytes.subarray(bytes.length - (bytes.length % 3))) === (bytes.length % 3 === 0 ? '' : text.slice(-4)) ? bytes : null;
	} catch {
		return null;
	}
}
