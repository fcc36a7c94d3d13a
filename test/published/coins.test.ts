import { describe, expect, it } from 'vitest';
import { coinById } from '../../src/trade/metal/coins.ts';
import { fineMass } from '../../src/trade/metal/fine-mass.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { divide, exact, toNumber } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';

const coin = (id: string) => {
	const found = coinById(id);
	if (found === null) throw new Error(id);
	return found;
};
const fine = (id: string) => {
	const { mass, contents } = coin(id);
	return fineMass(mass, contents[0]!.metal, contents[0]!.fineness).grams;
};
const ounces = (id: string, step: string) => round(divide(fine(id), exact(decimal('31.1034768'))), decimal(step), 'half-up');
const GRAIN = 0.06479891;

describe('coins of the United Kingdom', () => {
	// source: Coinage Act 1870 schedule as printed in Encyclopædia Britannica, 9th edition, vol. 16 "Mint"; the gold rows stand in the
	// Coinage Act 1971 Sch. 1 Part I
	it.each([
		['five-pound-gold', '39.94028'], ['two-pound-gold', '15.97611'], ['sovereign', '7.98805'], ['half-sovereign', '3.99402'],
		['uk-florin-925', '11.31036'], ['uk-shilling-925', '5.65518'], ['uk-sixpence-925', '2.82759'], ['uk-crown-925', '28.2759'],
		['uk-half-crown-925', '14.13795']
	])('%s weighs %s g', (id, grams) => expect(coin(id).mass.grams.toString()).toBe(grams));

	// source: Act 56 Geo. III c. 68: 934 sovereigns and a half from 20 troy pounds of 22 carat gold; an independent route
	it('a sovereign is 20 troy pounds of standard gold in 934.5 parts, 0.2354 ozt fine', () => {
		const grains = (20 * 5760) / 934.5;
		// printed cut, not rounded: 123.27447
		expect(Math.floor(grains * 1e5)).toBe(12_327_447);
		expect(coin('sovereign').mass.grams.toNumber()).toBeCloseTo(grains * GRAIN, 5);
		expect(ounces('sovereign', '0.0001').toFixed(4)).toBe('0.2354');
	});

	// source: same act: 66 shillings from a troy pound of silver of 925 parts per thousand
	it('a shilling is a troy pound of sterling in 66 parts', () => {
		expect(coin('uk-shilling-925').mass.grams.toNumber()).toBeCloseTo((5760 / 66) * GRAIN, 4);
	});

	// source: Coinage Act 1870 schedule: least current weight of a sovereign 7.93787 g (122.5 grains)
	it('a worn sovereign leaves the currency at 0.63 % under its mass', () => {
		expect(122.5 * GRAIN).toBeCloseTo(7.93787, 5);
		expect(1 - 7.93787 / coin('sovereign').mass.grams.toNumber()).toBeCloseTo(0.0063, 4);
	});
});

