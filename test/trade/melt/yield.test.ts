import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, plus, ratio, times, toNumber, type Exact } from '../../../src/trade/number/exact.ts';
import { interval } from '../../../src/trade/uncertainty/coverage.ts';
import { standardUncertainty, type Uncertain } from '../../../src/trade/uncertainty/uncertain.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import { lossClasses } from '../../../src/trade/piece/loss-class.ts';
import type { MeltParcel } from '../../../src/trade/melt/spread.ts';
import { lossShare, meltYield, type MetalYield } from '../../../src/trade/melt/yield.ts';
import { simulateMelt } from './simulate.ts';

const same = (a: Exact, b: Exact) => expect(compareExact(a, b)).toBe(0);
const near = (found: number, other: number, share: number) => {
	expect(found / other).toBeGreaterThan(1 - share);
	expect(found / other).toBeLessThan(1 + share);
};
const doubt = (value: number, contributions: Record<string, number>): Uncertain => ({ value, contributions });

/** Chains of one class, two parcels of 9 kt with one scale and one class error, and dental in four metals. */
const mixed: readonly MeltParcel[] = [
	{
		lossClass: 'worn',
		net: decimal('250'),
		fine: { Au: ratio(250n * 14n, 24n), Ag: exact(decimal('25')) },
		netDoubt: doubt(250, { 'scale:1': 0.02, 'pieces:net': 0.05 }),
		fineDoubt: {
			Au: doubt((250 * 14) / 24, { 'scale:1': 0.0117, 'pieces:net': 0.029, 'class:14 kt|chain|us-modern': -1.2 }),
			Ag: doubt(25, { 'scale:1': 0.002, 'pieces:Ag': 0.4 })
		}
	},
	{
		lossClass: 'zinc-solder',
		net: decimal('100'),
		fine: { Au: exact(decimal('37.5')) },
		netDoubt: doubt(100, { 'scale:1': 0.01 }),
		fineDoubt: { Au: doubt(37.5, { 'scale:1': 0.00375, 'class:375|ring|hallmarked': -0.15 }) }
	},
	{
		lossClass: 'zinc-solder',
		net: decimal('40'),
		fine: { Au: exact(decimal('15')) },
		netDoubt: doubt(40, { 'scale:1': 0.01 }),
		fineDoubt: { Au: doubt(15, { 'scale:1': 0.00375, 'class:375|ring|hallmarked': -0.06 }) }
	},
	{
		lossClass: 'dental',
		net: decimal('60'),
		fine: { Au: exact(decimal('37.5')), Pd: exact(decimal('10.8')), Ag: exact(decimal('7.2')), Pt: exact(decimal('1.2')) }
	}
];

function yieldOf(parcels: readonly MeltParcel[]) {
	const found = meltYield(parcels);
	if (!found.ok) throw new Error(found.problem.kind);
	return found.value;
}

describe('the predicted bar', () => {
	it('is refused when nothing goes in', () => {
		expect(meltYield([])).toEqual({ ok: false, problem: { kind: 'melt-empty' } });
		expect(meltYield([{ lossClass: 'clean', net: decimal('0'), fine: {} }])).toEqual({ ok: false, problem: { kind: 'melt-empty' } });
	});

	it('follows M = Σ g(1−d)(1−ℓ) and F = r Σ g(1−d)s at the middle of the ranges', () => {
		const found = yieldOf(mixed);
		const bar = 250 * (1 - 0.006) * (1 - 0.0065) + 140 * (1 - 0.0125) * (1 - 0.0115) + 60 * (1 - 0.175) * (1 - 0.0075);
		expect(toNumber(found.bar)).toBeCloseTo(bar, 10);
		const gold = 0.99875 * (1 - 0.006) * ((250 * 14) / 24) + 0.998 * (1 - 0.0125) * 52.5 + 0.994 * (1 - 0.175) * 37.5;
		expect(toNumber(found.metals.Au!.retained)).toBeCloseTo(gold, 10);
		expect(toNumber(found.metals.Au!.perMille)).toBeCloseTo((1000 * gold) / bar, 9);
		expect(lossShare(found)).toBeCloseTo(1 - bar / 450, 12);
	});

	it('says the same number exactly and with doubt', () => {
		const found = yieldOf(mixed);
		expect(found.barMass.value).toBeCloseTo(toNumber(found.bar), 9);
		expect(found.grossLoss.value).toBeCloseTo(450 - toNumber(found.bar), 9);
		for (const metal of Object.values(found.metals)) {
			expect(metal.grams.value).toBeCloseTo(toNumber(metal.retained), 9);
			expect(metal.fineness.value).toBeCloseTo(toNumber(metal.perMille), 8);
		}
	});

	it('names the sources, and two parcels of one loss class share theirs', () => {
		const found = yieldOf(mixed);
		const sources = Object.keys(found.metals.Au!.grams.contributions);
		for (const source of ['scale:1', 'class:375|ring|hallmarked', 'retention:worn', 'non-metal:dental', 'retention:zinc-solder']) {
			expect(sources).toContain(source);
		}
		expect(Object.keys(found.barMass.contributions)).toContain('loss:zinc-solder');
		const alone = (index: number) => yieldOf([mixed[index]!]).barMass.contributions['loss:zinc-solder']!;
		expect(found.barMass.contributions['loss:zinc-solder']).toBeCloseTo(alone(1) + alone(2), 12);
		expect(found.metals.Au!.grams.contributions['class:375|ring|hallmarked']).toBeCloseTo(-0.21 * 0.998 * 0.9875, 12);
	});

	it('says which class did not fit', () => {
		const pure: MeltParcel = { lossClass: 'clean', net: decimal('100'), fine: { Au: exact(decimal('99.99')) } };
		expect(yieldOf([pure]).limited).toEqual(['clean']);
		expect(yieldOf(mixed).limited).toEqual([]);
	});

	it('lets nothing appear or vanish, whatever goes in', () => {
		const parcel = fc
			.tuple(fc.constantFrom(...lossClasses), fc.integer({ min: 1, max: 10 ** 7 }), fc.array(fc.integer({ min: 0, max: 8 }), { minLength: 3, maxLength: 3 }))
			.map(([lossClass, hundredths, [gold, silver, copper]]): MeltParcel => {
				const net = decimal(String(hundredths)).div(100);
				const part = (k: number) => times(exact(net), ratio(BigInt(k), 24n));
				return { lossClass, net, fine: { Au: part(gold!), Ag: part(silver!), Cu: part(copper!) } };
			});
		fc.assert(
			fc.property(fc.array(parcel, { minLength: 1, maxLength: 8 }), (parcels) => {
				const found = yieldOf(parcels);
				same(found.net, plus(plus(found.bar, found.nonMetal), found.metalLoss));
				for (const [id, metal] of Object.entries(found.metals) as [MetalId, MetalYield][]) {
					const counted = parcels.reduce((total, { fine }) => plus(total, fine[id]!), exact(0n));
					same(counted, plus(metal.retained, plus(metal.lost, metal.notThere)));
					same(times(metal.perMille, found.bar), times(metal.retained, exact(1000n)));
					expect(metal.perMille.n >= 0n && compareExact(metal.perMille, exact(1000n)) <= 0).toBe(true);
				}
			}),
			{ numRuns: 1_000 }
		);
	});

	it('does not depend on the order of the parcels', () => {
		const forward = yieldOf(mixed);
		const backward = yieldOf([...mixed].reverse());
		same(forward.bar, backward.bar);
		same(forward.metals.Au!.perMille, backward.metals.Au!.perMille);
		expect(standardUncertainty(forward.barMass)).toBeCloseTo(standardUncertainty(backward.barMass), 12);
	});
});

