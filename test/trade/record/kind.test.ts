import { describe, expect, it } from 'vitest';
import { checkBody, decodeBody, encodeBody, isRecordKind, recordKinds, versionOf } from '../../../src/trade/record/kind.ts';
import { frozen, frozenBody } from './kinds/frozen.ts';

describe('kinds of record', () => {
	it('all have a frozen file of each of their versions', () => {
		expect(recordKinds).toEqual(['lot', 'piece', 'prices', 'purchase', 'settings', 'scale', 'tester']);
		for (const kind of recordKinds) {
			for (let each = 1; each <= versionOf(kind); each += 1) {
				const { version, body } = frozen(kind, each);
				expect([kind, version]).toEqual([kind, each]);
				expect(checkBody(kind, version, body)).toBeNull();
			}
		}
	});
	it('do not take inherited names', () => {
		for (const name of ['toString', 'constructor', '__proto__', '']) expect(isRecordKind(name)).toBe(false);
	});
	it('say that a version is newer instead of misreading it', () => {
		expect(decodeBody('lot', 2, frozen('lot').body)).toEqual({ ok: false, problem: { kind: 'record-newer', record: 'lot', version: 2, known: 1 } });
		expect(checkBody('lot', 9, null)).toMatchObject({ kind: 'record-newer', version: 9 });
	});
	it('say that a kind is newer', () => {
		expect(checkBody('melt', 1, {})).toEqual({ kind: 'record-newer', record: 'melt', version: 1, known: 0 });
	});
	it('take a deletion of any kind', () => {
		for (const kind of recordKinds) expect(checkBody(kind, 1, null)).toBeNull();
	});
	it('never write what they could not read', () => {
		const { piece, ...rest } = frozenBody('piece', 2);
		expect(() => encodeBody('piece', { ...rest, piece: { ...piece, count: 0 } })).toThrow('a piece that does not read back');
	});
});
