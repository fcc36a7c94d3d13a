import { describe, expect, it } from 'vitest';
import { densityObservation, evenly, solidDensity, usefulDensity } from '../../../src/trade/evidence/water-reading.ts';
import { water } from './some-findings.ts';

const gold = { metal: 'Au' as const, build: 'solid' as const, matched: false };
const peak = (values: Float64Array) => values.indexOf(values.reduce((most, value) => Math.max(most, value), 0));

describe('what a density says', () => {
	it('is even between two densities, blurred by the reading', () => {
		expect(evenly(8.5, 8, 9, 0.001)).toBeCloseTo(1, 9);
		expect(evenly(8, 8, 9, 0.05)).toBeCloseTo(0.5, 9);
		expect(evenly(13, 13, 13, 0.1)).toBeCloseTo(0.3989 / 0.1, 2);
		let area = 0;
		for (let density = 5; density < 12; density += 0.001) area += 0.001 * evenly(density, 8, 9, 0.1);
		expect(area).toBeCloseTo(1, 6);
	});

	it('is a chance per g/cm³ that adds up to one for each fineness', () => {
		const areas = [0, 417, 585, 750, 917].map(() => 0);
		for (let density = 7; density < 20; density += 0.05) {
			const values = solidDensity(density, 0.06, 'Au', null);
			[0, 417, 585, 750, 917].forEach((cell, index) => {
				areas[index]! += 0.05 * values[cell]!;
			});
		}
		// the doubt of mixing is taken at the reading, so it is one only nearly
		for (const area of areas) expect(area).toBeCloseTo(1, 2);
	});

	it('decides little without the balance, and more with it', () => {
		const free = solidDensity(13.1, 0.05, 'Au', null);
		const known = solidDensity(13.1, 0.05, 'Au', [{ metal: 'Ag', share: 0.25 }, { metal: 'Cu', share: 0.75 }]);
		const width = (values: Float64Array) => {
			const total = values.reduce((sum, value) => sum + value, 0);
			const mean = values.reduce((sum, value, cell) => sum + value * cell, 0) / total;
			return Math.sqrt(values.reduce((sum, value, cell) => sum + value * (cell - mean) ** 2, 0) / total);
		};
		expect(width(free)).toBeGreaterThan(30);
		expect(width(known)).toBeLessThan(width(free) * 0.6);
		expect(Math.abs(peak(known) - 560)).toBeLessThan(15);
	});

	it('excuses a low reading more often where air can hide', () => {
		const at = (build: 'solid' | 'jointed' | 'hollow') => densityObservation(8.75, 0.05, { ...gold, build }, null).solid![583]!;
		expect(at('hollow')).toBeGreaterThan(3 * at('jointed'));
		expect(at('jointed')).toBeGreaterThan(3 * at('solid'));
		// no excuse makes a reading too high
		const high = (build: 'solid' | 'hollow') => densityObservation(18, 0.05, { ...gold, build }, null).solid![583]!;
		expect(high('hollow')).toBeLessThan(high('solid') + 1e-9);
	});

	it('names the core, and tungsten only as the honest piece', () => {
		const { core } = densityObservation(8.6, 0.03, gold, null);
		const of = (id: Parameters<NonNullable<typeof core>>[0]) => core!(id);
		expect(Number(of('brass'))).toBeGreaterThan(20 * Number(of('lead')));
		expect(densityObservation(19.28, 0.02, { ...gold, matched: true }, null).core!('tungsten')).toBe('as solid');
	});

	it('is no density where the piece is too light for the scale', () => {
		expect(usefulDensity(water(13.1, 2))).toBeNull();
		expect(usefulDensity(water(13.1, 20))!.density).toBeCloseTo(13.1, 1);
	});
});
