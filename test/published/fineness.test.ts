import { describe, expect, it } from 'vitest';
import { fromKarat, fromPerMille, karatsOf, perMilleNumber, shareOf } from '../../src/trade/metal/fineness.ts';
import { fineMass } from '../../src/trade/metal/fine-mass.ts';
import { largestMark, legalMinimum } from '../../src/trade/metal/law.ts';
import { layerFineMass } from '../../src/trade/metal/plated.ts';
import { mass } from '../../src/trade/mass/mass.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { exactToText, ratio } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';

const cent = decimal('0.01');
const printed = (karats: string) => round(fromKarat(decimal(karats)).perMille, cent, 'half-up').toFixed(2);

describe('karat in parts per thousand', () => {
	// source: arithmetic, as in printed karat lists (k / 24 x 1000 to two places)
	it.each([
		['8', '333.33'], ['9', '375.00'], ['10', '416.67'], ['12', '500.00'], ['14', '583.33'], ['18', '750.00'], ['21', '875.00'],
		['22', '916.67'], ['24', '1000.00']
	])('%s kt is %s', (karats, perMille) => {
		expect(printed(karats)).toBe(perMille);
		// second route: whole numbers only, hundredths of a part per thousand rounded half up
		expect(String((BigInt(karats) * 100_000n * 2n + 24n) / 48n)).toBe(perMille.replace('.', ''));
	});

	// source: Encyclopædia Britannica, 9th edition, vol. 16 "Mint": 22 carats fine is millesimal 916.66 (cut, not rounded)
	it('22 carats cut to two places is 916.66', () => {
		expect(round(fromKarat(decimal('22')).perMille, cent, 'down').toFixed(2)).toBe('916.66');
	});

	// source: Portuguese gold of 800 parts per thousand is struck 19.2 kt, from memory
	it('800 parts per thousand is 19.2 kt', () => {
		expect(exactToText(karatsOf(fromPerMille(decimal('800'))))).toBe('96/5');
	});

	// source: US guides for jewellery, 16 CFR 23.3: fine gold is 24 karats; facts of the trade: 18 kt holds more than 10 kt
	it('more karats is more gold', () => {
		expect(perMilleNumber(fromKarat(decimal('18')))).toBeGreaterThan(perMilleNumber(fromKarat(decimal('10'))));
	});
});

describe('fineness as a minimum', () => {
	// source: Tukes (Finland), articles of precious metals, fineness requirements: gold of 588 takes mark 585, of 584 takes 375
	const taken = [['588', '585'], ['584', '375'], ['585', '585'], ['916', '916'], ['998.9', '916']] as const;
	it.each(taken)('gold of %s takes mark %s', (fineness, mark) => {
		expect(exactToText(largestMark(fromPerMille(decimal(fineness)))!.perMille)).toBe(mark);
	});

	// source: same page: at least platinum 500, gold 375, palladium 500, silver 800 to be sold as such. Our list holds the control marks,
	// whose lowest for platinum is 850 (from memory)
	it('gold under 375, silver under 800 and palladium under 500 take no mark', () => {
		expect(largestMark(fromPerMille(decimal('374.9')), 'Au')).toBeNull();
		expect(largestMark(fromPerMille(decimal('799')), 'Ag')).toBeNull();
		expect(largestMark(fromPerMille(decimal('499')), 'Pd')).toBeNull();
	});

	// source: ISO 9202 (minus tolerances are not allowed), seen in its published scope
	it('the minimum law takes nothing off', () => {
		const mark = { metal: 'Au', fineness: fromPerMille(decimal('585')) } as const;
		const least = legalMinimum(mark, 'minimum', { solder: true, watchCaseOrFlatware: false });
		expect(perMilleNumber(least)).toBe(585);
	});
});

