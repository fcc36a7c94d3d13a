import { describe, expect, it } from 'vitest';
import { chainBreaks } from '../../src/trade/record/chain.ts';
import { decodeBody } from '../../src/trade/record/kind.ts';
import { readRecord } from '../../src/trade/record/record.ts';
import { frozen } from '../trade/record/kinds/frozen.ts';
import { record } from '../trade/record/some-records.ts';

describe('problems of records', () => {
	it('record-shape: a row without its time', () => {
		expect(readRecord({ ...frozen('lot'), at: 'yesterday' })).toEqual({
			ok: false,
			problem: { kind: 'record-shape', field: 'at', found: '"yesterday"' }
		});
	});
	it('record-body: a lot whose state is none of ours', () => {
		expect(decodeBody('lot', 1, { ...(frozen('lot').body as object), state: 'sold' })).toEqual({
			ok: false,
			problem: { kind: 'record-body', at: 'state', expected: 'one of open, bought, set-aside', found: '"sold"' }
		});
	});
	it('record-newer: a piece of a version to come', () => {
		expect(decodeBody('piece', 4, frozen('piece').body)).toEqual({
			ok: false,
			problem: { kind: 'record-newer', record: 'piece', version: 4, known: 2 }
		});
	});
	it('chain-gap: the record before is gone', () => {
		const missing = 'a'.repeat(64);
		expect(chainBreaks([record({ id: 'r2', previous: missing })])).toEqual([{ kind: 'chain-gap', device: 'phone-a', record: 'r2', missing }]);
	});
	it('chain-fork: two records after the same one', () => {
		expect(chainBreaks([record({ id: 'a1' }), record({ id: 'a2' })])).toEqual([{ kind: 'chain-fork', device: 'phone-a', record: 'a2', other: 'a1' }]);
	});
});
