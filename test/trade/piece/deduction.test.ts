import { describe, expect, it } from 'vitest';
import { mass } from '../../../src/trade/mass/mass.ts';
import {
	deductionKinds, fillerByDefault, FILLER_BY_DEFAULT, isDeductionKind, statedDeduction, totalDeduction, totalDeductionU
} from '../../../src/trade/piece/deduction.ts';

describe('what is not metal', () => {
	const two = [statedDeduction('stones', mass('0.30'), '0,30 g'), statedDeduction('springs', mass('0.40'), '0.40 g')];
	it('adds exactly', () => expect(totalDeduction(two).grams.toString()).toBe('0.7'));
	it('adds nothing to nothing', () => expect([totalDeduction([]).grams.toString(), totalDeductionU([])]).toEqual(['0', 0]));
	it('doubts add as squares', () => expect(totalDeductionU(two)).toBeCloseTo(0.05, 12));
	it('keeps how it was typed', () => expect(two.map(({ how }) => how)).toEqual(['0,30 g', '0.40 g']));
	it('takes nine tenths of a weighted piece for filler, and says that it is a default', () => {
		const filler = fillerByDefault(mass('412'));
		expect([filler.mass.grams.toString(), filler.how, filler.what]).toEqual(['370.8', FILLER_BY_DEFAULT, 'filler']);
		expect(filler.u).toBeCloseTo(12.36, 10);
	});
	it('knows its kinds', () => expect([deductionKinds.every(isDeductionKind), isDeductionKind('gold')]).toEqual([true, false]));
});
