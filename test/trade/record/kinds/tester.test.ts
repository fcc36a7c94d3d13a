import { describe, expect, it } from 'vitest';
import { decodeBody } from '../../../../src/trade/record/kind.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('a tester', () => {
	it('reads version 1 as it was written', () => {
		const { name, kind, rows, bias } = frozenBody('tester');
		expect([name, kind, rows.length, bias]).toEqual(['Back room', 'fluorescence', 2, 2]);
	});
	it('is checked field by field', () => expectEveryFieldChecked('tester'));
	it.each([
		['no name', ['name'], ' '],
		['no figures', ['rows'], []],
		['a bias that is more than all of its doubt', ['bias'], 13]
	])('is refused with %s', (_, place, value) => {
		expect(decodeBody('tester', 1, changedAt(frozen('tester').body, place, value))).toMatchObject({ ok: false, problem: { kind: 'record-body' } });
	});
});
