import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, exactToText, minus, plus, ratio, times, toNumber, type Exact } from '../../../src/trade/number/exact.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import { balance, type MetalBalance } from '../../../src/trade/melt/balance.ts';

const of = (text: string): Exact => exact(decimal(text));
const usual = { nonMetal: of('0.1'), metalLoss: of('0.01'), retention: of('0.998') };
const same = (a: Exact, b: Exact) => expect(compareExact(a, b)).toBe(0);

describe('the balance of a melt', () => {
	it('keeps gold and lets the base metal bear the rest of the loss', () => {
		const found = balance(of('100'), { Au: of('50') }, usual);
		expect(found.limit).toBeNull();
		expect(exactToText(found.nonMetal)).toBe('10');
		// 90 g of metal, 1 % lost: 0.9 g, of which gold 45 x 0.002 = 0.09 g
		expect(toNumber(found.metalLoss)).toBeCloseTo(0.9, 15);
		expect(toNumber(found.bar)).toBeCloseTo(89.1, 12);
		expect(toNumber(found.metals.Au!.retained)).toBeCloseTo(44.91, 12);
		expect(toNumber(found.metals.Au!.lost)).toBeCloseTo(0.09, 12);
		expect(toNumber(found.metals.Au!.notThere)).toBeCloseTo(5, 12);
	});

	it('treats copper as base metal whether or not it is listed', () => {
		const unlisted = balance(of('100'), { Ag: of('92.5') }, usual);
		const listed = balance(of('100'), { Ag: of('92.5'), Cu: of('7.5') }, usual);
		same(unlisted.bar, listed.bar);
		same(unlisted.metals.Ag!.retained, listed.metals.Ag!.retained);
		same(listed.bar, plus(listed.metals.Ag!.retained, listed.metals.Cu!.retained));
	});

	it('loses brass by the metal loss of its class', () => {
		const found = balance(of('120'), { Cu: of('80'), Zn: of('40') }, { ...usual, nonMetal: of('0'), metalLoss: of('0.03') });
		expect(exactToText(found.bar)).toBe('582/5');
		expect(exactToText(found.metals.Zn!.retained)).toBe('194/5');
	});

	it('never makes a bar finer than metal can be', () => {
		const fine = balance(of('100'), { Au: of('99.99') }, { nonMetal: of('0'), metalLoss: of('0.005'), retention: of('0.99925') });
		expect(fine.limit).toBe('most');
		expect(toNumber(fine.metals.Au!.retained) / toNumber(fine.bar)).toBeLessThan(1);
		const pure = balance(of('100'), { Au: of('100') }, usual);
		same(pure.bar, pure.metals.Au!.retained);
		const little = balance(of('100'), { Au: of('99') }, { nonMetal: of('0'), metalLoss: of('0.0001'), retention: of('0.99') });
		expect(little.limit).toBe('least');
		same(little.metalLoss, little.metals.Au!.lost);
	});

	it('refuses more precious metal than mass', () => {
		expect(() => balance(of('1'), { Au: of('1.1') }, usual)).toThrow(/more precious metal than mass/);
	});

	const share = (least: number, most: number) => fc.integer({ min: least, max: most }).map((n) => ratio(BigInt(n), 100_000n));
	const ids = fc.uniqueArray(fc.constantFrom<MetalId>('Au', 'Ag', 'Pt', 'Pd', 'Cu', 'Zn', 'Ni', 'Fe'), { minLength: 1, maxLength: 4 });

	it('gives out exactly what went in: grams, and fine grams of every metal', () => {
		fc.assert(
			fc.property(
				fc.integer({ min: 1, max: 10 ** 8 }), ids, fc.array(fc.integer({ min: 0, max: 24 }), { minLength: 5, maxLength: 5 }),
				share(0, 90_000), share(0, 50_000), share(50_000, 100_000),
				(thousandths, metals, weights, nonMetal, metalLoss, retention) => {
					const net = ratio(BigInt(thousandths), 1000n);
					// karat-like shares whose sum is at most the whole; the last weight is what nobody listed
					const all = BigInt(metals.reduce((total, _, i) => total + weights[i]!, weights[4]!) || 1);
					const fine: Partial<Record<MetalId, Exact>> = {};
					metals.forEach((metal, i) => (fine[metal] = times(net, { n: BigInt(weights[i]!), d: all })));
					const found = balance(net, fine, { nonMetal, metalLoss, retention });
					same(net, plus(plus(found.nonMetal, found.metalLoss), found.bar));
					let retained: Exact = exact(0n);
					for (const [metal, part] of Object.entries(found.metals) as [MetalId, MetalBalance][]) {
						same(part.counted, fine[metal]!);
						same(part.counted, plus(plus(part.notThere, part.lost), part.retained));
						for (const piece of [part.notThere, part.lost, part.retained]) expect(piece.n >= 0n).toBe(true);
						retained = plus(retained, part.retained);
					}
					expect(minus(found.bar, retained).n >= 0n).toBe(true);
				}
			),
			{ numRuns: 2_000 }
		);
	});
});
