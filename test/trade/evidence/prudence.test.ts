import { describe, expect, it } from 'vitest';
import { checkPrudence, DEFAULT_PRUDENCE } from '../../../src/trade/evidence/prudence.ts';

describe('prudence', () => {
	it('is from an even chance to nearly sure', () => {
		for (const prudence of [0.5, DEFAULT_PRUDENCE, 0.99]) expect(checkPrudence(prudence)).toEqual({ ok: true, value: prudence });
		for (const prudence of [0.499, 0.991, 0, 1, 80, Number.NaN]) {
			expect(checkPrudence(prudence)).toEqual({ ok: false, problem: { kind: 'prudence-outside', prudence, least: 0.5, most: 0.99 } });
		}
	});
});
