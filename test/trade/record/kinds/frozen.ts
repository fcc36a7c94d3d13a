import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { expect } from 'vitest';
import { canonicalJson, type Json } from '../../../../src/trade/record/json.ts';
import { decodeBody, encodeBody, versionOf, type Bodies, type RecordKind } from '../../../../src/trade/record/kind.ts';
import { canonicalText, readRecord, type StoredRecord } from '../../../../src/trade/record/record.ts';

/** A record as a version wrote it, from its frozen file; its hash is recomputed by another route than the app's. */
export function frozen(kind: RecordKind, version = 1): StoredRecord {
	const file = new URL(`../../../records/v${version}/${kind}.json`, import.meta.url);
	const read = readRecord(JSON.parse(readFileSync(file, 'utf8')));
	if (!read.ok) throw new Error(`${kind}: ${JSON.stringify(read.problem)}`);
	const record = read.value;
	expect(createHash('sha256').update(canonicalText(record)).digest('hex')).toBe(record.hash);
	return record;
}

/** The body of a frozen record by today's code, which must write it again to the last character. */
export function frozenBody<K extends RecordKind>(kind: K, of = 1): Bodies[K] {
	const { version, body } = frozen(kind, of);
	const read = decodeBody(kind, version, body);
	if (!read.ok) throw new Error(`${kind}: ${JSON.stringify(read.problem)}`);
	expect(canonicalJson(encodeBody(kind, read.value))).toBe(canonicalJson(body));
	return read.value;
}

/** The body of a frozen record of an older version, as today's code upgrades it: what it then writes reads back the same. */
export function upgradedBody<K extends RecordKind>(kind: K, of = 1): Bodies[K] {
	const { version, body } = frozen(kind, of);
	expect(version).toBeLessThan(versionOf(kind));
	const read = decodeBody(kind, version, body);
	if (!read.ok) throw new Error(`${kind}: ${JSON.stringify(read.problem)}`);
	expect(decodeBody(kind, versionOf(kind), encodeBody(kind, read.value))).toEqual(read);
	return read.value;
}

/** The value without or with another value at one place. */
export function changedAt(value: Json, path: readonly (string | number)[], to: Json | undefined): Json {
	const [key, ...rest] = path;
	if (key === undefined) return to ?? null;
	const copy = structuredClone(value) as Record<string | number, Json>;
	if (rest.length === 0 && to === undefined) delete copy[key];
	else copy[key] = changedAt((value as Record<string | number, Json>)[key]!, rest, to);
	return copy as Json;
}

/** Every place in a value at which something stands. */
export function placesIn(value: Json, path: readonly (string | number)[] = []): (string | number)[][] {
	if (typeof value !== 'object' || value === null) return [];
	return Object.keys(value).flatMap((key) => {
		const here = [...path, Array.isArray(value) ? Number(key) : key];
		return [here, ...placesIn((value as Record<string, Json>)[key]!, here)];
	});
}

/** Something that no field takes. */
const WRONG: Json = [{ nonsense: -1.5 }];

/** At every place of the frozen body a value of the wrong kind is refused, and the problem says where; a field too many as well, but in `named`. */
export function expectEveryFieldChecked(kind: RecordKind, version = 1, named?: string): void {
	const { body } = frozen(kind, version);
	const places = placesIn(body);
	expect(places.length).toBeGreaterThan(4);
	for (const place of places) {
		const read = decodeBody(kind, version, changedAt(body, place, WRONG));
		expect(read.ok, place.join('.')).toBe(false);
		if (read.ok || read.problem.kind !== 'record-body') throw new Error(`${place.join('.')} was not checked`);
		expect(read.problem.at.startsWith(String(place[0])), `${place.join('.')}: ${read.problem.at}`).toBe(true);
	}
	for (const place of places.filter((each) => typeof each.at(-1) === 'string' && each.slice(0, -1).join('.') !== named)) {
		const added = changedAt(body, [...place.slice(0, -1), 'unheardOf'], 1);
		expect(decodeBody(kind, version, added).ok, `${place.join('.')} and a stranger`).toBe(false);
	}
}
