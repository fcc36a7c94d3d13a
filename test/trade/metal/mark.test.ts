import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { perMilleNumber } from '../../../src/trade/metal/fineness.ts';
import { parseMark, type Mark } from '../../../src/trade/metal/mark.ts';
import { metalIds } from '../../../src/trade/metal/metals.ts';
import { exactToText } from '../../../src/trade/number/exact.ts';

const shown = (mark: Mark) => {
	const contents = mark.contents.map(({ metal, fineness }) => `${metal} ${exactToText(fineness.perMille)}`);
	return `${mark.text} | ${mark.kind} | ${contents.join(' + ')}`;
};
const read = (text: string) => {
	const result = parseMark(text);
	return result.ok ? shown(result.value) : result.problem.kind;
};

describe('a mark as people type it', () => {
	it.each(['14k', '14 kt', '14ct', '14K', 'K14', '14 karat', '14kt gold', '14 carat', '14k yellow', '14KT.'])(
		'reads "%s" as 14 kt',
		(text) => expect(read(text)).toBe('14 kt | karat | Au 1750/3')
	);

	it.each([
		['585', '585 | millesimal | Au 585'],
		['Au 585', '585 | millesimal | Au 585'],
		['58.5%', '585 | millesimal | Au 585'],
		['.925', '925 | millesimal | Ag 925'],
		['S925', '925 | millesimal | Ag 925'],
		['sterling', 'sterling | named | Ag 925'],
		['ster', 'sterling | named | Ag 925'],
		['Sterling Silver 925', 'sterling | named | Ag 925'],
		['coin silver', 'coin | named | Ag 900'],
		['Britannia', 'britannia | named | Ag 4792/5'],
		['Pt950', 'Pt 950 | millesimal | Pt 950'],
		['plat 950', 'Pt 950 | millesimal | Pt 950'],
		['950 pt', 'Pt 950 | millesimal | Pt 950'],
		['Pt 585', 'Pt 585 | millesimal | Pt 585'],
		['850', 'Pt 850 | millesimal | Pt 850'],
		['Pd500', 'Pd 500 | millesimal | Pd 500'],
		['pall 950', 'Pd 950 | millesimal | Pd 950'],
		['999 gold', 'Au 999 | millesimal | Au 999'],
		['Ag 900', 'Ag 900 | millesimal | Ag 900'],
		['gold 9999', 'Au 999.9 | millesimal | Au 9999/10'],
		['fine silver', 'Ag 999 | millesimal | Ag 999'],
		['24k', '24 kt | karat | Au 1000'],
		['19.2k', '19.2 kt | karat | Au 800'],
		['14KP', '14 kt plumb | karat | Au 1750/3'],
		['18k 750', '18 kt | karat | Au 750'],
		['585 14k', '14 kt | karat | Au 1750/3'],
		['1/20 14K GF', '1/20 14 kt | filled | Au 175/6'],
		['12k gf 1/20', '1/20 12 kt | filled | Au 25'],
		['1/40 10k rgp', '1/40 10 kt | filled | Au 125/12'],
		['1/20 925', '1/20 925 | filled | Ag 185/4'],
		['rgp', 'rolled gold plate | plated | '],
		['18K HGE', 'heavy gold electroplate | plated | '],
		['GE', 'gold electroplate | plated | '],
		['gold plated', 'gold plated | plated | '],
		['14k gold plated', 'gold plated | plated | '],
		['EPNS', 'silver plated | plated | '],
		['silver plate', 'silver plated | plated | '],
		['vermeil', 'vermeil | plated | Ag 925'],
		['925 gold plated', 'gold plated 925 | plated | Ag 925'],
		['weighted sterling', 'weighted 925 | named | Ag 925'],
		['800 weighted', 'weighted 800 | named | Ag 800'],
		['Au 625 Pd 180 Ag 120', 'Au 625 Pd 180 Ag 120 | millesimal | Au 625 + Pd 180 + Ag 120'],
		['10% irid plat', 'Pt 900 Ir 100 | millesimal | Pt 900 + Ir 100'],
		['brass', 'brass | named | Cu 2000/3 + Zn 1000/3'],
		['German silver', 'nickel silver | named | Cu 600 + Zn 200 + Ni 200'],
		['copper', 'copper | named | Cu 1000']
	])('reads "%s" as %s', (text, mark) => expect(read(text)).toBe(mark));

	it('takes 916 as struck and 22 ct as 22/24: two claims', () => {
		expect(read('916')).toBe('916 | millesimal | Au 916');
		expect(read('22ct')).toBe('22 kt | karat | Au 2750/3');
	});

	it.each([
		['', 'mark-missing'], ['   ', 'mark-missing'], ['💍', 'mark-unknown'], ['weighted', 'mark-unknown'], ['1/2 14k', 'mark-unknown'],
		['weighted 14k', 'mark-unknown'], ['gold silver', 'mark-unknown'], ['1/20 925 gf', 'mark-unknown'], ['٩٢٥', 'mark-unknown'],
		['x'.repeat(200), 'mark-unknown'], ['15.5k', 'mark-karat-unknown'], ['0k', 'mark-karat-unknown'], ['25k', 'mark-karat-over-24'],
		['14k pt', 'mark-karat-not-gold'], ['1001', 'mark-over-whole'], ['Au 625 Pd 380', 'mark-over-whole'], ['586', 'mark-figures-unknown'],
		['14', 'mark-figures-unknown'], ['14 au', 'mark-figures-unknown'], ['999', 'mark-metal-ambiguous'], ['999.9', 'mark-metal-ambiguous'],
		['900', 'mark-metal-ambiguous'], ['950', 'mark-metal-ambiguous'], ['500', 'mark-metal-ambiguous'], ['gold', 'mark-fineness-missing'],
		['PLAT', 'mark-fineness-missing'], ['1/20 gf', 'mark-fineness-missing'], ['14k gf', 'mark-layer-share-missing'],
		['gold filled', 'mark-layer-share-missing'], ['14k 925', 'mark-two-marks'], ['sterling 14k', 'mark-two-marks']
	])('asks about or refuses "%s"', (text, kind) => expect(read(text)).toBe(kind));

	it('offers for 999 a choice of marks that it reads itself', () => {
		const result = parseMark('999');
		expect(result.ok).toBe(false);
		if (result.ok || result.problem.kind !== 'mark-metal-ambiguous') return;
		expect(result.problem.choices).toEqual(['Au 999', 'Ag 999', 'Pt 999', 'Pd 999']);
	});
});

