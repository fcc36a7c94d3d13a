import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exactToText } from '../../../src/trade/number/exact.ts';
import { massOf } from '../../../src/trade/mass/weighing.ts';
import { parseLine, type LineOptions } from '../../../src/trade/lot/line.ts';
import { fineOf, netOf } from '../../../src/trade/piece/piece.ts';
import { hostile, nasty } from '../piece/some-pieces.ts';

// a thousand lots take a while on a busy machine
vi.setConfig({ testTimeout: 120_000 });

const read = (line: string, options?: LineOptions) => {
	const result = parseLine(line, options);
	if (!result.ok) return result.problem.kind;
	const { article, count, weighing, mark } = result.value;
	const fine = fineOf(result.value).map(({ metal, grams }) => `${metal} ${exactToText(grams)}`);
	return [article, count, `${weighing.typed} ${weighing.unit}`, mark, netOf(result.value).grams.toString(), fine.join(' ')];
};

describe('a piece as people type it', () => {
	it.each([
		['14k chain 12.4g x3', ['chain', 3, '12.4 g', '14 kt', '12.4', 'Au 217/30']],
		['x3 12.4g chain 14k', ['chain', 3, '12.4 g', '14 kt', '12.4', 'Au 217/30']],
		['3x 14 kt chain 12,4 grams', ['chain', 3, '12,4 g', '14 kt', '12.4', 'Au 217/30']],
		['14k, chain, 12.4 g, ×3', ['chain', 3, '12.4 g', '14 kt', '12.4', 'Au 217/30']],
		['3 pcs 14-karat chain 12.4 g', ['chain', 3, '12.4 g', '14 kt', '12.4', 'Au 217/30']],
		['925 8 dwt', ['', 1, '8 dwt', '925', '12.44139072', 'Ag 719267901/62500000']],
		['8dwt 925', ['', 1, '8 dwt', '925', '12.44139072', 'Ag 719267901/62500000']],
		['18k 5.2', ['', 1, '5.2 g', '18 kt', '5.2', 'Au 39/10']],
		['5,2 18k', ['', 1, '5,2 g', '18 kt', '5.2', 'Au 39/10']],
		['585 12,4', ['', 1, '12,4 g', '585', '12.4', 'Au 3627/500']],
		['18k ring 5,20 g - 0,35 g stones', ['ring', 1, '5,20 g', '18 kt', '4.85', 'Au 291/80']],
		['ring 14k 5.20g -0.35g stones', ['ring', 1, '5.20 g', '14 kt', '4.85', 'Au 679/240']],
		['14k ring 5.20 g less 0.35 g of stones', ['ring', 1, '5.20 g', '14 kt', '4.85', 'Au 679/240']],
		['14k ring 5.20 g 0.35 g stones', ['ring', 1, '5.20 g', '14 kt', '4.85', 'Au 679/240']],
		['14k ring 3g 0.5ct diamond', ['ring', 1, '3 g', '14 kt', '2.9', 'Au 203/120']],
		['18ct ring 5,20 g', ['ring', 1, '5,20 g', '18 kt', '5.2', 'Au 39/10']],
		['18ct diamond ring 5,20 g', ['diamond ring', 1, '5,20 g', '18 kt', '5.2', 'Au 39/10']],
		['6 sterling forks 316.90g', ['forks', 6, '316.90 g', 'sterling', '316.9', 'Ag 117253/400']],
		['sterling forks 316.90 g x6', ['forks', 6, '316.90 g', 'sterling', '316.9', 'Ag 117253/400']],
		['x2 sovereign', ['sovereign', 2, '15.9761 g', '', '15.9761', 'Au 1757371/120000']],
		['2 sovereigns 15.9 g', ['sovereigns', 2, '15.9 g', '', '15.9', 'Au 583/40']],
		['1/10 oz gold eagle', ['1/10 oz gold eagle', 1, '3.393 g', '', '3.393', 'Au 12441/4000']],
		['9ct sovereign ring 12 g', ['sovereign ring', 1, '12 g', '9 kt', '12', 'Au 9/2']],
		['weighted sterling candlestick 412 g', ['candlestick', 1, '412 g', 'weighted 925', '41.2', 'Ag 3811/100']],
		['candlestick 412 g sterling weighted', ['candlestick', 1, '412 g', 'weighted 925', '41.2', 'Ag 3811/100']],
		['weighted sterling candlestick 412 g -350 g filler', ['candlestick', 1, '412 g', 'weighted 925', '62', 'Ag 1147/20']],
		['weighted sterling candlestick 412 g -80% filler', ['candlestick', 1, '412 g', 'weighted 925', '82.4', 'Ag 3811/50']],
		['1/20 14k gf chain 9.1 g', ['chain', 1, '9.1 g', '1/20 14 kt', '9.1', 'Au 637/2400']],
		['gold filled chain 14k 1/20 9.1 g', ['chain', 1, '9.1 g', '1/20 14 kt', '9.1', 'Au 637/2400']],
		['brass fitting 120 g', ['fitting', 1, '120 g', 'brass', '120', 'Cu 80 Zn 40']],
		['stainless 300 g', ['', 1, '300 g', 'stainless steel', '300', 'Fe 1209/5 Cr 54 Ni 3 C 6/5']],
		['dental Au 625 Pd 180 Ag 120 4.12g', ['dental', 1, '4.12 g', 'Au 625 Pd 180 Ag 120', '4.12', 'Au 103/40 Pd 927/1250 Ag 309/625']],
		['pt950 ring 6.1 g', ['ring', 1, '6.1 g', 'Pt 950', '6.1', 'Pt 1159/200']],
		['14k 3 dwt', ['', 1, '3 dwt', '14 kt', '4.66552152', 'Au 136077711/50000000']],
		['14k 120 gr', ['', 1, '120 gr', '14 kt', '7.7758692', 'Au 45359237/10000000']],
		['0.35 ozt 22k', ['', 1, '0.35 ozt', '22 kt', '10.88621688', 'Au 498951607/50000000']],
		['1 ozt 999 silver bar', ['silver bar', 1, '1 ozt', 'Ag 999', '31.1034768', 'Ag 19420233327/625000000']],
		['1/4 troy ounce 999.9 gold', ['gold', 1, '0.25 ozt', 'Au 999.9', '7.7758692', 'Au 194377290327/25000000000']],
		['white gold 18k ring 5 g', ['white gold ring', 1, '5 g', '18 kt', '5', 'Au 15/4']],
		['gold plated ring 5 g', ['ring', 1, '5 g', 'gold plated', '5', '']],
		['unmarked ring 585 5 g', ['ring', 1, '5 g', '', '5', 'Au 117/40']],
		["men's t-bar 14k 5 g", ["men's t-bar", 1, '5 g', '14 kt', '5', 'Au 35/12']],
		['💍 14k 3 g', ['💍', 1, '3 g', '14 kt', '3', 'Au 7/4']]
	])('%s', (line, expected) => expect(read(line)).toEqual(expected));

	it.each([
		['', 'line-empty'],
		['14k chain', 'line-mass-missing'],
		['6 sterling forks', 'line-mass-missing'],
		['-3 g 14k', 'line-mass-missing'],
		['12.4 g', 'line-mark-missing'],
		['silver spoon 30 g', 'line-mark'],
		['999 bar 10 g', 'line-mark'],
		['15.5k ring 3 g', 'line-mark'],
		['14k 925 5 g', 'line-mark'],
		['585 750', 'line-mark'],
		['14kgf chain 9 g', 'line-mark'],
		['eagle', 'line-coin'],
		['sovereign ring 12 g', 'line-coin-mass'],
		['3 sovereigns 15.97 g', 'line-coin-mass'],
		['14k 5 oz', 'line-unit'],
		['14k 5.2g 8 dwt', 'line-two-masses'],
		['x3 14k 5 g 2 pcs', 'line-two-counts'],
		['3 x 12.4 g 14k', 'line-times-unclear'],
		['18k 5 x 3', 'line-times-unclear'],
		['14k ring 5 g each x3', 'line-each'],
		['14k 5 g 0.5 ct', 'line-carat-unclear'],
		['30 ct ring 5 g', 'line-carat-unclear'],
		['Au 62.5 Pd 18 Ag 12 4 g', 'line-shares-unclear'],
		['14k 1 234.5 g', 'line-grouping-unclear'],
		['14k 12, 4 g', 'line-unexplained'],
		['1e9 g 14k', 'line-unexplained'],
		['14k 18" chain 5 g', 'line-unexplained'],
		['14k 1,234 g', 'line-number'],
		['14k 12..5g', 'line-number'],
		['14k ١٢ g', 'line-number'],
		['14k ½ ozt', 'line-number'],
		['x0 14k 5g', 'line-number'],
		['x2.5 14k 5 g', 'line-number'],
		['14k ring 5 g - 6 g stones', 'line-piece'],
		['14k '.repeat(90), 'line-too-long']
	])('%s is refused: %s', (line, kind) => expect(read(line)).toBe(kind));

	it('says what was found and where', () => {
		const problem = (line: string) => {
			const result = parseLine(line);
			return result.ok ? null : result.problem;
		};
		expect(problem('14k chain 1,234 g')).toEqual({
			kind: 'line-number', start: 10, end: 15, found: '1,234',
			problem: { kind: 'number-ambiguous', text: '1,234', asDecimal: '1.234', asThousands: '1234' }
		});
		expect(problem('14k ring 5.2g 8 dwt')).toEqual({
			kind: 'line-two-masses', first: { start: 9, end: 13, found: '5.2g' }, second: { start: 14, end: 19, found: '8 dwt' }
		});
		expect(problem('14k 5 oz')).toMatchObject({ start: 6, end: 8, found: 'oz', problem: { choices: ['ozt', 'oz-av'] } });
		expect(problem('6 sterling forks')).toEqual({ kind: 'line-mass-missing', unsure: { start: 0, end: 1, found: '6' } });
		expect(problem('14k 1 234.5 g')).toEqual({
			kind: 'line-grouping-unclear', start: 4, end: 11, found: '1 234.5', together: '1234.5'
		});
		expect(problem('sovereign ring 12 g')).toMatchObject({ coin: 'Sovereign', count: 1, start: 0, end: 9 });
	});

	it('takes unit, division, decimal mark and origin from its options', () => {
		const options = { unit: 'dwt', division: decimal('0.05'), mark: 'comma', origin: 'us-before-1981' } as const;
		const own = parseLine('14k 3,2', options);
		expect(own.ok && own.value).toMatchObject({ weighing: { unit: 'dwt', division: decimal('0.05') }, origin: 'us-before-1981' });
		const other = parseLine('14k 3,2 g', options);
		expect(other.ok && other.value.weighing.division).toBe(null);
		expect(read('14k 1.234', options)).toBe('line-number');
	});

	it('reads origin, note and the classes that follow', () => {
		const piece = (line: string) => {
			const result = parseLine(line);
			return result.ok ? [result.value.origin, result.value.lossClass, result.value.note] : result.problem.kind;
		};
		expect(piece('pre-1981 14k ring 5 g # blue box')).toEqual(['us-before-1981', 'clean', 'blue box']);
		expect(piece('hallmarked 750 chain 5 g')).toEqual(['hallmarked', 'worn', '']);
		expect(piece('585 ring 5 g')).toEqual(['uncontrolled', 'clean', '']);
		expect(piece('14k diamond ring 5 g')).toEqual(['us-modern', 'stone-set', '']);
		expect(piece('14k diamond ring 5 g -0.2 g stones')).toEqual(['us-modern', 'clean', '']);
		expect(piece('10k ring 5 g')).toEqual(['us-modern', 'zinc-solder', '']);
		expect(piece('dental Au 625 Pd 180 4.12 g')).toEqual(['unmarked', 'dental', '']);
		expect(piece('brass fitting 120 g')).toEqual(['unmarked', 'base', '']);
		expect(piece('2 sovereigns')).toEqual(['hallmarked', 'clean', 'legal mass, not weighed']);
		expect(piece('999.9 gold bar 10 g')).toEqual(['stranger-bar', 'bar', '']);
	});
});

