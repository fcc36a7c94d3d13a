import { describe, expect, it } from 'vitest';
import { stonesInWater } from '../../../src/trade/piece/stones-in-water.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

/** 10 g of 14 kt (13.3 g/cm³) around 2 g of corundum (4.0): 0.7519 + 0.5 cm³, borne up by water of 20 °C less air. */
const lift = (10 / 13.3 + 2 / 4) * (0.998207 - 0.0012);
const readings = { method: 'beaker' as const, air: decimal('12'), water: decimal(lift.toFixed(4)), division: decimal('0.001'), temperature: decimal('20') };

describe('stones by water', () => {
	it('are found through a closed setting, with their doubt', () => {
		const found = stonesInWater({ ...readings, metalDensity: 13.3, stoneDensity: 4 }, 'by water');
		if (!found.ok) throw new Error(found.problem.kind);
		expect(found.value.what).toBe('stones');
		expect(Math.abs(found.value.mass.grams.toNumber() - 2)).toBeLessThan(0.003);
		// 2 % of the metal's density moves 10 g / 13.3 of volume, over a gap of 1/4 − 1/13.3: 0.086 g
		expect(Math.abs(found.value.u - 0.086)).toBeLessThan(0.01);
	});
	it('are none where the metal alone is lighter, and unknown where stone and metal weigh alike', () => {
		const heavy = stonesInWater({ ...readings, metalDensity: 8, stoneDensity: 4 }, '');
		expect(heavy).toMatchObject({ ok: false, problem: { kind: 'stone-water-impossible' } });
		expect(stonesInWater({ ...readings, metalDensity: 4.1, stoneDensity: 4 }, '')).toMatchObject({ ok: false, problem: { kind: 'stone-density-like-metal' } });
		expect(stonesInWater({ ...readings, air: decimal('0'), metalDensity: 13, stoneDensity: 4 }, '')).toMatchObject({ ok: false });
	});
});
