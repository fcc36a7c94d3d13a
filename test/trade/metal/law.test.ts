import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareFineness, fromKarat, fromPerMille, perMilleNumber } from '../../../src/trade/metal/fineness.ts';
import { controlMarks, largestMark, legalMinimum, type LawId } from '../../../src/trade/metal/law.ts';
import { metalIds } from '../../../src/trade/metal/metals.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

const laws: readonly LawId[] = ['minimum', 'us-1981', 'us-before-1981'];

describe('the least lawful fineness', () => {
	it('never lies above the mark nor below zero, and solder never asks for more', () => {
		const mark = fc.integer({ min: 0, max: 10_000 }).map((n) => fromPerMille(decimal((n / 10).toFixed(1))));
		fc.assert(
			fc.property(mark, fc.constantFrom(...metalIds), fc.constantFrom(...laws), fc.boolean(), (fineness, metal, law, flat) => {
				const plain = legalMinimum({ metal, fineness }, law, { solder: false, watchCaseOrFlatware: flat });
				const soldered = legalMinimum({ metal, fineness }, law, { solder: true, watchCaseOrFlatware: flat });
				expect(compareFineness(plain, fineness)).toBeLessThanOrEqual(0);
				expect(compareFineness(soldered, plain)).toBeLessThanOrEqual(0);
				expect(perMilleNumber(soldered)).toBeGreaterThanOrEqual(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('takes nothing off platinum in any law', () => {
		const content = { metal: 'Pt', fineness: fromPerMille(decimal('950')) } as const;
		for (const law of laws) expect(perMilleNumber(legalMinimum(content, law, { solder: true, watchCaseOrFlatware: false }))).toBe(950);
	});
});

describe('the mark that a fineness may take', () => {
	it('is null under the lowest mark and for metals without marks', () => {
		expect(largestMark(fromPerMille(decimal('374.9')))).toBeNull();
		expect(largestMark(fromPerMille(decimal('999')), 'Cu')).toBeNull();
	});

	it('is never above the fineness, and no other mark fits between', () => {
		fc.assert(
			fc.property(fc.integer({ min: 3750, max: 10_000 }), (n) => {
				const fineness = fromPerMille(decimal((n / 10).toFixed(1)));
				const mark = largestMark(fineness)!;
				expect(compareFineness(mark, fineness)).toBeLessThanOrEqual(0);
				for (const other of controlMarks.Au!) {
					if (compareFineness(other, mark) > 0) expect(compareFineness(other, fineness)).toBe(1);
				}
			}),
			{ numRuns: 1_000 }
		);
	});

	it('gives 14 kt by karat only 375, because 14/24 is under 585', () => {
		expect(perMilleNumber(largestMark(fromKarat(decimal('14')))!)).toBe(375);
	});
});
