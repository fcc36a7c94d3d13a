import { describe, expect, it } from 'vitest';
import { allOf, densitiesOf } from '../../src/trade/evidence/density-range.ts';
import { alloy, commonAlloys, finenessIn, type Share } from '../../src/trade/metal/alloy.ts';
import { densityOf, idealDensity } from '../../src/trade/metal/density.ts';
import { perMilleNumber } from '../../src/trade/metal/fineness.ts';
import { metals } from '../../src/trade/metal/metals.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { ratio, toNumber } from '../../src/trade/number/exact.ts';
import { standardUncertainty } from '../../src/trade/uncertainty/uncertain.ts';

const mix = (...shares: [Share['metal'], string][]) => {
	const made = alloy('mix', shares.map(([metal, perMille]) => ({ metal, share: ratio(decimal(perMille), 1000n) })));
	if (!made.ok) throw new Error(made.problem.kind);
	return made.value;
};

describe('mixing by volume', () => {
	// source: a printed worked example of a jewellers' handbook: 14 kt yellow of 583 Au, 104 Ag, 313 Cu with 19.32, 10.49, 8.96 is 13.33
	it('583 gold, 104 silver and 313 copper give 13.33 g/cm³', () => {
		const parts = [
			{ share: 0.583, density: 19.32 },
			{ share: 0.104, density: 10.49 },
			{ share: 0.313, density: 8.96 }
		];
		expect(idealDensity(parts).toFixed(2)).toBe('13.33');
		// second route: the printed lines 30.182 + 9.876 + 34.956 = 75.014, thousand divided by it (the printed reciprocal of silver,
		// 0.094966, belongs to 10.53 and not to 10.49; the slips of the printed lines do not reach the second place)
		expect((1000 / (30.182 + 9.876 + 34.956)).toFixed(2)).toBe('13.33');
	});

	// source: Lewis, Philosophical Transactions 1757: platina 17.000 and gold 19.285 in equal parts, "by calculation" 18.142
	it('does not make the mistake of 1757: 18.142 is the arithmetic mean, volumes that add give 18.071', () => {
		const half = idealDensity([
			{ share: 0.5, density: 17 },
			{ share: 0.5, density: 19.285 }
		]);
		expect(half.toFixed(3)).toBe('18.071');
		expect(half).not.toBeCloseTo(18.142, 2);
		expect((17 + 19.285) / 2).toBeCloseTo(18.1425, 9);
		// second route: one gram of each, mass over volume
		expect(half).toBeCloseTo(2 / (1 / 17 + 1 / 19.285), 12);
	});
});

