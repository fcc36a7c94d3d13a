import { describe, expect, it } from 'vitest';
import { toNumber } from '../../src/trade/number/exact.ts';
import { chanceOfAtMost, chanceOfMissing } from '../../src/trade/lot/sample.ts';

const chance = (result: ReturnType<typeof chanceOfMissing>) => {
	if (!result.ok) throw new Error(result.problem.kind);
	return toNumber(result.value);
};

describe('sampling without putting back', () => {
	// 6 of 49 numbers: the chance to match none is 0.435965 (43 596 498 in 100 million), all six 1 in 13 983 816.
	// Source: the printed odds of a 6-of-49 lottery, from memory.
	it('a 6-of-49 lottery: no number 0.435965, all six 1 in 13 983 816', () => {
		expect(chance(chanceOfMissing(49, 6, 6))).toBeCloseTo(0.435965, 6);
		const five = chanceOfAtMost(5, 49, 6, 6);
		expect(five.ok && five.value.d - five.value.n).toBe(five.ok ? five.value.d / 13_983_816n : 0n);
	});

	// "Lady tasting tea": 4 of 8 cups all right by chance is 1 in 70.
	// Source: R. A. Fisher, The Design of Experiments (1935), chapter II, from memory.
	it('Fisher\'s tea: all four cups by chance is 1 in 70', () => {
		expect(chance(chanceOfMissing(8, 4, 4))).toBeCloseTo(1 / 70, 15);
	});

	// Electronic components in lots of N = 25, five tested, accepted if none is bad: with two bad in the lot 0.6333.
	// Source: "Acceptance Sampling: An Application of the Hypergeometric Distribution", a course handout (seen in a copy).
	it('acceptance sampling: N 25, two bad, five tested passes with 0.6333', () => {
		expect(chance(chanceOfMissing(25, 2, 5))).toBeCloseTo(0.6333, 4);
		// by hand: 20 x 19 / (25 x 24)
		expect(chance(chanceOfMissing(25, 2, 5))).toBeCloseTo(380 / 600, 12);
	});

	it('drawing one after another in floating point gives the same: N 50, five bad, ten tested', () => {
		let none = 1;
		for (let i = 0; i < 10; i += 1) none *= (45 - i) / (50 - i);
		let one = 10 * 5;
		for (let i = 0; i < 9; i += 1) one *= 45 - i;
		for (let i = 0; i < 10; i += 1) one /= 50 - i;
		expect(chance(chanceOfMissing(50, 5, 10))).toBeCloseTo(none, 12);
		expect(chance(chanceOfAtMost(1, 50, 5, 10))).toBeCloseTo(none + one, 12);
	});
});
