import { assert } from '../number/decimal.ts';
import { fail, type Result } from '../number/result.ts';
import type { Tester } from '../evidence/tester.ts';
import type { Scale } from '../mass/scale.ts';
import type { PriceSheet } from '../price/price-sheet.ts';
import type { Json } from './json.ts';
import { lotShape, type LotBody } from './kinds/lot.ts';
import { pieceShape, pieceShape1, type PieceBody } from './kinds/piece.ts';
import { pricesShape } from './kinds/prices.ts';
import { purchaseShape, type PurchaseBody } from './kinds/purchase.ts';
import { scaleShape } from './kinds/scale.ts';
import { settingsFrom1, settingsShape, settingsShape1, type SettingsBody } from './kinds/settings.ts';
import { testerShape } from './kinds/tester.ts';
import { readAs, upgraded, type Reader, type Shape, type ShapeProblem } from './shape.ts';

/** What each kind of record holds. */
export type Bodies = {
	readonly lot: LotBody;
	readonly piece: PieceBody;
	readonly prices: PriceSheet;
	readonly purchase: PurchaseBody;
	readonly settings: SettingsBody;
	readonly scale: Scale;
	readonly tester: Tester;
};

export type RecordKind = keyof Bodies;

export type BodyProblem =
	| ShapeProblem
	/** A kind, or a version of a kind, that only a newer app knows. */
	| { readonly kind: 'record-newer'; readonly record: string; readonly version: number; readonly known: number };

/** The shape of a kind as it is written today, and how each version before it is read, the first of them first. */
type Versions<T> = { readonly shape: Shape<T>; readonly older: readonly Reader<T>[] };

const shapes: { readonly [K in RecordKind]: Versions<Bodies[K]> } = {
	lot: { shape: lotShape, older: [] },
	piece: { shape: pieceShape, older: [pieceShape1] },
	prices: { shape: pricesShape, older: [] },
	purchase: { shape: purchaseShape, older: [] },
	settings: { shape: settingsShape, older: [upgraded(settingsShape1, settingsFrom1)] },
	scale: { shape: scaleShape, older: [] },
	tester: { shape: testerShape, older: [] }
};

export const recordKinds = Object.keys(shapes) as readonly RecordKind[];

export function isRecordKind(kind: string): kind is RecordKind {
	return Object.hasOwn(shapes, kind);
}

/** The version in which bodies of a kind are written today. */
export function versionOf(kind: RecordKind): number {
	return shapes[kind].older.length + 1;
}

/** A body as JSON; what is written reads back the same, or it is our own mistake. */
export function encodeBody<K extends RecordKind>(kind: K, body: Bodies[K]): Json {
	const shape = shapes[kind].shape as Shape<Bodies[K]>;
	const json = shape.write(body);
	const read = readAs(shape, json);
	assert(read.ok, `a ${kind} that does not read back: ${read.ok ? '' : JSON.stringify(read.problem)}`);
	return json;
}

/** The body of a record, fully checked. One of an older version is read as that version was, and becomes one of today's. */
export function decodeBody<K extends RecordKind>(kind: K, version: number, json: Json): Result<Bodies[K], BodyProblem> {
	const { shape, older } = shapes[kind] as Versions<Bodies[K]>;
	const known = versionOf(kind);
	if (version > known) return fail({ kind: 'record-newer', record: kind, version, known });
	return readAs(older[version - 1] ?? shape, json);
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
