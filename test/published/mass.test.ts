import { describe, expect, it } from 'vitest';
import { massOf, warnings, weighing } from '../../src/trade/mass/weighing.ts';
import { convert, inUnit, massUnits, toMass, type MassUnitId } from '../../src/trade/mass/units.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { compareExact, divide, exact, exactToText, ratio, times } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';

const one = exact(1n);
const printed = (amount: string, from: MassUnitId, to: MassUnitId, places: number) =>
	round(convert(exact(decimal(amount)), from, to), decimal('10').pow(-places), 'half-up').toFixed(places);

// Source: NIST Handbook 44, appendix C, "General Tables of Units of Measurement", units of mass (exact values), from memory
describe('NIST Handbook 44, appendix C: exact units of mass, from memory', () => {
	it.each<[MassUnitId, string]>([
		['gr', '0.06479891'],
		['dwt', '1.55517384'],
		['ozt', '31.1034768'],
		['oz-av', '28.349523125'],
		['lb-av', '453.59237'],
		['ct', '0.2']
	])('1 %s is exactly %s g', (id, grams) => {
		expect(toMass(decimal('1'), id).grams.toString()).toBe(grams);
	});

	it.each<[MassUnitId, MassUnitId, string]>([
		['ozt', 'gr', '480'],
		['ozt', 'dwt', '20'],
		['dwt', 'gr', '24'],
		['lb-av', 'gr', '7000'],
		['lb-av', 'oz-av', '16'],
		['oz-av', 'gr', '875/2'],
		['lb-av', 'ozt', '175/12']
	])('1 %s is exactly so many %s: %s', (from, to, amount) => {
		expect(exactToText(convert(one, from, to))).toBe(amount);
	});

	it('a troy pound of 12 troy ounces is 373.2417216 g and 5760 grains', () => {
		expect(toMass(decimal('12'), 'ozt').grams.toString()).toBe('373.2417216');
		expect(exactToText(convert(exact(12n), 'ozt', 'gr'))).toBe('5760');
	});

	it.each<[string, MassUnitId, MassUnitId, number, string]>([
		['1', 'g', 'gr', 5, '15.43236'],
		['1', 'ct', 'gr', 6, '3.086472'],
		['1', 'kg', 'lb-av', 6, '2.204623'],
		['1', 'oz-av', 'ozt', 7, '0.9114583'],
		['1', 'ozt', 'oz-av', 6, '1.097143'],
		['1', 'g', 'oz-av', 9, '0.035273962']
	])('%s %s in %s to %i places is %s', (amount, from, to, places, text) => {
		expect(printed(amount, from, to, places)).toBe(text);
	});
});

// Source: NIST Special Publication 811 (2008), appendix B.8 (factors to seven digits), from memory
describe('NIST SP 811 (2008), appendix B.8: factors to the kilogram, from memory', () => {
	it.each<[MassUnitId, number, string]>([
		['ct', 7, '0.0002000'],
		['gr', 11, '0.00006479891'],
		['ozt', 8, '0.03110348'],
		['oz-av', 8, '0.02834952'],
		['dwt', 9, '0.001555174'],
		['lb-av', 7, '0.4535924']
	])('1 %s in kg to %i places is %s', (id, places, text) => {
		expect(printed('1', id, 'kg', places)).toBe(text);
	});
});

