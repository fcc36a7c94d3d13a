import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkOdds } from '../../../src/trade/evidence/odds.ts';
import { origins } from '../../../src/trade/evidence/origin.ts';
import { defaultPriors } from '../../../src/trade/evidence/priors.ts';

describe('odds', () => {
	it('that are the working defaults hold', () => {
		for (const origin of origins) expect(checkOdds(defaultPriors[origin])).toEqual({ ok: true, value: defaultPriors[origin] });
	});
	it('in whole tenths of a hundredth hold when, and only when, they are the whole (1 000 cases)', () => {
		const part = fc.integer({ min: 0, max: 1000 });
		fc.assert(
			fc.property(part, part, part, fc.integer({ min: -3, max: 3 }), (a, b, c, off) => {
				const rest = 1000 - a - b - c + off;
				fc.pre(rest >= 0 && rest <= 1000);
				const checked = checkOdds({ honest: a / 1000, under: b / 1000, other: c / 1000, layered: rest / 1000 });
				expect(checked.ok).toBe(off === 0);
				if (checked.ok) return;
				expect(checked.problem).toEqual({ kind: 'odds-not-whole', sum: expect.closeTo(1 + off / 1000, 9) as number });
			}),
			{ numRuns: 1_000 }
		);
	});
	it('are no less than nothing', () => {
		expect(checkOdds({ honest: 1.1, under: -0.1, other: 0, layered: 0 })).toMatchObject({ problem: { kind: 'odds-outside', hypothesis: 'honest', chance: 1.1 } });
		expect(checkOdds({ honest: 1, under: 0, other: -0, layered: 0 }).ok).toBe(true);
		expect(checkOdds({ honest: 1, under: Number.NaN, other: 0, layered: 0 })).toMatchObject({ problem: { kind: 'odds-outside', hypothesis: 'under' } });
	});
});
