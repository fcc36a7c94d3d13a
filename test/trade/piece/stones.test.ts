import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { certain, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';
import { stoneDeduction } from '../../../src/trade/piece/deduction.ts';
import { caratsBySize, stoneCuts, stonesByWater, type StoneCut, type StoneSize } from '../../../src/trade/piece/stones.ts';

const size = (cut: StoneCut, [length, width, depth]: readonly [string, string, string], gravity: string, count = 1): StoneSize => ({
	cut, count, length: decimal(length), width: decimal(width), depth: decimal(depth), gravity: decimal(gravity)
});
const carats = (of: StoneSize) => {
	const result = caratsBySize(of);
	return result.ok ? result.value.toString() : result.problem.kind;
};

describe('stones by their size', () => {
	it.each([
		// by hand: 6 x 6 x 4 x 4.00 x factor, millimetres
		['round', '1.037'], ['oval', '1.152'], ['emerald-cut', '1.44'], ['pear', '1.037'], ['heart', '1.037'], ['cabochon', '1.555']
	] as const)('%s of 6 x 6 x 4 mm, gravity 4.00: %s ct', (cut, expected) => expect(carats(size(cut, ['6', '6', '4'], '4'))).toBe(expected));

	it('counts them, takes the mean of two diameters, and needs no gravity for diamonds', () => {
		expect(carats(size('round', ['6', '6', '4'], '4', 10))).toBe('10.368');
		expect(carats(size('oval', ['8', '6', '4'], '4'))).toBe('1.568');
		expect(carats(size('round-diamond', ['6', '6', '4'], '99'))).toBe('0.878');
		expect(stoneCuts.length).toBe(7);
	});

	it.each([
		[size('round', ['0', '6', '4'], '4'), 'stone-size-not-positive'], [size('round', ['6', '6', '400'], '4'), 'stone-size-too-large'],
		[size('round', ['6', '6', '4'], '19.3'), 'stone-gravity-unlikely'],
		[size('round', ['6', '6', '4'], '4', 0), 'stone-count-not-whole'],
		[size('round', ['6', '6', '4'], '4', 1.5), 'stone-count-not-whole']
	])('%#: refused', (of, kind) => expect(carats(of)).toBe(kind));

	it('is a deduction in grams with ten percent', () => {
		const of = size('round', ['6', '6', '4'], '4', 10);
		const result = stoneDeduction(of, '10 round 6 x 6 x 4');
		expect(result.ok && [result.value.mass.grams.toString(), result.value.u.toFixed(6), result.value.stones]).toEqual(['2.0736', '0.207360', of]);
		expect(stoneDeduction(size('round', ['6', '6', '4'], '4', 0), '').ok).toBe(false);
	});
});

describe('stones by water', () => {
	it('finds what was put together', () => {
		// 4 g of metal at 13 and 1 g of stone at 3.5
		const result = stonesByWater(uncertain(4 / 13 + 1 / 3.5, 'volume', 0.002), uncertain(5, 'mass', 0.01), uncertain(13, 'metal', 0.2), uncertain(3.5, 'stone', 0.05));
		if (!result.ok) throw new Error(result.problem.kind);
		expect(result.value.value).toBeCloseTo(1, 12);
		// each part of its doubt against a small step of that input
		const at = (volume: number, m: number, metal: number, stone: number) => (volume - m / metal) / (1 / stone - 1 / metal);
		const [v, step] = [4 / 13 + 1 / 3.5, 1e-6];
		const slopes = {
			volume: ((at(v + step, 5, 13, 3.5) - 1) / step) * 0.002, mass: ((at(v, 5 + step, 13, 3.5) - 1) / step) * 0.01,
			metal: ((at(v, 5, 13 + step, 3.5) - 1) / step) * 0.2, stone: ((at(v, 5, 13, 3.5 + step) - 1) / step) * 0.05
		};
		for (const [source, slope] of Object.entries(slopes)) expect(result.value.contributions[source]).toBeCloseTo(slope, 5);
	});

	it.each([
		[0.1, 5, 13, 3.5, 'stone-water-impossible'], [9, 5, 13, 3.5, 'stone-water-impossible'], [0.5, 5, 3.6, 3.5, 'stone-density-like-metal'],
		[0.5, 5, 13, 0, 'stone-density-like-metal']
	] as const)(
		'volume %f, mass %f, densities %f and %f: %s',
		(v, m, metal, stone, kind) => {
			const result = stonesByWater(certain(v), certain(m), certain(metal), certain(stone));
			expect(result.ok ? null : result.problem.kind).toBe(kind);
		}
	);
});