describe('the interval of the bar against a simulation', () => {
	const figures = [
		{ name: 'bar', what: { figure: 'bar' }, of: (found: ReturnType<typeof yieldOf>) => found.barMass },
		{ name: 'gold', what: { figure: 'fine', metal: 'Au' }, of: (found: ReturnType<typeof yieldOf>) => found.metals.Au!.grams },
		{ name: 'gold fineness', what: { figure: 'fineness', metal: 'Au' }, of: (found: ReturnType<typeof yieldOf>) => found.metals.Au!.fineness },
		{ name: 'silver fineness', what: { figure: 'fineness', metal: 'Ag' }, of: (found: ReturnType<typeof yieldOf>) => found.metals.Ag!.fineness }
	] as const;

	it.each(figures)('has its ends within 2 % of the width when every source is normal: $name', { timeout: 60_000 }, ({ what, of }) => {
		const estimate = of(yieldOf(mixed));
		const simulated = simulateMelt(mixed, what, { draws: 60_000, coverage: 0.9, seed: 20_250_101, losses: 'normal' });
		const { low, high } = interval(estimate, 0.9);
		const width = simulated.high - simulated.low;
		expect(Math.abs(low - simulated.low) / width).toBeLessThan(0.02);
		expect(Math.abs(high - simulated.high) / width).toBeLessThan(0.02);
		near(standardUncertainty(estimate), simulated.u, 0.02);
	});

	it.each(figures)('has the same doubt, and a width within a tenth, when the losses are rectangles: $name', { timeout: 60_000 }, ({ what, of }) => {
		const estimate = of(yieldOf(mixed));
		const simulated = simulateMelt(mixed, what, { draws: 30_000, coverage: 0.9, seed: 7, losses: 'rectangular' });
		near(standardUncertainty(estimate), simulated.u, 0.02);
		const { low, high } = interval(estimate, 0.9);
		near(high - low, simulated.high - simulated.low, 0.1);
	});

	it('holds for brass too', { timeout: 60_000 }, () => {
		const brass: MeltParcel[] = [{ lossClass: 'base', net: decimal('1200'), fine: { Cu: ratio(800n, 1n), Zn: ratio(400n, 1n) }, netDoubt: doubt(1200, { 'scale:2': 0.5 }) }];
		const found = yieldOf(brass);
		const simulated = simulateMelt(brass, { figure: 'fine', metal: 'Zn' }, { draws: 30_000, coverage: 0.9, seed: 11, losses: 'rectangular' });
		expect(found.metals.Zn!.grams.value).toBeCloseTo(simulated.mean, 0);
		near(standardUncertainty(found.metals.Zn!.grams), simulated.u, 0.03);
	});

	it('would be too narrow if shared sources were taken as independent', () => {
		const found = yieldOf(mixed).barMass;
		const apart = mixed.map((parcel) => standardUncertainty(yieldOf([parcel]).barMass));
		expect(standardUncertainty(found)).toBeGreaterThan(Math.hypot(...apart));
	});
});
