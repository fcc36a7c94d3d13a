import { describe, expect, it } from 'vitest';
import { touchObservation } from '../../../src/trade/evidence/touch.ts';
import { karat, touch } from './some-findings.ts';

const values = (parts: Parameters<typeof touch>[0]) => touchObservation(touch(parts)).streak!.values;

describe('a streak', () => {
	it('lies between the acid that was withstood and the one that attacked', () => {
		const streak = values({ holds: karat(14), attackedBy: karat(18), gross: 0 });
		// an acid is made so that its own standard withstands it: one edge above where half of all streaks do
		expect(streak[Math.round(1750 / 3) - 15]).toBeCloseTo(0.5, 1);
		expect(streak[583]).toBeCloseTo(0.84, 1);
		expect(streak[650]).toBeCloseTo(1, 3);
		expect(streak[750]).toBeCloseTo(0.16, 1);
		expect(streak[417]!).toBeLessThan(1e-9);
	});

	it('adds up to one over its outcomes, for every fineness', () => {
		const outcomes = [
			values({ holds: null, attackedBy: karat(14) }),
			values({ holds: karat(14), attackedBy: karat(18) }),
			values({ holds: karat(18), attackedBy: null })
		];
		for (const cell of [0, 417, 570, 585, 740, 999]) {
			// two of the outcomes are of one acid alone, whose slip is shared by two
			expect(outcomes.reduce((sum, each) => sum + each[cell]!, 0)).toBeCloseTo(0.98 + 0.01 + 0.02 / 3 + 0.01, 9);
		}
	});

	it('is kept apart by how it was drawn', () => {
		expect(touchObservation(touch({ how: 'notch' })).streak!.how).toBe('notch');
	});
});
