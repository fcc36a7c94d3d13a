import { describe, expect, it } from 'vitest';
import { claimOf, densityRange, families, familiesOf } from '../../../src/trade/metal/families.ts';
import { idealDensity } from '../../../src/trade/metal/density.ts';
import { metals } from '../../../src/trade/metal/metals.ts';

describe('what the balance is made of', () => {
	it('has corners that are whole', () => {
		for (const { corners } of families) {
			for (const corner of corners) expect(Object.values(corner).reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
		}
		expect(familiesOf('Au').reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 12);
		for (const metal of ['Ag', 'Pt', 'Pd'] as const) expect(familiesOf(metal).length).toBe(1);
	});

	it('has its densest and its lightest alloy at corners: a hundred mixtures of them lie between', () => {
		for (const family of families) {
			for (const perMille of [333, 585, 750, 917]) {
				const { low, high } = densityRange(family, perMille);
				for (let step = 0; step < 100; step += 1) {
					const weights = family.corners.map((_, index) => 1 + ((step * (index + 3)) % 17));
					const total = weights.reduce((sum, weight) => sum + weight, 0);
					const parts = family.corners.flatMap((corner, index) =>
						Object.entries(corner).map(([metal, share]) => ({
							share: ((1 - perMille / 1000) * share * weights[index]!) / total,
							density: metals[metal as keyof typeof metals].density
						}))
					);
					const density = idealDensity([{ share: perMille / 1000, density: metals[family.metal].density }, ...parts]);
					expect(density).toBeGreaterThanOrEqual(low - 1e-9);
					expect(density).toBeLessThanOrEqual(high + 1e-9);
				}
			}
		}
	});

	it('works out a family that is not in the table', () => {
		const alone = { ...families[0]!, corners: [{ Ag: 1 }, { Cu: 1 }] };
		const { low, high } = densityRange(alone, 500);
		expect(low).toBeCloseTo(1 / (0.5 / metals.Au.density + 0.5 / metals.Cu.density), 12);
		expect(high).toBeCloseTo(1 / (0.5 / metals.Au.density + 0.5 / metals.Ag.density), 12);
	});

	it('orders 14 kt: white with nickel is light, white with palladium heavy, red lighter than yellow than green', () => {
		const middle = (id: string) => {
			const { low, high } = densityRange(families.find((family) => family.id === id)!, 585);
			return (low + high) / 2;
		};
		const order = ['white-nickel', 'red', 'yellow', 'green', 'white-palladium'];
		expect([...order].sort((a, b) => middle(a) - middle(b))).toEqual(order);
	});

	it('claims less the purer the alloy, and nothing of the pure metal', () => {
		for (const family of families) {
			expect(claimOf(family, 1000)).toEqual({ bias: 0, limit: 0 });
			expect(claimOf(family, 585)).toEqual({ bias: family.bias, limit: family.limit });
			expect(claimOf(family, 900).limit).toBeCloseTo(family.limit * 0.4, 12);
			const { low, high } = densityRange(family, 1000);
			expect([low, high]).toEqual([metals[family.metal].density, metals[family.metal].density]);
		}
	});
});