describe('any mark', () => {
	const karat = fc.integer({ min: 6, max: 24 }).map((k) => `${k}k`);
	// tungsten and carbon are never struck; "W" beside karats means white
	const struck = fc.constantFrom(...metalIds.filter((id) => id !== 'W' && id !== 'C'));
	const named = fc.tuple(struck, fc.integer({ min: 100, max: 1000 })).map(([m, n]) => `${m} ${n}`);
	const filled = fc.tuple(fc.integer({ min: 10, max: 80 }), fc.integer({ min: 8, max: 18 })).map(([d, k]) => `1/${d} ${k}k gf`);
	const word = fc.constantFrom(
		'sterling', 'coin', 'britannia', 'vermeil', 'epns', 'hge', 'rgp', 'brass', 'bronze', 'gold plated 925', 'weighted 830', '925', '14kp'
	);

	it('reads its own normalised text as itself', () => {
		fc.assert(
			fc.property(fc.oneof(karat, named, filled, word), (text) => {
				const first = parseMark(text);
				expect(first.ok, text).toBe(true);
				if (!first.ok) return;
				expect(parseMark(first.value.text)).toEqual(first);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('reads every choice that it offers', () => {
		const asked = [
			'999', '900', '950', '500', '833', '875', '990', '999.5', '999.9', 'gold', 'silver', 'plat', 'pall', '14k gf', 'gf', '1/20 gf', '15.5k', '3k'
		];
		for (const text of asked) {
			const result = parseMark(text);
			expect(result.ok, text).toBe(false);
			if (result.ok) continue;
			const { problem } = result;
			const choices = 'choices' in problem ? problem.choices : 'nearest' in problem ? problem.nearest : [];
			expect(choices.length, text).toBeGreaterThan(1);
			for (const choice of choices) expect(parseMark(choice).ok, `${text}: ${choice}`).toBe(true);
		}
	});

	it('never promises more than the whole piece, whatever is typed', () => {
		const piece = fc.constantFrom(
			'14', 'k', 'kt', '925', ' ', '.', '/', '1/20', 'gf', 'gp', 'sterling', 'Au', 'Pt', '950', 'weighted', '%', '999', ',', '-', 'fine'
		);
		fc.assert(
			fc.property(fc.oneof(fc.string({ maxLength: 80 }), fc.array(piece, { maxLength: 8 }).map((parts) => parts.join(''))), (text) => {
				const result = parseMark(text);
				if (!result.ok) return;
				const total = result.value.contents.reduce((sum, { fineness }) => sum + perMilleNumber(fineness), 0);
				expect(total).toBeLessThanOrEqual(1000 + 1e-9);
				expect(result.value.text).not.toBe('');
			}),
			{ numRuns: 5_000 }
		);
	});
});
