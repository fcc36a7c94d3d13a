import { describe, expect, it } from 'vitest';
import { fluorescenceObservation } from '../../src/trade/evidence/fluorescence.ts';
import { touchObservation } from '../../src/trade/evidence/touch.ts';
import { readingU, testerDefaults } from '../../src/trade/evidence/tester-figures.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { ratio } from '../../src/trade/number/exact.ts';

const { rows } = testerDefaults.fluorescence;

/**
 * Source: Journal of Gems and Gemmology (China University of Geosciences), abstract of a comparison of fluorescence with cupellation on 25
 * samples of gold, five readings each: differences of 1.23 ‰ at 999, 4.5 at 990, 6.4 and 13.1 at 18 kt yellow and white, 18.2 and 16.5 at
 * 14 kt yellow and white. Only the abstract was seen: it does not say whether a difference is a mean or a spread, and taking it for a standard
 * uncertainty is our own choice. The working defaults are rounded from it; the buyer's own check samples replace them.
 */
describe('fluorescence against cupellation', () => {
	it.each([
		['24 kt', 999, false, 1.23],
		['990', 990, false, 4.5],
		['18 kt yellow', 750, false, 6.4],
		['18 kt white', 750, true, 13.1],
		['14 kt yellow', 585, false, 18.2],
		['14 kt white', 585, true, 16.5]
	])('%s differs by as much as is printed, within a fifth', (_, perMille, white, printed) => {
		const u = readingU(rows, 'Au', perMille, white);
		expect(u / printed).toBeGreaterThan(0.8);
		expect(u / printed).toBeLessThan(1.2);
	});
	it('grows as the gold grows less, and is wider for white than for yellow', () => {
		const yellow = [999, 990, 750, 585].map((perMille) => readingU(rows, 'Au', perMille));
		expect([...yellow].sort((a, b) => a - b)).toEqual(yellow);
		expect(readingU(rows, 'Au', 750, true)).toBeGreaterThan(readingU(rows, 'Au', 750));
	});
});

/** Source: LBMA, page on non-destructive testing: fluorescence reaches generally less than 10 µm into gold and is deceived by plating. */
describe('what fluorescence reads', () => {
	it('is the surface and nothing of the bulk', () => {
		const seen = fluorescenceObservation({ reads: [{ metal: 'Au', perMille: decimal('999') }], u: 1, gross: 0.03 }, 'Au');
		expect(Object.keys(seen)).toEqual(['surface']);
	});
});

/** Source: C. W. Corti, "Assaying of gold jewellery: choice of technique", World Gold Council (touchstone 10 to 20 ‰ at best). */
describe('the touchstone', () => {
	it('resolves 10 to 20 ‰ by its working default', () => {
		const u = readingU(testerDefaults.acids.rows, 'Au', 585);
		expect(u).toBeGreaterThanOrEqual(10);
		expect(u).toBeLessThanOrEqual(20);
		const streak = touchObservation({ how: 'rub', holds: { perMille: ratio(decimal('1750'), decimal('3')) }, attackedBy: null, u, gross: 0 }).streak!.values;
		// from hardly to nearly always withstood within four edges
		const first = streak.findIndex((value) => value > 0.025);
		const last = streak.findIndex((value) => value > 0.975);
		expect(last - first).toBeGreaterThan(3 * u);
		expect(last - first).toBeLessThan(5 * u);
	});
});
