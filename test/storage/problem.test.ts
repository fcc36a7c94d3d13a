import { Dexie } from 'dexie';
import { describe, expect, it } from 'vitest';
import { problemOf, StorageFailure } from '../../src/storage/problem.ts';

const named = (name: string, message = 'x') => Object.assign(new Error(message), { name });

describe('what an error of the database means', () => {
	it.each([
		[new DOMException('full', 'QuotaExceededError'), 'storage-quota'],
		[new Dexie.AbortError('aborted', named('QuotaExceededError')), 'storage-quota'],
		[new Dexie.QuotaExceededError('full'), 'storage-quota'],
		[named('DataError'), 'storage-quota'],
		[new Dexie.DatabaseClosedError('closed'), 'storage-lost'],
		[named('InvalidStateError', 'The database connection is closing.'), 'storage-lost'],
		[named('UnknownError', 'Connection to Indexed Database server lost. Refresh the page to try again'), 'storage-lost'],
		[new Dexie.AbortError('aborted', named('UnknownError', 'Connection is closing')), 'storage-lost'],
		[new Dexie.MissingAPIError('none'), 'storage-unavailable'],
		[named('SecurityError'), 'storage-unavailable'],
		[named('UnknownError', 'Internal error opening backing store'), 'storage-failed'],
		[new Dexie.AbortError('aborted'), 'storage-failed'],
		[named('ConstraintError'), 'storage-failed'],
		['a text', 'storage-failed'],
		[null, 'storage-failed'],
		[undefined, 'storage-failed']
	])('%s is %s', (thrown, kind) => {
		expect(problemOf(thrown).kind).toBe(kind);
	});
	it('keeps the reason, at a bearable length', () => {
		expect(problemOf(named('OddError', 'y'.repeat(900)))).toEqual({ kind: 'storage-failed', reason: `OddError: ${'y'.repeat(290)}` });
	});
	it('is what a failure already says', () => {
		expect(problemOf(new StorageFailure({ kind: 'storage-busy' }))).toEqual({ kind: 'storage-busy' });
	});
});
