import { describe, expect, it } from 'vitest';
import { claimOf, densityRange, families, familiesOf } from '../../../src/trade/metal/families.ts';
import { idealDensity, mixingClaim } from '../../../src/trade/metal/density.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import { metals, type MetalId } from '../../../src/trade/metal/metals.ts';

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

	it('claims as much as the claim of each alloy that it covers, as long as no zinc is in it', () => {
		let seen = 0;
		for (const family of families.filter(({ metal }) => metal !== 'Pt' && metal !== 'Pd')) {
			for (const corner of family.corners.filter(({ Zn = 0 }) => Zn === 0 || family.id === 'white-nickel')) {
				for (const perMille of [375, 585, 750, 917, 990]) {
					const balance = Object.entries(corner) as [MetalId, number][];
					const parts: [MetalId, number][] = [[family.metal, perMille], ...balance.map(([metal, share]): [MetalId, number] => [metal, (1000 - perMille) * share])];
					const alloyed = mixingClaim(parts.map(([metal, of]) => ({ metal, share: ratio(decimal(of.toFixed(6)), 1000n) })));
					const { bias, limit } = claimOf(family, perMille);
					expect(bias - limit, `${family.id} ${perMille}`).toBeLessThanOrEqual(alloyed.bias - alloyed.limit + 1e-6);
					expect(bias + limit, `${family.id} ${perMille}`).toBeGreaterThanOrEqual(alloyed.bias + alloyed.limit - 1e-6);
					seen += 1;
				}
			}
		}
		expect(seen).toBeGreaterThan(60);
	});

	it('claims less the purer the alloy, and nothing of the pure metal', () => {
		for (const family of families) {
			expect(claimOf(family, 1000)).toEqual({ bias: 0, limit: 0 });
			// whole at equal atoms; platinum with palladium is nearly there
			const { bias, limit } = claimOf(family, 585);
			expect(limit).toBeLessThanOrEqual(family.limit);
			expect(limit).toBeGreaterThan(0.98 * family.limit);
			expect(bias).toBeCloseTo((family.bias * limit) / family.limit, 12);
			const falling = [585, 900, 950, 990, 999].map((perMille) => claimOf(family, perMille).limit);
			expect([...falling].sort((a, b) => b - a)).toEqual(falling);
			expect(claimOf(family, 990).limit).toBeLessThan(0.25 * family.limit);
			const { low, high } = densityRange(family, 1000);
			expect([low, high]).toEqual([metals[family.metal].density, metals[family.metal].density]);
		}
	});
});