describe('hostile lines', () => {
	it('two hundred of them, alone and beside a good line, give a problem or a right value', () => {
		expect(nasty.length).toBeGreaterThanOrEqual(200);
		for (const text of nasty) {
			for (const line of [text, `${text} 14k 5.2 g`, `14k 5.2 g ${text}`, `14k ${text} g`]) check(line);
		}
	});

	it('any mixture neither throws nor invents digits', () => {
		fc.assert(fc.property(hostile, check), { numRuns: 5_000 });
	});

	it('a mass in any word order, glued or not, with comma or dot, is never another', () => {
		const parts = fc.tuple(
			fc.integer({ min: 1, max: 99_999 }), fc.constantFrom('.', ','), fc.constantFrom('g', ' g', ' grams'),
			fc.constantFrom('14k', '18 kt', 'sterling', 'Pt 950'), fc.constantFrom('ring', 'old chain', ''), fc.integer({ min: 1, max: 99 }),
			fc.shuffledSubarray([0, 1, 2, 3], { minLength: 4 })
		);
		fc.assert(
			fc.property(parts, ([hundredths, sign, unit, mark, article, count, order]) => {
				const digits = hundredths.toString().padStart(3, '0');
				const typed = `${digits.slice(0, -2)}${sign}${digits.slice(-2)}`;
				const words = [`${typed}${unit}`, mark, article, `x${count}`];
				const line = order.map((at) => words[at]!).join(' ');
				const result = parseLine(line);
				expect(result.ok ? null : [line, result.problem]).toBe(null);
				if (!result.ok) return;
				expect(massOf(result.value.weighing).grams.times(100).toString()).toBe(hundredths.toString());
				expect([result.value.count, result.value.article, result.value.weighing.typed]).toEqual([count, article, typed]);
			}),
			{ numRuns: 1_000 }
		);
	});
});

/** A taken line holds only numbers whose digits stand in it, together and in one piece. */
function check(line: string): void {
	const result = parseLine(line);
	if (!result.ok) {
		expect(result.problem.kind).toMatch(/^line-/);
		if ('start' in result.problem) {
			const { start, end } = result.problem;
			expect(start >= 0 && end <= line.length && start < end).toBe(true);
			if (result.problem.kind !== 'line-mark' && result.problem.kind !== 'line-shares-unclear') {
				expect(line.slice(start, end)).toBe(result.problem.found);
			}
		}
		return;
	}
	const { weighing, count, note } = result.value;
	expect(weighing.reading.isFinite() && weighing.reading.gt(0) && Number.isSafeInteger(count) && count > 0).toBe(true);
	if (note.includes('legal mass')) return;
	const shown = weighing.reading.toString().replace('.', '').replace(/^0+/, '');
	const fractions = line.includes('/');
	expect(fractions || line.replace(/[.,'\u2019]/g, '').includes(shown)).toBe(true);
	const net = netOf(result.value).grams;
	expect(net.gte(0)).toBe(true);
}