describe('alloys against handbooks', () => {
	// source: handbook sheets of sterling silver: 10.36 g/cm³ (ideal 10.365)
	it('sterling is 10.36 g/cm³ within the claim of the model', () => {
		const density = densityOf(commonAlloys.sterling);
		expect(density.value).toBeCloseTo(10.365, 3);
		expect(Math.abs(density.value - 10.36)).toBeLessThan(2 * standardUncertainty(density));
		expect(standardUncertainty(density) / density.value).toBeLessThan(0.003);
	});

	// source: density of cartridge and yellow brass 8.4 to 8.7 g/cm³ (look-alike ranges in common practice)
	it('brass of two thirds copper is 8.4 to 8.7 g/cm³ where the plain mixture would say 8.25', () => {
		const density = densityOf(commonAlloys.brass);
		const ideal = 1 / (2 / 3 / 8.95 + 1 / 3 / 7.14);
		expect(ideal).toBeCloseTo(8.25, 2);
		expect(density.value).toBeGreaterThan(8.39);
		expect(density.value).toBeLessThan(8.7);
	});

	// source: stainless steels are 7.7 to 8.0 g/cm³ (look-alike ranges in common practice)
	it('the common stainless steel is 7.7 to 8.0 g/cm³', () => {
		const density = densityOf(commonAlloys.stainless).value;
		expect(density).toBeGreaterThan(7.7);
		expect(density).toBeLessThan(8);
	});

	// source: printed density ranges of jewellery metals: 18 ct yellow 15.2 to 15.9, 22 ct 17.7 to 17.8, 950 platinum 20.1
	it('18 kt yellow of equal silver and copper lies in the printed range 15.2 to 15.9', () => {
		const density = densityOf(mix(['Au', '750'], ['Ag', '125'], ['Cu', '125'])).value;
		expect(density).toBeGreaterThan(15.2);
		expect(density).toBeLessThan(15.9);
	});

	it('22 kt with silver and copper is 17.7 to 17.8 within one per cent', () => {
		const density = densityOf(mix(['Au', '916'], ['Ag', '42'], ['Cu', '42'])).value;
		expect(Math.abs(density / 17.75 - 1)).toBeLessThan(0.01);
	});

	// source: casting-house table of specific gravities: platinum with a tenth of iridium 21.54
	it('platinum with a tenth of iridium is 21.54 within its own doubt', () => {
		const density = densityOf(mix(['Pt', '900'], ['Ir', '100']));
		expect(Math.abs(density.value - 21.54)).toBeLessThan(2 * standardUncertainty(density));
	});

	// source: same table: 18 kt red 15.18, 14 kt red 13.26 (recipes not printed: taken as gold and copper alone, so 3 % is allowed)
	it('red golds are within three per cent of the printed figures', () => {
		expect(Math.abs(densityOf(mix(['Au', '750'], ['Cu', '250'])).value / 15.18 - 1)).toBeLessThan(0.03);
		expect(Math.abs(densityOf(mix(['Au', '583'], ['Cu', '417'])).value / 13.26 - 1)).toBeLessThan(0.03);
	});
});

describe('facts of the trade', () => {
	// source: common practice, no source
	it('sterling is 92.5 % silver and 7.5 % copper; brass two thirds copper; yellow gold 80 % gold; stainless 80.6, 18, 1 and 0.4 %', () => {
		const percents = (id: keyof typeof commonAlloys) =>
			Object.fromEntries(commonAlloys[id].shares.map(({ metal }) => [metal, perMilleNumber(finenessIn(commonAlloys[id], metal)) / 10]));
		expect(percents('sterling')).toEqual({ Ag: 92.5, Cu: 7.5 });
		expect(percents('yellowGold')).toEqual({ Au: 80, Ag: 20 });
		expect(percents('stainless')).toEqual({ Fe: 80.6, Cr: 18, Ni: 1, C: 0.4 });
		expect(percents('brass').Cu).toBeCloseTo(200 / 3, 12);
		expect(percents('brass').Zn).toBeCloseTo(100 / 3, 12);
	});

	// source: common practice, no source: the density of an alloy whose atoms replace each other lies between those of its metals
	it('every common alloy lies between its metals', () => {
		for (const common of Object.values(commonAlloys)) {
			const all = common.shares.map(({ metal }) => metals[metal].density);
			const { value } = densityOf(common);
			expect(value, common.name).toBeGreaterThanOrEqual(Math.min(...all));
			expect(value, common.name).toBeLessThanOrEqual(Math.max(...all));
		}
	});

	// source: common practice, no source: more karats is more gold, and gold is the heaviest of its usual companions
	it('18 kt is denser than 14 kt and 14 kt than 10 kt of the same companions', () => {
		const at = (gold: string, half: string) => densityOf(mix(['Au', gold], ['Ag', half], ['Cu', half])).value;
		const [ten, fourteen, eighteen] = [at('416', '292'), at('584', '208'), at('750', '125')];
		expect(ten).toBeLessThan(fourteen);
		expect(fourteen).toBeLessThan(eighteen);
	});
});

