import { describe, expect, it } from 'vitest';
import { airDensity, ROOM_AIR, waterDensity } from '../../../src/trade/evidence/water.ts';

const of = (celsius: number) => {
	const found = waterDensity(celsius);
	if (!found.ok) throw new Error(found.problem.kind);
	return found.value;
};

describe('water and air', () => {
	it('is densest at 4 °C and falls on both sides', () => {
		expect(of(4)).toBeGreaterThan(of(0));
		const warm = [4, 10, 20, 30, 40].map(of);
		expect([...warm].sort((a, b) => b - a)).toEqual(warm);
	});
	it('is not known outside 0 to 40 °C', () => {
		for (const celsius of [-0.1, 40.1, Number.NaN]) expect(waterDensity(celsius)).toMatchObject({ ok: false, problem: { kind: 'water-temperature' } });
	});
	it('takes a room for 1.2 kg/m³, within 10 % from a hut on a mountain to a cold cellar', () => {
		expect(airDensity(20, 1013.25, 50)).toBeCloseTo(ROOM_AIR, 5);
		expect(Math.abs(airDensity(5, 1020, 50) / ROOM_AIR - 1)).toBeLessThan(0.1);
		expect(Math.abs(airDensity(25, 950, 60) / ROOM_AIR - 1)).toBeLessThan(0.1);
	});
});
