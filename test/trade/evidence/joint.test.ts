import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { joint, throughSurface, type Cases } from '../../../src/trade/evidence/joint.ts';

const v = (...values: number[]) => Float64Array.from(values);

/** Three cells: bulk nothing, half, whole. Every figure below is small enough to be worked by hand. */
const three: Cases = {
	solids: [
		{ id: 'honest', odds: 0.6, bulk: v(0, 0.5, 0.5) },
		{ id: 'under', odds: 0.2, bulk: v(0.25, 0.75, 0) }
	],
	// the surface is as fine as the bulk, or, one time in five, one cell finer
	enrichment: { first: 0, chances: v(0.8, 0.2) },
	surface: v(0.1, 0.4, 0.9),
	bulk: v(0.5, 0.2, 0.1),
	layered: {
		odds: 0.2,
		bulk: v(0.9, 0.1, 0),
		// an imitated surface of .5 in the middle and .5 on top: seen through 1 and through (.1, .4, .9); the cores .2 and 1
		strata: [
			{ chance: 0.4, bulk: v(0.05, 0.08, 0.09), outside: [1 * 0.2, 1 * 1] },
			{ chance: 0.6, bulk: v(0.5, 0.2, 0.1), outside: [0.65 * 0.2, 0.65 * 1] }
		],
		cores: [0.75, 0.25]
	}
};

describe('the joint estimate', () => {
	it('equals three cells worked by hand', () => {
		// surface seen from each bulk: .8 x .1 + .2 x .4 = .16; .8 x .4 + .2 x .9 = .5; .8 x .9 + .2 x .9 = .9
		// honest: .6 x (.5 x .2 x .5, .5 x .1 x .9) = (.03, .027); under: .2 x (.25 x .5 x .16, .75 x .2 x .5) = (.004, .015)
		// layered, cores .75 x .2 + .25 = .4; thin: surface .5 + .5 = 1, bulk .9 x .05 = .045 and .1 x .08 = .008, times .2 x .4 x .4 = .032
		//   -> (.00144, .000256); thick: surface .2 + .45 = .65, bulk .45 and .02, times .2 x .6 x .65 x .4 = .0312 -> (.01404, .000624)
		const cells = [0.004 + 0.00144 + 0.01404, 0.03 + 0.015 + 0.000256 + 0.000624, 0.027];
		const all = cells.reduce((sum, value) => sum + value, 0);
		const found = joint(three);
		expect(found.evidence).toBeCloseTo(0.09236, 12);
		found.bulk.forEach((share, cell) => expect(share).toBeCloseTo(cells[cell]! / all, 12));
		expect(found.odds.honest).toBeCloseTo(0.057 / 0.09236, 12);
		expect(found.odds.under).toBeCloseTo(0.019 / 0.09236, 12);
		expect(found.odds.other).toBe(0);
		expect(found.odds.layered).toBeCloseTo(0.01636 / 0.09236, 12);
		expect(found.cores[0]! / found.cores[1]!).toBeCloseTo(0.15 / 0.25, 12);
		expect(found.cores[0]! + found.cores[1]!).toBeCloseTo(found.odds.layered, 12);
	});

	it('equals the plain double sum over surface and bulk', () => {
		const share = fc.double({ min: 0.01, max: 1, noNaN: true });
		const vector = (cells: number) => fc.array(share, { minLength: cells, maxLength: cells }).map((values) => Float64Array.from(values));
		const cells = 9;
		const cases: fc.Arbitrary<Cases> = fc.record({
			solids: fc.tuple(vector(cells), vector(cells), vector(cells), share, share, share).map(([a, b, c, x, y, z]) => [
				{ id: 'honest' as const, odds: x, bulk: a },
				{ id: 'under' as const, odds: y, bulk: b },
				{ id: 'other' as const, odds: z, bulk: c }
			]),
			enrichment: fc.record({ first: fc.integer({ min: -12, max: 12 }), chances: vector(4) }),
			surface: vector(cells),
			bulk: vector(cells),
			layered: fc.record({
				odds: share,
				bulk: vector(cells),
				strata: fc.array(fc.record({ chance: share, bulk: vector(cells), outside: fc.tuple(share, share) }), { minLength: 1, maxLength: 3 }),
				cores: fc.tuple(share, share)
			})
		});
		fc.assert(
			fc.property(cases, (each) => {
				const weight = new Float64Array(cells);
				for (let b = 0; b < cells; b += 1) {
					for (let s = 0; s < cells; s += 1) {
						// the chance that the surface of a solid piece is s when its bulk is b
						let step = 0;
						each.enrichment.chances.forEach((chance, index) => {
							if (Math.min(cells - 1, Math.max(0, b + each.enrichment.first + index)) === s) step += chance;
						});
						for (const { odds, bulk } of each.solids) weight[b]! += odds * bulk[b]! * step * each.surface[s]! * each.bulk[b]!;
					}
					for (const stratum of each.layered.strata) {
						each.layered.cores.forEach((chance, index) => {
							weight[b]! += each.layered.odds * each.layered.bulk[b]! * stratum.chance * stratum.bulk[b]! * chance * stratum.outside[index]!;
						});
					}
				}
				const all = weight.reduce((sum, value) => sum + value, 0);
				const found = joint(each);
				expect(Math.abs(found.evidence / all - 1)).toBeLessThan(1e-9);
				found.bulk.forEach((share_, cell) => expect(Math.abs(share_ - weight[cell]! / all)).toBeLessThan(1e-9));
			}),
			{ numRuns: 1_000 }
		);
	});

	it('holds a surface within the grid', () => {
		expect([...throughSurface(v(1, 2, 4), { first: 5, chances: v(1) })]).toEqual([4, 4, 4]);
		expect([...throughSurface(v(1, 2, 4), { first: -1, chances: v(0.5, 0.5) })]).toEqual([1, 1.5, 3]);
	});

	it('never divides by nothing', () => {
		expect(() => joint({ ...three, bulk: v(0, 0, 0), layered: { ...three.layered, odds: 0 } })).toThrow('nothing possible');
	});
});
