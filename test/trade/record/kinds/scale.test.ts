import { describe, expect, it } from 'vitest';
import { decodeBody } from '../../../../src/trade/record/kind.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('a scale', () => {
	it('reads version 1 as it was written', () => {
		const { division, verification, ...rest } = frozenBody('scale');
		expect(rest).toEqual({ id: 'scale-1', name: 'Counter', unit: 'g', accuracyClass: 'II', checkedOn: '2026-09-01' });
		expect([division.toFixed(), verification.toFixed()]).toEqual(['0.01', '0.1']);
	});
	it('is checked field by field', () => expectEveryFieldChecked('scale'));
	it.each(['0', '-0.01'])('does not step by %s', (step) => {
		expect(decodeBody('scale', 1, changedAt(frozen('scale').body, ['division'], step)).ok).toBe(false);
		expect(decodeBody('scale', 1, changedAt(frozen('scale').body, ['verification'], step)).ok).toBe(false);
	});
	it('may be without a class', () => {
		expect(decodeBody('scale', 1, changedAt(frozen('scale').body, ['accuracyClass'], null)).ok).toBe(true);
	});
});
