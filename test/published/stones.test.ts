import { describe, expect, it } from 'vitest';
import { decimal } from '../../src/trade/number/decimal.ts';
import { mass } from '../../src/trade/mass/mass.ts';
import { stoneDeduction } from '../../src/trade/piece/deduction.ts';
import { caratsBySize, type StoneCut } from '../../src/trade/piece/stones.ts';

// A brilliant of 6.5 x 6.5 x 3.9 mm, specific gravity 3.52, worked by both printed formulas:
// diameter² x depth x 0.0061 = 1.005 ct; diameter² x depth x specific gravity x 0.0018 = 1.044 ct.
// Source: printed gemmology formulas for stones in their settings (seen in a copy).
const stone = (cut: StoneCut) => ({
	cut, count: 1, length: decimal('6.5'), width: decimal('6.5'), depth: decimal('3.9'), gravity: decimal('3.52')
});
const carats = (cut: StoneCut) => {
	const result = caratsBySize(stone(cut));
	return result.ok ? result.value.toString() : result.problem.kind;
};

describe('stones in their settings, printed gemmology formulas', () => {
	it('the diamond formula gives 1.005 ct', () => expect(carats('round-diamond')).toBe('1.005'));
	it('the general formula for round stones gives 1.044 ct', () => expect(carats('round')).toBe('1.044'));
	// the carat of 0.2 g: 4th General Conference on Weights and Measures (1907), from memory
	it('1.005 ct is 0.201 g, and the two formulas agree within the stated 10 %', () => {
		const [diamond, general] = [stoneDeduction(stone('round-diamond'), ''), stoneDeduction(stone('round'), '')];
		if (!diamond.ok || !general.ok) throw new Error('no deduction');
		expect(diamond.value.mass).toEqual(mass('0.201'));
		expect(general.value.mass.grams.minus(diamond.value.mass.grams).toNumber()).toBeLessThan(diamond.value.u);
	});
});
