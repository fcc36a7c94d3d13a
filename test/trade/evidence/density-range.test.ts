import { describe, expect, it } from 'vitest';
import { allOf, densitiesOf, finenessesOf } from '../../../src/trade/evidence/density-range.ts';
import { densityByWater } from '../../../src/trade/evidence/water-weighing.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';
import { water } from './some-findings.ts';

describe('density against fineness', () => {
	// The reading of a 14 kt yellow alloy of everyday balance, 13.336 g/cm³, with no doubt in the scale at all.
	it('leaves a 14 kt reading anywhere from 504 to 641 ‰ while the balance is not known', () => {
		const spans = finenessesOf('Au', 13.336, 0, 0);
		const of = (id: string) => spans.find(({ family }) => family === id)!;
		expect(of('yellow').low).toBeCloseTo(504, 0);
		expect(of('white-nickel').high).toBeCloseTo(641, 0);
		const all = allOf(spans.filter(({ family }) => ['yellow', 'red', 'white-nickel'].includes(family)))!;
		expect(all.low).toBeCloseTo(504, 0);
		expect(Math.abs(all.high - 641)).toBeLessThan(2);
		// with palladium in it, it could be as low as 300
		expect(of('white-palladium').low).toBeLessThan(320);
	});

	it('widens with the doubt of the reading and of the mixing', () => {
		const narrow = allOf(finenessesOf('Au', 13.336, 0, 0).filter(({ family }) => family === 'yellow'))!;
		const found = densityByWater(water(13.336, 20));
		const u = found.ok ? standardUncertainty(found.value.density) : 0;
		const wide = allOf(finenessesOf('Au', 13.336, u).filter(({ family }) => family === 'yellow'))!;
		expect(wide.low).toBeLessThan(narrow.low - 5);
		expect(wide.high).toBeGreaterThan(narrow.high + 5);
	});

	it('is the other way round for a known fineness', () => {
		for (const { family, low, high } of densitiesOf('Au', 585, 0)) {
			for (const density of [low + 1e-6, high - 1e-6]) {
				const back = finenessesOf('Au', density, 0, 0).find((span) => span.family === family)!;
				expect(back.low).toBeLessThanOrEqual(585);
				expect(back.high).toBeGreaterThanOrEqual(585);
			}
		}
	});

	it('is nothing where no alloy of the metal has that density', () => {
		expect(finenessesOf('Au', 25, 0.1)).toEqual([]);
		expect(allOf([])).toBeNull();
		expect(finenessesOf('Ag', 10.36, 0.02)[0]!.low).toBeGreaterThan(850);
	});
});
