import { describe, expect, it } from 'vitest';
import { perMilleNumber } from '../../src/trade/metal/fineness.ts';
import { controlMarks } from '../../src/trade/metal/law.ts';
import { parseMark } from '../../src/trade/metal/mark.ts';
import { coatingMinimum } from '../../src/trade/metal/plated.ts';
import { exactToText } from '../../src/trade/number/exact.ts';

const claim = (text: string) => {
	const result = parseMark(text);
	if (!result.ok) return result.problem.kind;
	return result.value.contents.map(({ metal, fineness }) => `${metal} ${exactToText(fineness.perMille)}`).join(' ');
};

describe('marks of the United Kingdom', () => {
	// source: Hallmarking Act 1973 Sch. 2 Part I: gold 375, 585, 750, 916.6 (struck 916); silver 925, 958.4 (Britannia); platinum 950
	it.each([
		['375', 'Au 375'], ['585', 'Au 585'], ['750', 'Au 750'], ['916.6', 'Au 4583/5'], ['916', 'Au 916'], ['925', 'Ag 925'],
		['958.4', 'Ag 4792/5'],
		['Britannia', 'Ag 4792/5'], ['Pt 950', 'Pt 950']
	])('%s promises %s', (mark, promised) => expect(claim(mark)).toBe(promised));

	// source: hallmarkingconvention.org, United Kingdom: platinum 850 900 950 999, gold 375 585 750 916 990 999, palladium 500 950 999,
	// silver 800 925 958 999
	it.each([
		['Pt', ['850', '900', '950', '999']], ['Au', ['375', '585', '750', '916', '990', '999']], ['Pd', ['500', '950', '999']],
		['Ag', ['800', '925', '958', '999']]
	] as const)('every lawful standard of %s is read with its metal named', (metal, standards) => {
		for (const standard of standards) expect(claim(`${metal} ${standard}`)).toBe(`${metal} ${standard}`);
	});
});

describe('marks of the Convention', () => {
	// source: Vienna Convention news no. 31 (2012): Pt 950, Au 750, 585, Ag 925, 800 are common control marks in all states
	it.each([['Pt', '950'], ['Au', '750'], ['Au', '585'], ['Ag', '925'], ['Ag', '800']] as const)('%s %s is a control mark', (metal, mark) => {
		expect(controlMarks[metal]!.map(perMilleNumber)).toContain(Number(mark));
		expect(claim(`${metal} ${mark}`)).toBe(`${metal} ${mark}`);
	});
});

describe('marks of the United States', () => {
	// source: 16 CFR 23.5: "sterling", "ster." at least 925; "coin", "coin silver" at least 900
	it.each([['Sterling', 'Ag 925'], ['Ster.', 'Ag 925'], ['Sterling Silver', 'Ag 925'], ['coin', 'Ag 900'], ['coin silver', 'Ag 900']])(
		'%s promises %s',
		(mark, promised) => expect(claim(mark)).toBe(promised)
	);

	// source: 16 CFR 23.3: gold filled is at least one twentieth by weight unless the fraction is marked; 14/480 by arithmetic
	it('1/20 14 kt gold filled promises 14/480 of the whole, and without a fraction is asked about', () => {
		expect(claim('1/20 14 Kt. Gold Filled')).toBe('Au 175/6');
		expect(175 / 6 / 1000).toBeCloseTo(14 / 480, 15);
		expect(claim('14 Kt. Gold Filled')).toBe('mark-layer-share-missing');
	});

	// source: 16 CFR 23.4 (16 CFR 23.5 before 2018): vermeil is sterling under at least 2.5 micrometres of fine gold
	it('vermeil promises sterling below and 2.5 µm of gold above', () => {
		expect(claim('vermeil')).toBe('Ag 925');
		expect(coatingMinimum.vermeil.toString()).toBe('2.5');
	});

	// source: 16 CFR 23.3 footnotes: electroplate at least 7 millionths of an inch, heavy at least 100 millionths, seen in copies
	it('electroplate is 7 and heavy electroplate 100 millionths of an inch, as printed in micrometres', () => {
		expect(coatingMinimum['gold-electroplate'].toNumber()).toBeCloseTo(7 * 0.0254, 2);
		expect(coatingMinimum['heavy-gold-electroplate'].toNumber()).toBeCloseTo(100 * 0.0254, 1);
	});

	// source: 15 U.S.C. 295 (a karat mark is a karat claim); marks in common practice
	it('14 kt and 585 are two claims, 1.67 parts per thousand apart', () => {
		const karat = parseMark('14k');
		const figures = parseMark('585');
		expect(karat.ok && figures.ok).toBe(true);
		if (!karat.ok || !figures.ok) return;
		expect(perMilleNumber(figures.value.contents[0]!.fineness) - perMilleNumber(karat.value.contents[0]!.fineness)).toBeCloseTo(5 / 3, 12);
	});
});

describe('marks of the world', () => {
	// source: ISO 9202, list of recommended fineness, from memory
	it.each([
		['Au', ['375', '585', '750', '916', '990', '999']], ['Ag', ['800', '830', '925', '958', '999']], ['Pt', ['850', '900', '950', '999']],
		['Pd', ['500', '950', '999']]
	] as const)('%s in every recommended fineness is read', (metal, list) => {
		for (const fineness of list) expect(claim(`${metal}${fineness}`)).toBe(`${metal} ${fineness}`);
	});

	// source: lists of millesimal stamps in common practice: 333 is 8 kt, 417 is 10 kt, 583 is 14 kt (Soviet), 875 is 21 kt gold or
	// Soviet silver
	it('stamps that stand for karats are within half a part per thousand of them', () => {
		for (const [stamp, karats] of [['333', 8], ['375', 9], ['417', 10], ['583', 14], ['625', 15], ['750', 18], ['917', 22]] as const) {
			expect(claim(stamp)).toBe(`Au ${stamp}`);
			expect(Math.abs(Number(stamp) - (karats / 24) * 1000)).toBeLessThan(0.5);
		}
		expect(claim('875')).toBe('mark-metal-ambiguous');
	});

	// source: same lists: platinum with iridium is stamped 900 PLAT 100 IRID or 10% IRID PLAT
	it('reads platinum with iridium', () => {
		expect(claim('900 Plat 100 Irid')).toBe('Pt 900 Ir 100');
		expect(claim('10% irid plat')).toBe('Pt 900 Ir 100');
	});
});
