import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mass } from '../../../src/trade/mass/mass.ts';
import { fineMass, plusFine, type FineMass } from '../../../src/trade/metal/fine-mass.ts';
import { fromKarat, fromPerMille } from '../../../src/trade/metal/fineness.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exactToText, ratio } from '../../../src/trade/number/exact.ts';

describe('fine mass', () => {
	it('multiplies first and divides never: 12.40 g of 14 kt is 217/30 g', () => {
		expect(exactToText(fineMass(mass('12.40'), 'Au', fromKarat(decimal('14'))).grams)).toBe('217/30');
		expect(exactToText(fineMass(mass('12.40'), 'Au', fromPerMille(decimal('585'))).grams)).toBe('3627/500');
	});

	it('adds one metal exactly, in any order', () => {
		const grams = fc.integer({ min: 0, max: 1_000_000 }).map((n) => mass((n / 100).toFixed(2)));
		const karat = fc.integer({ min: 6, max: 24 }).map((k) => fromKarat(decimal(String(k))));
		const piece = fc.tuple(grams, karat).map(([m, k]) => fineMass(m, 'Au', k));
		const none: FineMass<'Au'> = fineMass(mass('0'), 'Au', fromPerMille(decimal('0')));
		fc.assert(
			fc.property(fc.array(piece, { minLength: 1, maxLength: 20 }), (pieces) => {
				const forward = pieces.reduce((a, b) => plusFine(a, b), none);
				const backward = [...pieces].reverse().reduce((a, b) => plusFine(a, b), none);
				const hundredths = pieces.reduce((total, { grams: g }) => total + (g.n * 24_000_000n) / g.d, 0n);
				expect(compareExact(forward.grams, backward.grams)).toBe(0);
				expect(compareExact(forward.grams, ratio(hundredths, 24_000_000n))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('never adds gold to silver', () => {
		const gold = fineMass(mass('1'), 'Au', fromPerMille(decimal('1000')));
		const silver = fineMass(mass('1'), 'Ag', fromPerMille(decimal('1000')));
		// hidden from the compiler, as when the metal comes out of a record
		const unknown: FineMass = silver;
		expect(() => plusFine<FineMass['metal']>(gold, unknown)).toThrow(/not one sum/);
	});
});
