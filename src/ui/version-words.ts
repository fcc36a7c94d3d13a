import { metals } from '$trade/metal/metals.ts';
import type { Json } from '$trade/record/json.ts';
import type { Bodies, RecordKind } from '$trade/record/kind.ts';
import type { Format } from './format.ts';
import { pieceHow, pieceName } from './piece-words.ts';

/** A body together with its kind. */
export type KindBody = { readonly [K in RecordKind]: { readonly kind: K; readonly body: Bodies[K] } }[RecordKind];

const KINDS: Readonly<Record<RecordKind, string>> = {
	lot: 'Lot',
	piece: 'Piece',
	prices: 'Price sheet',
	purchase: 'Purchase',
	settings: 'Settings',
	scale: 'Scale',
	tester: 'Tester'
};

export function kindName(kind: string): string {
	return Object.hasOwn(KINDS, kind) ? KINDS[kind as RecordKind] : kind;
}

/** What something is called, without what may be in question. */
export function thingName(of: KindBody): string {
	switch (of.kind) {
		case 'lot':
		case 'scale':
		case 'tester':
			return of.body.name;
		case 'piece':
			return pieceName(of.body.piece);
		case 'purchase':
			return of.body.number ?? '';
		case 'prices':
		case 'settings':
			return '';
	}
}

/** What one version of something says, in a line. */
export function versionWords(of: KindBody, format: Format): string {
	switch (of.kind) {
		case 'lot':
			return `${of.body.name} · ${of.body.state === 'set-aside' ? 'set aside' : of.body.state}`;
		case 'piece':
			return `${pieceName(of.body.piece)} · ${pieceHow(of.body.piece, format)}`;
		case 'prices':
			return of.body.quotes
				.map(({ metal, amount, per }) => `${metals[metal].name} ${format.price(amount, of.body.currency)} ${format.per(per)}`)
				.join(' · ');
		case 'purchase':
			return `${of.body.number ?? ''} ${of.body.seller.name} · ${format.money(of.body.paid)} · ${format.date(of.body.boughtAt)}`.trim();
		case 'settings':
			return `${of.body.currency} · masses in ${of.body.massUnit}`;
		case 'scale':
			return `${of.body.name} · steps of ${format.mass(of.body.division, of.body.unit)}`;
		case 'tester':
			return `${of.body.name} · ${of.body.kind === 'acids' ? 'acids' : 'fluorescence'}`;
	}
}

/** A place where versions differ: its name, and what each says there, as it is written down. */
export type Difference = { readonly field: string; readonly values: readonly string[] };

/** Where versions of one body differ, field by field; a deleted version says nothing anywhere. */
export function differences(bodies: readonly (Json | null)[]): readonly Difference[] {
	const flat = bodies.map((body) => (body === null ? new Map<string, string>() : flatten(body)));
	const fields = [...new Set(flat.flatMap((each) => [...each.keys()]))];
	return fields
		.map((field) => ({ field, values: flat.map((each) => each.get(field) ?? '–') }))
		.filter(({ values }) => new Set(values).size > 1);
}

function flatten(body: Json, path = '', into = new Map<string, string>()): Map<string, string> {
	if (body === null || typeof body !== 'object') {
		into.set(path === '' ? 'it' : path, body === null || body === '' ? 'nothing' : String(body));
		return into;
	}
	const list = Array.isArray(body);
	for (const [key, value] of Object.entries(body as { readonly [key: string]: Json })) {
		// lists are numbered the way people count
		const name = list ? String(Number(key) + 1) : key.replace(/([a-z])([A-Z])/g, '$1 $2').toLowerCase();
		flatten(value, path === '' ? name : `${path}, ${name}`, into);
	}
	return into;
}
