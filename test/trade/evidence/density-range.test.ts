import { describe, expect, it } from 'vitest';
import { allOf, densitiesOf, finenessesOf } from '../../../src/trade/evidence/density-range.ts';
import { densityByWater } from '../../../src/trade/evidence/water-weighing.ts';
import { idealDensity } from '../../../src/trade/metal/density.ts';
import { densityRange, type Family } from '../../../src/trade/metal/families.ts';
import { metals } from '../../../src/trade/metal/metals.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';
import { water } from './some-findings.ts';

describe('density against fineness', () => {
	// 14/24 of gold, the rest half silver and half copper, weighed without any doubt; who reads it does not know how much of the rest is silver.
	const share = 14 / 24;
	const reading = idealDensity([
		{ share, density: metals.Au.density },
		{ share: (1 - share) / 2, density: metals.Ag.density },
		{ share: (1 - share) / 2, density: metals.Cu.density }
	]);
	const silverToCopper: Family = { id: 'yellow', metal: 'Au', weight: 1, corners: [{ Ag: 1 }, { Cu: 1 }], bias: 0, limit: 0.01 };

	it('leaves a 14 kt reading anywhere from 504 to 641 ‰ while the ratio of silver to copper is not known', () => {
		const span = allOf(finenessesOf('Au', reading, 0, 0, [silverToCopper]))!;
		expect([Math.round(span.low), Math.round(span.high)]).toEqual([504, 641]);
		// second route: solved for the share of gold, 1/reading = share/gold + (1 − share)/rest
		const solved = (rest: number) => (1000 * (1 / reading - 1 / rest)) / (1 / metals.Au.density - 1 / rest);
		expect(Math.abs(span.low - solved(metals.Ag.density))).toBeLessThan(0.1);
		expect(Math.abs(span.high - solved(metals.Cu.density))).toBeLessThan(0.1);
	});

	it('leaves still more with zinc, nickel, palladium and the claim of mixing', () => {
		const free = finenessesOf('Au', reading, 0, 0);
		const of = (id: string) => free.find(({ family }) => family === id)!;
		// green ends at silver alone, so the lower end is the same; zinc in yellow and red lifts the upper one
		expect(Math.round(of('green').low)).toBe(504);
		expect(of('yellow').high).toBeGreaterThan(641);
		expect(of('red').high).toBeGreaterThan(641);
		expect(of('white-palladium').low).toBeLessThan(400);
		const claimed = allOf(finenessesOf('Au', reading, 0))!;
		expect(claimed.low).toBeLessThan(allOf(free)!.low);
		expect(claimed.high).toBeGreaterThan(allOf(free)!.high);
	});

	it('never leaves out what is possible, however narrow', () => {
		for (const perMille of [333.33, 585, 916.67, 999.94]) {
			const alone: Family = { ...silverToCopper, corners: [{ Ag: 0.5, Cu: 0.5 }] };
			const { low } = densityRange(alone, perMille);
			const span = finenessesOf('Au', low, 0, 0, [alone])[0]!;
			expect(span.low).toBeLessThanOrEqual(perMille);
			expect(span.high).toBeGreaterThanOrEqual(perMille);
			expect(span.high - span.low).toBeLessThan(0.25);
		}
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
			for (const density of [low, high]) {
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