describe('tolerances of the National Stamping Act', () => {
	const gold = (karats: string) => ({ metal: 'Au' as const, fineness: fromKarat(decimal(karats)) });
	const least = (karats: string, law: 'us-1981' | 'us-before-1981', solder: boolean, watchCaseOrFlatware: boolean) =>
		round(legalMinimum(gold(karats), law, { solder, watchCaseOrFlatware }).perMille, cent, 'half-up').toFixed(2);

	// source: 15 U.S.C. 295 as amended by Pub. L. 94-450, in force 1 October 1981
	it.each([
		['14', false, false, '580.33'], ['14', true, false, '576.33'], ['14', true, true, '580.33'], ['14', false, true, '580.33'],
		['10', false, false, '413.67'], ['10', true, false, '409.67'], ['18', false, false, '747.00'], ['18', true, false, '743.00']
	])('since 1981: %s kt, solder %s, watch case or flatware %s: at least %s', (karats, solder, flat, perMille) => {
		expect(least(karats, 'us-1981', solder, flat)).toBe(perMille);
	});

	// source: 15 U.S.C. 295, notes on the 1976 amendment: before it, half a carat; one carat with solder; watch cases and flatware
	// three one-thousandths
	it.each([
		['14', false, false, '562.50'], ['14', true, false, '541.67'], ['14', false, true, '580.33'], ['18', false, false, '729.17'],
		['10', true, false, '375.00']
	])('before 1981: %s kt, solder %s, watch case or flatware %s: at least %s', (karats, solder, flat, perMille) => {
		expect(least(karats, 'us-before-1981', solder, flat)).toBe(perMille);
	});

	it('before 1981, 14 kt was lawful at 13.5 kt, and with solder at 13 kt', () => {
		const at = (solder: boolean) => exactToText(karatsOf(legalMinimum(gold('14'), 'us-before-1981', { solder, watchCaseOrFlatware: false })));
		expect(at(false)).toBe('27/2');
		expect(at(true)).toBe('13');
	});

	// source: 15 U.S.C. 296, from memory
	it.each([
		['925', false, '921'], ['925', true, '915'], ['900', false, '896'], ['900', true, '890']
	])('silver of %s, solder %s: at least %s', (mark, solder, perMille) => {
		const content = { metal: 'Ag' as const, fineness: fromPerMille(decimal(mark)) };
		expect(exactToText(legalMinimum(content, 'us-1981', { solder, watchCaseOrFlatware: false }).perMille)).toBe(perMille);
	});
});

describe('filled layers', () => {
	// source: 16 CFR 23.3: the fraction is of the weight of metal in the article; 1/20 14 kt is 29.17 parts per thousand by arithmetic
	it('1/20 14 kt holds 29.17 g of gold a kilogram, 1/20 12 kt 25 g, 1/10 10 kt 41.67 g', () => {
		const kilogram = (share: bigint, karats: string) =>
			round(layerFineMass(mass('1000'), ratio(1n, share), 'Au', fromKarat(decimal(karats))).grams, cent, 'half-up').toFixed(2);
		expect(kilogram(20n, '14')).toBe('29.17');
		expect(kilogram(20n, '12')).toBe('25.00');
		expect(kilogram(10n, '10')).toBe('41.67');
	});
});

describe('alligation by fine mass', () => {
	// source: Warren, A Practical Treatise on Mechanical Dentistry, pp. 206-207: 1 dwt of 16 ct is raised to 18 ct by 1/3 dwt of fine
	// gold or by 1/2 dwt of 22 ct; 6 oz of fine gold reduced to 16 ct make 9 oz
	it('makes 18 carat of what the treatise mixes, and 16 carat of 6 ounces in 9', () => {
		const third = ratio(1n, 3n);
		const fine16 = Number(shareOf(fromKarat(decimal('16'))).n) / Number(shareOf(fromKarat(decimal('16'))).d);
		expect((fine16 + Number(third.n) / Number(third.d)) / (1 + 1 / 3)).toBeCloseTo(18 / 24, 12);
		expect((fine16 + 0.5 * (22 / 24)) / 1.5).toBeCloseTo(18 / 24, 12);
		expect(exactToText(fineMass(mass('9'), 'Au', fromKarat(decimal('16'))).grams)).toBe('6');
	});
});
