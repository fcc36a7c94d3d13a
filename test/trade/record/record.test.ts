import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalText, readRecord } from '../../../src/trade/record/record.ts';
import { record } from './some-records.ts';

const whole = record({ id: '01J-0000', previous: 'a'.repeat(64) });

describe('a record', () => {
	it('is read as it is', () => {
		expect(readRecord(JSON.parse(JSON.stringify(whole)))).toEqual({ ok: true, value: whole });
	});
	it.each([
		['id', ''],
		['id', 'a b'],
		['id', 'x'.repeat(81)],
		['kind', 7],
		['version', 0],
		['version', 1.5],
		['subject', null],
		['replaces', '01J-0000'],
		['replaces', undefined],
		['settles', 'r1'],
		['settles', ['01J-0000']],
		['at', -1],
		['at', '2026-01-01'],
		['device', ''],
		['body', undefined],
		['body', { when: new Date(0) }],
		['previous', 'abc'],
		['hash', 'A'.repeat(64)]
	])('is refused when its %s is %j', (field, value) => {
		const read = readRecord({ ...whole, [field]: value });
		expect(read).toMatchObject({ ok: false, problem: { kind: 'record-shape', field } });
	});
	it('is refused with a field that nobody knows', () => {
		expect(readRecord({ ...whole, colour: 'red' })).toEqual({ ok: false, problem: { kind: 'record-shape', field: 'colour', found: '"red"' } });
	});
	it.each([null, undefined, 7, 'x', [], [whole]])('is not %j', (value) => {
		expect(readRecord(value).ok).toBe(false);
	});
	it('is never read from anything else without a reason', () => {
		fc.assert(
			fc.property(fc.anything(), (value) => {
				const read = readRecord(value);
				expect(read.ok ? '' : read.problem.kind).toBe('record-shape');
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('the text that is hashed', () => {
	it('holds everything but the hash, in one order', () => {
		const turned = Object.fromEntries(Object.entries(whole).reverse()) as typeof whole;
		expect(canonicalText(turned)).toBe(canonicalText(whole));
		expect(Object.keys(JSON.parse(canonicalText(whole)) as object).sort()).toEqual(
			Object.keys(whole)
				.filter((key) => key !== 'hash')
				.sort()
		);
	});
	it.each(['id', 'kind', 'version', 'subject', 'replaces', 'settles', 'at', 'device', 'body', 'previous'] as const)('changes with %s', (field) => {
		const other = { settles: ['r9'], version: 2, at: 2, body: null }[field as 'at'] ?? 'other';
		expect(canonicalText({ ...whole, [field]: other })).not.toBe(canonicalText(whole));
	});
});
