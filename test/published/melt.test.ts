import { describe, expect, it } from 'vitest';
import { decimal } from '../../src/trade/number/decimal.ts';
import { divide, exact, minus, ratio, times, toNumber, type Exact } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';
import { toMass } from '../../src/trade/mass/units.ts';
import { fromKarat, shareOf } from '../../src/trade/metal/fineness.ts';
import { metals } from '../../src/trade/metal/metals.ts';
import { balance } from '../../src/trade/melt/balance.ts';
import { defaultLosses } from '../../src/trade/melt/losses.ts';
import { meltYield } from '../../src/trade/melt/yield.ts';

const of = (text: string): Exact => exact(decimal(text));
const fixed = (value: Exact, step: string, places: number) => round(value, decimal(step), 'half-even').toFixed(places);

// Source: a practitioners' question in public: 4020 oz at 88.98 % remelted to 4005 oz at 87.23 %
describe('4020 oz at 889.8 ‰ remelted to 4005 oz at 872.3 ‰', () => {
	const before = exact(toMass(decimal('4020'), 'ozt').grams);
	const after = exact(toMass(decimal('4005'), 'ozt').grams);
	const fineBefore = times(before, of('0.8898'));
	const fineAfter = times(after, of('0.8723'));
	const shares = { nonMetal: of('0'), metalLoss: divide(minus(before, after), before), retention: of('1') };

	it('is 0.37 % lighter', () => {
		expect(fixed(times(shares.metalLoss, of('100')), '0.01', 2)).toBe('0.37');
	});

	it('is 2.33 % poorer in fine metal', () => {
		expect(fixed(times(divide(minus(fineBefore, fineAfter), fineBefore), of('100')), '0.01', 2)).toBe('2.33');
	});

	it('would have risen to 893.1 ‰ had only base metal gone', () => {
		const melted = balance(before, { Au: fineBefore }, shares);
		expect(melted.limit).toBeNull();
		expect(fixed(divide(melted.bar, exact(toMass(decimal('1'), 'ozt').grams)), '1', 0)).toBe('4005');
		expect(fixed(times(divide(melted.metals.Au!.retained, melted.bar), of('1000')), '0.1', 1)).toBe('893.1');
		// second route, without the balance: 4020 x 889.8 / 4005
		expect((4020 * 889.8) / 4005).toBeCloseTo(893.13, 2);
	});

	it('has lost more fine metal than any class of scrap is expected to, so it is no melt loss', () => {
		const kept = toNumber(divide(fineAfter, fineBefore));
		expect(kept).toBeLessThan(defaultLosses.dental.retention.low.toNumber());
		expect(kept).toBeLessThan(defaultLosses.lemel.retention.low.toNumber());
	});
});

// Source: Warren, A Practical Treatise on Mechanical Dentistry, pp. 206-207: 6 oz of fine gold with 3 oz of alloy is 16 carats
describe('Warren: 6 oz of fine gold and 3 oz of alloy', () => {
	it('melt without loss to 9 oz of 16 carats', () => {
		const none = { low: decimal('0'), high: decimal('0') };
		const all = { low: decimal('1'), high: decimal('1') };
		const own = { clean: { nonMetal: none, metalLoss: none, retention: all } };
		const found = meltYield(
			[
				{ lossClass: 'clean', net: decimal('6'), fine: { Au: of('6') } },
				{ lossClass: 'clean', net: decimal('3'), fine: {} }
			],
			own
		);
		if (!found.ok) throw new Error(found.problem.kind);
		expect(fixed(found.value.bar, '0.1', 1)).toBe('9.0');
		const share = divide(found.value.metals.Au!.perMille, of('1000'));
		expect(minus(share, shareOf(fromKarat(decimal('16')))).n).toBe(0n);
		expect(minus(share, ratio(2n, 3n)).n).toBe(0n);
	});
});

// Source: CRC Handbook of Chemistry and Physics, boiling points of the elements: Zn 907 °C, Cd 767 °C, Ag 2162 °C, Au 2836 °C
describe('what fumes off at the heat of the melt', () => {
	it('is zinc and cadmium, which boil under the melting point of gold; gold and silver do not', () => {
		for (const id of ['Zn', 'Cd'] as const) expect(metals[id].boiling).toBeLessThan(metals.Au.melting);
		for (const id of ['Au', 'Ag', 'Cu'] as const) expect(metals[id].boiling).toBeGreaterThan(metals.Au.melting + 1000);
	});
});

// Common practice, no source: trade figures for what a melt takes, in per cent
describe('trade figures of loss by class (common practice, no source)', () => {
	it.each([
		['clean', '0', '0.5', '0.2', '0.8', '0.999', '0.9995'],
		['worn', '0.2', '1', '0.3', '1', '0.998', '0.9995'],
		['lemel', '2', '15', '0.5', '2', '0.99', '0.998'],
		['dental', '5', '30', '0.5', '1', '0.99', '0.998']
	] as const)('%s: non-metal %s to %s, metal loss %s to %s, kept %s to %s', (id, dirtLow, dirtHigh, lossLow, lossHigh, low, high) => {
		const { nonMetal, metalLoss, retention } = defaultLosses[id];
		const percent = [nonMetal.low, nonMetal.high, metalLoss.low, metalLoss.high].map((share) => share.times(100).toString());
		expect(percent).toEqual([dirtLow, dirtHigh, lossLow, lossHigh]);
		expect([retention.low.toString(), retention.high.toString()]).toEqual([low, high]);
	});
});
