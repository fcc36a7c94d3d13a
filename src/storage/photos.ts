import { sha256 } from './hash.ts';
import type { Session } from './open.ts';
import type { PhotoRow } from './schema.ts';

/** A picture as it is kept: plain bytes (stored Blobs break on one family of browsers), named by their SHA-256. */
export type Photo = PhotoRow;

export type PhotoFound = { readonly state: 'whole' | 'damaged'; readonly photo: Photo } | { readonly state: 'missing' };

export async function makePhoto(bytes: ArrayBuffer, type: string): Promise<Photo> {
	return { id: await sha256(new Uint8Array(bytes)), type, bytes };
}

/** One photo, with whether its bytes still are what their name says. */
export async function readPhoto(session: Session, id: string): Promise<PhotoFound> {
	const photo = await session.use((db) => db.photos.get(id));
	if (photo === undefined) return { state: 'missing' };
	return { state: (await isWhole(photo)) ? 'whole' : 'damaged', photo };
}

export async function isWhole({ id, bytes }: Photo): Promise<boolean> {
	try {
		return (await sha256(new Uint8Array(bytes))) === id;
	} catch {
		return false;
	}
}
