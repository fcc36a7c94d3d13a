import { assert } from '../number/decimal.ts';
import { fail, type Result } from '../number/result.ts';
import type { Scale } from '../mass/scale.ts';
import type { PriceSheet } from '../price/price-sheet.ts';
import type { Json } from './json.ts';
import { lotShape, type LotBody } from './kinds/lot.ts';
import { pieceShape, type PieceBody } from './kinds/piece.ts';
import { pricesShape } from './kinds/prices.ts';
import { purchaseShape, type PurchaseBody } from './kinds/purchase.ts';
import { scaleShape } from './kinds/scale.ts';
import { settingsShape, type SettingsBody } from './kinds/settings.ts';
import { readAs, type Shape, type ShapeProblem } from './shape.ts';

/** What each kind of record holds. */
export type Bodies = {
	readonly lot: LotBody;
	readonly piece: PieceBody;
	readonly prices: PriceSheet;
	readonly purchase: PurchaseBody;
	readonly settings: SettingsBody;
	readonly scale: Scale;
};

export type RecordKind = keyof Bodies;

export type BodyProblem =
	| ShapeProblem
	/** A kind, or a version of a kind, that only a newer app knows. */
	| { readonly kind: 'record-newer'; readonly record: string; readonly version: number; readonly known: number };

/** The version of each kind that is written today, and its shape. */
const shapes: { readonly [K in RecordKind]: { readonly version: number; readonly shape: Shape<Bodies[K]> } } = {
	lot: { version: 1, shape: lotShape },
	piece: { version: 1, shape: pieceShape },
	prices: { version: 1, shape: pricesShape },
	purchase: { version: 1, shape: purchaseShape },
	settings: { version: 1, shape: settingsShape },
	scale: { version: 1, shape: scaleShape }
};

export const recordKinds = Object.keys(shapes) as readonly RecordKind[];

export function isRecordKind(kind: string): kind is RecordKind {
	return Object.hasOwn(shapes, kind);
}

/** The version in which bodies of a kind are written today. */
export function versionOf(kind: RecordKind): number {
	return shapes[kind].version;
}

/** A body as JSON; what is written reads back the same, or it is our own mistake. */
export function encodeBody<K extends RecordKind>(kind: K, body: Bodies[K]): Json {
	const shape = shapes[kind].shape as Shape<Bodies[K]>;
	const json = shape.write(body);
	const read = readAs(shape, json);
	assert(read.ok, `a ${kind} that does not read back: ${read.ok ? '' : JSON.stringify(read.problem)}`);
	return json;
}

/** The body of a record, fully checked. Version 1 is the only one there is; an upgrade of an older one will stand here. */
export function decodeBody<K extends RecordKind>(kind: K, version: number, json: Json): Result<Bodies[K], BodyProblem> {
	const { version: known, shape } = shapes[kind];
	if (version > known) return fail({ kind: 'record-newer', record: kind, version, known });
	return readAs(shape as Shape<Bodies[K]>, json);
}

/** As decodeBody, for a kind read from a file. */
export function checkBody(kind: string, version: number, json: Json | null): BodyProblem | null {
	if (!isRecordKind(kind)) return { kind: 'record-newer', record: kind, version, known: 0 };
	const known = versionOf(kind);
	if (version > known) return { kind: 'record-newer', record: kind, version, known };
	if (json === null) return null;
	const read = decodeBody(kind, version, json);
	return read.ok ? null : read.problem;
}
