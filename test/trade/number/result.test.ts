import { expect, it } from 'vitest';
import { fail, ok } from '../../../src/trade/number/result.ts';

it('is either a value or a problem', () => {
	expect(ok(3)).toEqual({ ok: true, value: 3 });
	expect(fail({ kind: 'number-missing' })).toEqual({ ok: false, problem: { kind: 'number-missing' } });
});
