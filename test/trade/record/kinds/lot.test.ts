import { describe, expect, it } from 'vitest';
import { decodeBody } from '../../../../src/trade/record/kind.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('a lot', () => {
	it('reads version 1 as it was written', () => {
		expect(frozenBody('lot')).toEqual({
			name: 'Tuesday, second seller',
			note: 'box of odds',
			state: 'open',
			purchase: null,
			sheet: 'sheet-1',
			openedAt: 1_790_000_000_000,
			ask: '1.250'
		});
	});
	it('is checked field by field', () => expectEveryFieldChecked('lot'));
	it('has one of three states', () => {
		const { body } = frozen('lot');
		for (const state of ['open', 'bought', 'set-aside']) expect(decodeBody('lot', 1, changedAt(body, ['state'], state)).ok).toBe(true);
		expect(decodeBody('lot', 1, changedAt(body, ['state'], 'lost'))).toMatchObject({ problem: { at: 'state', found: '"lost"' } });
	});
});
