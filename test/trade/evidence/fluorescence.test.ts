import { describe, expect, it } from 'vitest';
import { balanceOf, fluorescenceObservation, readOf, surfaceReading } from '../../../src/trade/evidence/fluorescence.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { reading } from './some-findings.ts';

const reads = (parts: Partial<Record<MetalId, number>>) =>
	Object.entries(parts).map(([metal, perMille]) => ({ metal: metal as MetalId, perMille: decimal(String(perMille)) }));
const peak = (values: Float64Array) => values.indexOf(Math.max(...values));

describe('a fluorescence reading', () => {
	it('is of the surface, the other metals beside it', () => {
		const finding = { ...reading(0), reads: reads({ Au: 588, Ag: 100, Cu: 312 }) };
		expect(readOf(finding.reads, 'Ag')).toBe(100);
		expect(readOf(finding.reads, 'Pd')).toBe(0);
		const seen = fluorescenceObservation(finding, 'Au');
		expect(peak(seen.surface!)).toBe(588);
		expect(seen.bulk).toBeUndefined();
		expect(seen.core).toBeUndefined();
	});

	it('takes a rhodium plate off and trusts what is under it less', () => {
		const plated = { ...reading(0), reads: reads({ Au: 700, Rh: 60, Pd: 120, Ag: 120 }) };
		const { perMille, u } = surfaceReading(plated, 'Au');
		expect(perMille).toBeCloseTo(700 / 0.94, 9);
		expect(u).toBeCloseTo(Math.hypot(16, 12) / 0.94, 9);
	});

	it('reads the balance where nearly all was shown', () => {
		const balance = balanceOf([{ ...reading(0), reads: reads({ Au: 750, Pd: 150, Ag: 100 }) }], 'Au')!;
		expect(balance).toEqual([{ metal: 'Pd', share: 0.6 }, { metal: 'Ag', share: 0.4 }]);
		expect(balanceOf([reading(750)], 'Au')).toBeNull();
		expect(balanceOf([{ ...reading(0), reads: reads({ Au: 999 }) }], 'Au')).toBeNull();
		expect(balanceOf([], 'Au')).toBeNull();
	});

	it('speaks of a tungsten core when tungsten shows, but not in platinum', () => {
		const finding = { ...reading(0), reads: reads({ Au: 990, W: 8 }) };
		const seen = fluorescenceObservation(finding, 'Au');
		expect(seen.core!('tungsten')).toBeGreaterThan(100 * (seen.solid![990] as number));
		expect(seen.core!('brass')).toBe(seen.solid![990]);
		expect(fluorescenceObservation({ ...finding, reads: reads({ Pt: 950, W: 50 }) }, 'Pt').core).toBeUndefined();
	});
});