// Source: Hong Kong, Weights and Measures Ordinance, Cap. 68, schedule 1, part V (1987 edition): 1 pound = 0.453 592 37 kg exactly,
// 1 grain = 1/7000 pound, 1 ounce = 1/16 pound, 1 ounce troy = 12/175 pound, 1 metric carat = 1/5 gram, 1 catty = 0.604 789 82 kg,
// 1 tael = 1/16 catty
describe('Hong Kong, Cap. 68, schedule 1, part V', () => {
	const pound = exact(decimal('453.59237'));

	it.each<[string, MassUnitId, bigint, bigint]>([
		['grain', 'gr', 1n, 7000n],
		['ounce', 'oz-av', 1n, 16n],
		['ounce troy', 'ozt', 12n, 175n],
		['pound', 'lb-av', 1n, 1n]
	])('1 %s (%s) is %i/%i pound', (_, id, n, d) => {
		expect(compareExact(exact(massUnits[id].grams), times(pound, ratio(n, d)))).toBe(0);
	});

	it('a tael is a sixteenth of a catty of 604.78982 g, and a metric carat a fifth of a gram', () => {
		expect(compareExact(exact(massUnits['tael-hk'].grams), divide(exact(decimal('604.78982')), exact(16n)))).toBe(0);
		expect(compareExact(inUnit(toMass(decimal('1'), 'ct'), 'g'), ratio(1n, 5n))).toBe(0);
	});

	// Source: Hong Kong Annual Report 1953, part 3, chapter 4: 1 leung (tael) = 1.33 ounces avoirdupois
	it('a leung is 1.33 ounces avoirdupois (Hong Kong Annual Report 1953, part 3, chapter 4)', () => {
		expect(printed('1', 'tael-hk', 'oz-av', 2)).toBe('1.33');
	});
});

// Source: The Statesman's Year-Book 1899, p. 104: "a tola = 180 grains"
describe("The Statesman's Year-Book 1899, p. 104", () => {
	it('a tola is 180 grains', () => {
		expect(exactToText(convert(one, 'tola', 'gr'))).toBe('180');
		expect(exactToText(convert(exact(10n), 'tola', 'ozt'))).toBe('15/4');
	});
});

// Source: Oregon Department of Agriculture, Measurement Standards, precious-metal scales: equal prices per troy ounce, gram and
// pennyweight ("$100 / troy ounce, $3.215 / gram; $5 / dwt, $3.215 / gram; $10 / dwt, $6.43 / gram")
describe('Oregon Department of Agriculture, precious-metal scales: equal prices', () => {
	const price = (amount: string, per: MassUnitId, wanted: MassUnitId) => convert(exact(decimal(amount)), wanted, per);

	it.each<[string, MassUnitId, MassUnitId, string, string]>([
		['100', 'ozt', 'g', '0.001', '3.215'],
		['5', 'dwt', 'g', '0.001', '3.215'],
		['100', 'ozt', 'dwt', '0.01', '5'],
		['10', 'dwt', 'g', '0.01', '6.43']
	])('%s for one %s is as much for one %s as printed to %s: %s', (amount, per, wanted, step, text) => {
		expect(round(price(amount, per, wanted), decimal(step), 'half-up').toString()).toBe(text);
	});
});

// Source: Oregon Department of Agriculture, as above, on NIST Handbook 44, G-UR.1.1: the least load is at least 50 divisions
describe('Oregon Department of Agriculture on NIST Handbook 44, G-UR.1.1: fifty divisions', () => {
	const kinds = (typed: string, unit: MassUnitId, division: string) => {
		const w = weighing(typed, unit, { division: decimal(division) });
		if (!w.ok) throw new Error(w.problem.kind);
		expect(massOf(w.value).grams.gt(0)).toBe(true);
		return warnings(w.value).map((warning) => warning.kind);
	};

	it.each<[string, MassUnitId, string, string]>([
		['5', 'g', '0.1', '0.2'],
		['0.1', 'ozt', '0.002', '0.005'],
		['2', 'dwt', '0.04', '0.05'],
		['0.5', 'ozt', '0.01', '0.02'],
		['10', 'dwt', '0.2', '0.5']
	])('%s %s needs a division of at most %s (not %s)', (typed, unit, good, coarse) => {
		expect(kinds(typed, unit, good)).toEqual([]);
		expect(kinds(typed, unit, coarse)).toEqual(['load-under-fifty-divisions']);
	});
});
