import type { OutsideStore } from './environment.ts';

/** What is remembered outside the database: which one it was, and how many records it held. */
export type Marker = { readonly database: string; readonly records: number };

/** What the marker says about the database that was found. */
export type MarkerReading =
	| { readonly state: 'new' }
	| { readonly state: 'as-left' }
	/** There was a book here and the browser has thrown it away. */
	| { readonly state: 'wiped'; readonly records: number }
	/** The book holds fewer records than it did when it was last used. */
	| { readonly state: 'fewer'; readonly records: number; readonly found: number };

const key = (name: string) => `${name}:marker`;

export function readMarker(outside: OutsideStore | null, name: string): Marker | null {
	try {
		const found: unknown = JSON.parse(outside?.getItem(key(name)) ?? 'null');
		if (typeof found !== 'object' || found === null) return null;
		const { database, records } = found as { database?: unknown; records?: unknown };
		return typeof database === 'string' && typeof records === 'number' && Number.isSafeInteger(records) ? { database, records } : null;
	} catch {
		return null;
	}
}

/** A marker that cannot be written costs the warning, not the purchase. */
export function writeMarker(outside: OutsideStore | null, name: string, marker: Marker): void {
	try {
		outside?.setItem(key(name), JSON.stringify(marker));
	} catch {
		return;
	}
}

export function removeMarker(outside: OutsideStore | null, name: string): void {
	try {
		outside?.removeItem(key(name));
	} catch {
		return;
	}
}

export function compareMarker(marker: Marker | null, found: Marker): MarkerReading {
	if (marker === null || marker.records === 0) return found.records === 0 ? { state: 'new' } : { state: 'as-left' };
	if (marker.database !== found.database) return { state: 'wiped', records: marker.records };
	if (marker.records > found.records) return { state: 'fewer', records: marker.records, found: found.records };
	return { state: 'as-left' };
}
