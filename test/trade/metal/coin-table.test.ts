import { describe, expect, it } from 'vitest';
import { coinTable } from '../../../src/trade/metal/coin-table.ts';
import { fineMass } from '../../../src/trade/metal/fine-mass.ts';
import { coinById } from '../../../src/trade/metal/coins.ts';
import { compareExact, exact, toNumber } from '../../../src/trade/number/exact.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

const fine = (id: string) => {
	const coin = coinById(id)!;
	const [content] = coin.contents;
	return fineMass(coin.mass, content!.metal, content!.fineness).grams;
};

describe('the table of coins', () => {
	it('holds exactly one ounce fine in a Krugerrand, and the parts of it in its parts', () => {
		const ounce = decimal('31.1034768');
		const parts = [['krugerrand', '1'], ['krugerrand-half', '0.5'], ['krugerrand-quarter', '0.25'], ['krugerrand-tenth', '0.1']] as const;
		for (const [id, part] of parts) {
			expect(compareExact(fine(id), exact(ounce.times(decimal(part)))), id).toBe(0);
		}
	});

	it('keeps the multiples of a coin in proportion', () => {
		expect(toNumber(fine('us-double-eagle'))).toBeCloseTo(8 * toNumber(fine('us-2.5-gold')), 9);
		expect(toNumber(fine('us-half-90'))).toBeCloseTo(5 * toNumber(fine('us-dime-90')), 9);
		expect(toNumber(fine('uk-half-crown-925'))).toBeCloseTo(5 * toNumber(fine('uk-sixpence-925')), 4);
	});

	it('weighs no coin with more digits than grams can be typed with', () => {
		for (const { id, mass } of coinTable) expect(mass.grams.precision(), id).toBeLessThanOrEqual(15);
	});
});
