import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { alloy, commonAlloys, type Share } from '../../../src/trade/metal/alloy.ts';
import { densityOf, idealDensity, mixingClaim } from '../../../src/trade/metal/density.ts';
import { metalIds, metals } from '../../../src/trade/metal/metals.ts';
import { exact, ratio } from '../../../src/trade/number/exact.ts';
import { correlation, standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';

const pure = (metal: Share['metal']): { shares: readonly Share[] } => ({ shares: [{ metal, share: exact(1n) }] });

/** Random alloys of two to five metals with whole parts in a thousand. */
const alloys = fc
	.tuple(
		fc.uniqueArray(fc.constantFrom(...metalIds), { minLength: 2, maxLength: 5 }),
		fc.array(fc.bigInt({ min: 1n, max: 999n }), { minLength: 5, maxLength: 5 })
	)
	.map(([ids, parts]) => {
		const all = ids.reduce((total, _, index) => total + parts[index]!, 0n);
		return { shares: ids.map((metal, index) => ({ metal, share: ratio(parts[index]!, all) })) };
	});

describe('the density of an alloy', () => {
	it('is the metal itself when it is pure, with the doubt of its table row', () => {
		for (const id of metalIds) {
			const density = densityOf(pure(id));
			expect(density.value).toBeCloseTo(metals[id].density, 12);
			expect(standardUncertainty(density)).toBeCloseTo(metals[id].densityU, 12);
		}
	});

	it('lies between the densities of its metals, ideal and corrected', () => {
		fc.assert(
			fc.property(alloys, (mix) => {
				const densities = mix.shares.map(({ metal }) => metals[metal].density);
				const parts = mix.shares.map(({ metal, share }) => ({ share: Number(share.n) / Number(share.d), density: metals[metal].density }));
				for (const value of [densityOf(mix).value, idealDensity(parts)]) {
					expect(value).toBeGreaterThanOrEqual(Math.min(...densities) - 1e-9);
					expect(value).toBeLessThanOrEqual(Math.max(...densities) + 1e-9);
				}
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is never above the arithmetic mean when volumes add', () => {
		fc.assert(
			fc.property(alloys, (mix) => {
				const parts = mix.shares.map(({ metal, share }) => ({ share: Number(share.n) / Number(share.d), density: metals[metal].density }));
				const arithmetic = parts.reduce((total, part) => total + part.share * part.density, 0);
				expect(idealDensity(parts)).toBeLessThanOrEqual(arithmetic + 1e-9);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('names the family, its bias and its limit, which fade toward a pure metal', () => {
		const mix = (ag: bigint) => [
			{ metal: 'Ag' as const, share: ratio(ag, 1000n) },
			{ metal: 'Cu' as const, share: ratio(1000n - ag, 1000n) }
		];
		expect(mixingClaim(mix(500n)).family).toBe('Ag-Cu');
		expect(mixingClaim(mix(999n)).limit).toBeLessThan(mixingClaim(mix(925n)).limit);
		expect(mixingClaim(mix(1000n))).toEqual({ family: 'pure', bias: 0, limit: 0 });
		expect(mixingClaim(commonAlloys.brass.shares).family).toBe('others');
		expect(mixingClaim(commonAlloys.crownGold.shares).bias).toBeLessThan(0);
	});

	it('has a sensitivity to each metal that a small step of its density confirms', () => {
		const parts = [
			{ share: 0.75, density: 19.3 },
			{ share: 0.15, density: 10.5 },
			{ share: 0.1, density: 8.95 }
		];
		const mix = alloy('18 kt', [
			{ metal: 'Au', share: ratio(75n, 100n) },
			{ metal: 'Ag', share: ratio(15n, 100n) },
			{ metal: 'Cu', share: ratio(10n, 100n) }
		]);
		expect(mix.ok).toBe(true);
		const density = densityOf(mix.ok ? mix.value : pure('Au'));
		(['Au', 'Ag', 'Cu'] as const).forEach((id, index) => {
			const h = 1e-5;
			const moved = parts.map((part, i) => (i === index ? { ...part, density: part.density + h } : part));
			const slope = (idealDensity(moved) - idealDensity(parts)) / h;
			expect(density.contributions[`density:${id}`]! / metals[id].densityU).toBeCloseTo(slope, 4);
		});
	});

	it('shares the doubt of gold between two gold alloys', () => {
		const shared = correlation(densityOf(commonAlloys.yellowGold), densityOf(commonAlloys.crownGold));
		expect(shared).toBeGreaterThan(0);
		expect(shared).toBeLessThan(1);
	});

	it('refuses shares that are no whole', () => {
		expect(() => idealDensity([{ share: 0.5, density: 10 }])).toThrow(/sum to one/);
		expect(() => idealDensity([{ share: 1, density: 0 }])).toThrow(/density of zero/);
	});
});