describe('elements', () => {
	// source: CRC Handbook of Chemistry and Physics, boiling points in °C, seen in a copy
	const boiling = [['Zn', 907], ['Cd', 767], ['Pb', 1749], ['Ag', 2162], ['Cu', 2560], ['Au', 2836]] as const;
	it.each(boiling)('%s boils at %s °C', (metal, celsius) => {
		expect(metals[metal].boiling).toBe(celsius);
	});

	// source: same: zinc and cadmium boil away before copper, silver or gold melt or just about then: the fume of the melt
	it('cadmium and zinc boil below the melting point of silver', () => {
		expect(metals.Cd.boiling).toBeLessThan(metals.Ag.melting);
		expect(metals.Zn.boiling).toBeLessThan(metals.Ag.melting);
	});

	// source: handbook table of metals in a second, older edition: Au 19.32, Ag 10.49, Cu 8.96, Cd 8.65, Cr 7.19, Co 8.90 g/cm³
	it.each([['Au', 19.32], ['Ag', 10.49], ['Cu', 8.96], ['Cd', 8.65], ['Cr', 7.19], ['Co', 8.9]] as const)(
		'%s has a density within two of its uncertainties of %s',
		(metal, printed) => expect(Math.abs(metals[metal].density - printed)).toBeLessThanOrEqual(2 * metals[metal].densityU)
	);

	// source: lattice constants from memory (a in nm at 20 °C, four atoms in a cubic face-centred cell): an independent route
	it.each([['Au', 0.40786], ['Ag', 0.40862], ['Cu', 0.36149], ['Pt', 0.39236], ['Pd', 0.3889], ['Ni', 0.35238]] as const)(
		'%s of lattice constant %s nm weighs what the table says within 0.5 %%',
		(metal, a) => {
			const density = (4 * metals[metal].atomicMass) / (6.02214076e23 * (a * 1e-7) ** 3);
			expect(Math.abs(density / metals[metal].density - 1)).toBeLessThan(0.005);
		}
	);

	it('pure metals carry no claim of mixing', () => {
		expect(Object.keys(densityOf({ shares: [{ metal: 'Au', share: ratio(1n, 1n) }] }).contributions)).toEqual(['density:Au']);
		expect(toNumber(ratio(1n, 1n))).toBe(1);
	});
});

/**
 * Source: a printed table of densities of jewellery metals, "approximate": 9 ct 10.9 to 12.7, 14 ct 12.9 to 14.6, 18 ct yellow 15.2 to 15.9, 18 ct
 * white 14.7 to 16.9, 22 ct 17.7 to 17.8, 950 platinum 20.1; and the casting-house table above for red gold; handbook sheets for sterling.
 */
describe('colour families against printed ranges', () => {
	const spans = (metal: 'Au' | 'Ag' | 'Pt', perMille: number, ids?: readonly string[]) =>
		allOf(densitiesOf(metal, perMille).filter(({ family }) => ids === undefined || ids.includes(family)))!;
	it.each([
		['9 ct', 'Au', 375, undefined, 10.9, 12.7],
		['14 ct', 'Au', 585, undefined, 12.9, 14.6],
		['18 ct yellow', 'Au', 750, ['yellow'], 15.2, 15.9],
		['18 ct white', 'Au', 750, ['white-nickel', 'white-palladium'], 14.7, 16.9],
		['18 ct red', 'Au', 750, ['red'], 15.18, 15.18],
		['14 ct red', 'Au', 583, ['red'], 13.26, 13.26],
		['22 ct', 'Au', 917, ['yellow', 'red'], 17.7, 17.8],
		['sterling', 'Ag', 925, undefined, 10.36, 10.36],
		['950 platinum', 'Pt', 950, undefined, 20.1, 20.1]
	] as const)('%s lies within the families and their claim', (_, metal, perMille, ids, low, high) => {
		const range = spans(metal, perMille, ids);
		expect(range.low).toBeLessThanOrEqual(low);
		expect(range.high).toBeGreaterThanOrEqual(high);
	});
	it('and the ranges are no wider than they must be: 14 kt is never 9 ct, 18 ct never 22 ct', () => {
		const yellows = ['yellow', 'red', 'green'];
		expect(spans('Au', 585, ['yellow']).low).toBeGreaterThan(spans('Au', 375, ['yellow']).high);
		expect(spans('Au', 917, yellows).low).toBeGreaterThan(spans('Au', 750, yellows).high);
		expect(spans('Ag', 925).high - spans('Ag', 925).low).toBeLessThan(0.1);
	});
});