describe('coins of the United States', () => {
	// source: 31 U.S.C. 5112(a)(7) to (10): mass, diameter and fine gold
	it.each([
		['us-eagle-50', '33.931', '32.7', 1], ['us-eagle-25', '16.966', '27.0', 0.5], ['us-eagle-10', '8.483', '22.0', 0.25],
		['us-eagle-5', '3.393', '16.5', 0.1]
	])('%s weighs %s g, measures %s mm and holds %s ozt', (id, grams, diameter, ounce) => {
		expect(coin(id).mass.grams.toString()).toBe(grams);
		expect(coin(id).diameter).toBe(diameter);
		expect(ounces(id, '0.0001').toNumber()).toBeCloseTo(ounce, 4);
	});

	// source: 31 U.S.C. 5112(e): 40.6 mm, 31.103 g, 999 fine silver (from memory)
	it('the silver dollar of bullion weighs 31.103 g and measures 40.6 mm', () => {
		expect(coin('us-silver-eagle').mass.grams.toString()).toBe('31.103');
		expect(coin('us-silver-eagle').diameter).toBe('40.6');
	});

	// source: gold of 900 parts per thousand at 25.8 grains a dollar, 23.22 grains fine, as printed in banking handbooks of the time
	const dollarCoins = [['us-double-eagle', 20], ['us-10-gold', 10], ['us-5-gold', 5], ['us-2.5-gold', 2.5]] as const;
	it.each(dollarCoins)('%s weighs 25.8 grains a dollar', (id, dollars) => {
		expect(coin(id).mass.grams.toNumber()).toBeCloseTo(25.8 * dollars * GRAIN, 9);
		expect(toNumber(fine(id))).toBeCloseTo(23.22 * dollars * GRAIN, 9);
	});

	// source: bags of 5000 dollars in gold coin weigh 268.75 troy ounces, same handbooks
	it('250 double eagles weigh 268.75 ozt', () => {
		expect((coin('us-double-eagle').mass.grams.toNumber() * 250) / 31.1034768).toBeCloseTo(268.75, 9);
	});

	// source: a silver dollar weighs 412.5 grains with 371.25 grains of pure silver, same handbooks
	it('a silver dollar is 26.73 g with 0.7734 ozt of silver', () => {
		expect(round(coin('us-dollar-silver').mass.grams, decimal('0.01'), 'half-even').toString()).toBe('26.73');
		expect(toNumber(fine('us-dollar-silver'))).toBeCloseTo(371.25 * GRAIN, 9);
		expect(ounces('us-dollar-silver', '0.0001').toFixed(4)).toBe('0.7734');
	});

	// source: Coinage Act of 1873, 17 Stat. 427 Sec. 15: half dollar twelve and one-half grams, quarter one half and dime one fifth of it
	it('a half dollar weighs 12.5 g, a quarter 6.25 g and a dime 2.5 g', () => {
		expect(['us-half-90', 'us-quarter-90', 'us-dime-90'].map((id) => coin(id).mass.grams.toString())).toEqual(['12.5', '6.25', '2.5']);
	});

	// source: dollars of small silver hold 0.7234 ozt, common practice, no source
	it('one dollar of 90 % halves, quarters or dimes holds 0.7234 ozt when new', () => {
		for (const [id, count] of [['us-half-90', 2], ['us-quarter-90', 4], ['us-dime-90', 10]] as const) {
			expect((toNumber(fine(id)) * count) / 31.1034768).toBeCloseTo(0.7234, 4);
		}
	});

	// source: 31 U.S.C. 5112(a)(5) and (b): five cents 5 g, 75 % copper and 25 % nickel; (a)(6): one cent 3.11 g
	it('five cents are 3.75 g of copper and 1.25 g of nickel; a cent is 3.11 g', () => {
		const grams = coin('us-5-cent').contents.map(({ metal, fineness }) => toNumber(fineMass(coin('us-5-cent').mass, metal, fineness).grams));
		expect(grams).toEqual([3.75, 1.25]);
		expect(coin('us-cent-bronze').mass.grams.toString()).toBe('3.11');
	});

	// source: Act of 27 March 1942 (five cents of 35 % silver, 56 % copper, 9 % manganese), from memory
	it('a war-time five cents holds 0.0563 ozt of silver', () => {
		expect(ounces('us-war-nickel', '0.0001').toFixed(4)).toBe('0.0563');
	});
});

describe('coins of other places', () => {
	// source: published figures of the Krugerrand: 33.9305, 16.9653, 8.4826 and 3.3931 g with 1, 1/2, 1/4 and 1/10 ozt fine
	it.each([
		['krugerrand', '33.9311', 33.9305], ['krugerrand-half', '16.9655', 16.9653], ['krugerrand-quarter', '8.4828', 8.4826],
		['krugerrand-tenth', '3.3931', 3.3931]
	])(
		'%s weighs 12/11 of its fine gold: %s g',
		(id, grams, printed) => {
			expect(round(coin(id).mass.grams, decimal('0.0001'), 'half-even').toFixed(4)).toBe(grams);
			// the printed gross masses are a little rounded: within 0.6 mg
			expect(Math.abs(coin(id).mass.grams.toNumber() - printed)).toBeLessThan(0.0007);
		}
	);

	// source: Latin Monetary Union (155 pieces of 20 francs from a kilogram of 900 gold), from memory
	it('20 francs are a kilogram in 155 parts, 0.1867 ozt fine', () => {
		expect(coin('francs-20').mass.grams.toNumber()).toBeCloseTo(1000 / 155, 5);
		expect(ounces('francs-20', '0.0001').toFixed(4)).toBe('0.1867');
	});

	// source: German Coinage Act of 1873 (1395 marks from 500 g of fine gold), from memory
	it('20 marks hold 500 g of fine gold in 69.75 parts', () => {
		expect(toNumber(fine('mark-20'))).toBeCloseTo(500 / 69.75, 3);
	});

	// source: Indian Coinage Act 1906: 180 grains, eleven twelfths fine: from memory; 180 grains is a tola of 3/8 ozt
	it('a silver rupee weighs 11.6638038 g with 165 grains of silver', () => {
		expect(coin('rupee-silver').mass.grams.toString()).toBe('11.6638038');
		expect(toNumber(fine('rupee-silver'))).toBeCloseTo(165 * GRAIN, 9);
	});

	// source: mint specifications, from memory: Austrian ducat 3.4909 g with 3.442 g of gold; 50 pesos 37.5 g of gold; thaler
	// 23.39 g of silver
	it('ducat, 50 pesos and thaler hold what their mints say', () => {
		expect(toNumber(fine('ducat'))).toBeCloseTo(3.442, 3);
		expect(toNumber(fine('pesos-50'))).toBeCloseTo(37.5, 3);
		expect(toNumber(fine('thaler-maria-theresa'))).toBeCloseTo(23.39, 2);
	});
});
