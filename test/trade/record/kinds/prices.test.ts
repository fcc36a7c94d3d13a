import { describe, expect, it } from 'vitest';
import { decodeBody } from '../../../../src/trade/record/kind.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('a price sheet', () => {
	it('reads version 1 as it was written', () => {
		const { currency, quotes, at, source } = frozenBody('prices');
		expect([currency, at, source]).toEqual(['EUR', 1_790_000_000_000, 'typed at the stall']);
		expect(quotes.map(({ metal, amount, per }) => [metal, amount.toFixed(), per])).toEqual([
			['Au', '3512.45', 'ozt'],
			['Ag', '1.234', 'g']
		]);
	});
	it('is checked field by field', () => expectEveryFieldChecked('prices'));
	it.each([
		['currency', 'EURO'],
		['currency', 'eur'],
		['quotes', [{ metal: 'Xx', amount: '1', per: 'g' }]],
		['quotes', [{ metal: 'toString', amount: '1', per: 'g' }]],
		['quotes', [{ metal: 'Au', amount: '1', per: 'ounce' }]],
		['quotes', [{ metal: 'Au', amount: '0', per: 'g' }]],
		['quotes', [{ metal: 'Au', amount: '-3', per: 'g' }]],
		['quotes', [{ metal: 'Au', amount: '3', per: 'g' }, { metal: 'Au', amount: '4', per: 'g' }]],
		['quotes', []]
	])('does not take %s %j', (field, value) => {
		expect(decodeBody('prices', 1, changedAt(frozen('prices').body, [field], value)).ok).toBe(false);
	});
});
