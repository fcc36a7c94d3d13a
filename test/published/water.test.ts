import { describe, expect, it } from 'vitest';
import { densityByWater } from '../../src/trade/evidence/water-weighing.ts';
import { airDensity, waterDensity } from '../../src/trade/evidence/water.ts';
import { decimal } from '../../src/trade/number/decimal.ts';

/** Source: Tanaka, Girard, Davis, Peuto and Bignell, "Recommended table for the density of water between 0 °C and 40 °C", Metrologia 38 (2001) 301-309. */
describe('the density of water by Tanaka et al. 2001, kg/m³', () => {
	it.each([
		[0, 999.8428], [4, 999.9749], [10, 999.7027], [15, 999.1026], [20, 998.2067], [25, 997.047], [30, 995.6488], [35, 994.0326], [40, 992.2152]
	])('at %d °C is %d', (celsius, printed) => {
		const found = waterDensity(celsius);
		expect(found.ok && Math.abs(found.value * 1000 - printed)).toBeLessThan(5e-5);
	});
});

/** Source: CIPM-2007 formula as tabulated; NIST SOP 2 (2019), appendix B, example: 22.3 °C, 748.1 mmHg, 37 %. The simplified formula is OIML R 111-1:2004, E.3,
 * which claims 2 parts in ten thousand of itself: that is what is allowed here. */
describe('the density of air, kg/m³', () => {
	it('is 1.1993 at 20 °C, 1013.25 hPa, 50 %', () => {
		expect(Math.abs((airDensity(20, 1013.25, 50) * 1000) / 1.1993 - 1)).toBeLessThan(2e-4);
	});
	it('is 1.1719 at 22.3 °C, 748.1 mmHg, 37 %', () => {
		expect(Math.abs((airDensity(22.3, (748.1 * 101_325) / 760 / 100, 37) * 1000) / 1.1719 - 1)).toBeLessThan(2e-4);
	});
});

/** Source: a printed worked example of hydrostatic weighing: 1000 g in air, 930 g in water, 1000 / 70 = 14.29 (water of 1 g/cm³, air left out). */
describe('hydrostatic weighing', () => {
	it('of 1000 g in air and 930 g in water is 14.29 g/cm³', () => {
		const found = densityByWater({ method: 'suspended', air: decimal('1000'), water: decimal('930'), division: decimal('0.1'), temperature: decimal('4') });
		// with air's own lift it is a thousandth less than the plain quotient
		expect(found.ok && Math.abs(found.value.density.value - 14.29)).toBeLessThan(0.03);
		expect(found.ok && Math.abs((found.value.density.value - 0.0012) / ((1000 * (0.999975 - 0.0012)) / 70) - 1)).toBeLessThan(1e-6);
	});
});
