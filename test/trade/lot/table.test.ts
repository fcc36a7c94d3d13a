import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { exact, exactToText, type Exact } from '../../../src/trade/number/exact.ts';
import { addPieces, emptySums, type LotSums } from '../../../src/trade/lot/sums.ts';
import { readTable, type Table } from '../../../src/trade/lot/table.ts';
import { writeTable } from '../../../src/trade/lot/table-written.ts';
import { anyPiece, hostile } from '../piece/some-pieces.ts';

// a thousand lots take a while on a busy machine
vi.setConfig({ testTimeout: 120_000 });

// grams of each unit in hundred-millionths, from the legal definitions
const G = 100_000_000n;
const DWT = 155_517_384n;
const OZT = 3_110_347_680n;
const GR = 6_479_891n;

type Metal = 'Au' | 'Ag' | 'Pt' | 'Pd';
/** The row as typed; thousandths of its unit; the unit; the metal and its share; the pieces. */
type Good = readonly [text: string, thousandths: bigint, unit: bigint, metal: Metal, n: bigint, d: bigint, pieces: number];

/** Sixty rows, three of them bad. */
const ROWS: readonly (Good | string)[] = [
	['5,73;dwt;22k;brooch;6', 5_730n, DWT, 'Au', 22n, 24n, 6],
	['2.76;ozt;Pd 950;band;2', 2_760n, OZT, 'Pd', 950n, 1000n, 2],
	['8.3;gr;Pd 950;band;1', 8_300n, GR, 'Pd', 950n, 1000n, 1],
	['36.37;g;800;forks;2', 36_370n, G, 'Ag', 800n, 1000n, 2],
	['5.60;dwt;22k;chain;6', 5_600n, DWT, 'Au', 22n, 24n, 6],
	['1.48;ozt;sterling;spoon;2', 1_480n, OZT, 'Ag', 925n, 1000n, 2],
	['17,2;gr;18k;chain;1', 17_200n, GR, 'Au', 18n, 24n, 1],
	['36.49;g;14k;chain;1', 36_490n, G, 'Au', 14n, 24n, 1],
	['3,90;dwt;585;chain;1', 3_900n, DWT, 'Au', 585n, 1000n, 1],
	['1.09;ozt;Pt 950;band;6', 1_090n, OZT, 'Pt', 950n, 1000n, 6],
	['33.5;gr;sterling;bangle;1', 33_500n, GR, 'Ag', 925n, 1000n, 1],
	['39.13;g;585;ring;1', 39_130n, G, 'Au', 585n, 1000n, 1],
	['6.67;dwt;925;tray;3', 6_670n, DWT, 'Ag', 925n, 1000n, 3],
	['1,63;ozt;18k;pendant;1', 1_630n, OZT, 'Au', 18n, 24n, 1],
	['21,9;gr;925;spoon;2', 21_900n, GR, 'Ag', 925n, 1000n, 2],
	['11.29;g;14k;bracelet;6', 11_290n, G, 'Au', 14n, 24n, 6],
	'1,234;g;14k;chain;1', // 1.234 or 1234?
	['0,14;ozt;sterling;bangle;1', 140n, OZT, 'Ag', 925n, 1000n, 1],
	['89.1;gr;22k;ring;2', 89_100n, GR, 'Au', 22n, 24n, 2],
	['26.34;g;585;chain;1', 26_340n, G, 'Au', 585n, 1000n, 1],
	['7,55;dwt;800;tray;3', 7_550n, DWT, 'Ag', 800n, 1000n, 3],
	['0,60;ozt;800;forks;1', 600n, OZT, 'Ag', 800n, 1000n, 1],
	['12.3;gr;sterling;tray;1', 12_300n, GR, 'Ag', 925n, 1000n, 1],
	['14,72;g;585;earrings;6', 14_720n, G, 'Au', 585n, 1000n, 6],
	['6,89;dwt;18k;chain;1', 6_890n, DWT, 'Au', 18n, 24n, 1],
	['0,81;ozt;18k;chain;2', 810n, OZT, 'Au', 18n, 24n, 2],
	['11,2;gr;14k;chain;1', 11_200n, GR, 'Au', 14n, 24n, 1],
	['14,88;g;22k;brooch;2', 14_880n, G, 'Au', 22n, 24n, 2],
	['3.48;dwt;sterling;forks;6', 3_480n, DWT, 'Ag', 925n, 1000n, 6],
	['1.76;ozt;800;spoon;1', 1_760n, OZT, 'Ag', 800n, 1000n, 1],
	['83,6;gr;Pd 950;band;1', 83_600n, GR, 'Pd', 950n, 1000n, 1],
	['16.07;g;sterling;bangle;1', 16_070n, G, 'Ag', 925n, 1000n, 1],
	'2.5;oz;925;forks;6', // troy or avoirdupois?
	['0,77;ozt;10k;chain;3', 770n, OZT, 'Au', 10n, 24n, 3],
	['49,4;gr;Pt 950;ring;6', 49_400n, GR, 'Pt', 950n, 1000n, 6],
	['12,02;g;800;bangle;2', 12_020n, G, 'Ag', 800n, 1000n, 2],
	['2,80;dwt;585;chain;3', 2_800n, DWT, 'Au', 585n, 1000n, 3],
	['2,60;ozt;Pd 950;band;1', 2_600n, OZT, 'Pd', 950n, 1000n, 1],
	['30,8;gr;800;tray;1', 30_800n, GR, 'Ag', 800n, 1000n, 1],
	['27.99;g;22k;bracelet;1', 27_990n, G, 'Au', 22n, 24n, 1],
	['14,92;dwt;Pt 950;ring;2', 14_920n, DWT, 'Pt', 950n, 1000n, 2],
	['1.79;ozt;10k;ring;3', 1_790n, OZT, 'Au', 10n, 24n, 3],
	['59,0;gr;800;tray;1', 59_000n, GR, 'Ag', 800n, 1000n, 1],
	['12,63;g;800;tray;1', 12_630n, G, 'Ag', 800n, 1000n, 1],
	['7,57;dwt;Pd 950;band;1', 7_570n, DWT, 'Pd', 950n, 1000n, 1],
	['1,91;ozt;800;spoon;3', 1_910n, OZT, 'Ag', 800n, 1000n, 3],
	['20.0;gr;Pt 950;ring;1', 20_000n, GR, 'Pt', 950n, 1000n, 1],
	'4,15;g;;ring;1', // no mark
	['14.66;dwt;10k;brooch;6', 14_660n, DWT, 'Au', 10n, 24n, 6],
	['0,92;ozt;sterling;tray;1', 920n, OZT, 'Ag', 925n, 1000n, 1],
	['23.0;gr;14k;pendant;3', 23_000n, GR, 'Au', 14n, 24n, 3],
	['27.42;g;22k;brooch;1', 27_420n, G, 'Au', 22n, 24n, 1],
	['13.42;dwt;585;chain;2', 13_420n, DWT, 'Au', 585n, 1000n, 2],
	['0.32;ozt;585;bracelet;1', 320n, OZT, 'Au', 585n, 1000n, 1],
	['52.4;gr;585;ring;3', 52_400n, GR, 'Au', 585n, 1000n, 3],
	['19,85;g;sterling;forks;2', 19_850n, G, 'Ag', 925n, 1000n, 2],
	['4.68;dwt;22k;bracelet;6', 4_680n, DWT, 'Au', 22n, 24n, 6],
	['1,84;ozt;14k;pendant;1', 1_840n, OZT, 'Au', 14n, 24n, 1],
	['73,5;gr;18k;earrings;1', 73_500n, GR, 'Au', 18n, 24n, 1],
	['13.14;g;22k;earrings;1', 13_140n, G, 'Au', 22n, 24n, 1],
];
const HEADING = 'mass;unit;mark;article;count';
const good = ROWS.filter((row): row is Good => typeof row !== 'string');
const texts = ROWS.map((row) => (typeof row === 'string' ? row : row[0]));
const SEMICOLONS = [HEADING, ...texts].join('\n');
const QUOTED = [HEADING, ...texts].map((row) => row.split(';').map((cell) => `"${cell}"`).join(',')).join('\r\n');
const TABS = [HEADING, ...texts].join('\r').replaceAll(';', '\t');

const sumsOf = ({ taken }: Table): LotSums => addPieces(emptySums(), taken.map(({ row, piece }) => ({ piece, key: `row ${row}` })));
const text = (value: Exact | undefined) => (value === undefined ? 'none' : exactToText(value));
/** n/d in lowest terms, by our own greatest common divisor. */
function lowest(n: bigint, d: bigint): string {
	let [a, b] = [n, d];
	while (b !== 0n) [a, b] = [b, a % b];
	return d / a === 1n ? `${n / a}` : `${n / a}/${d / a}`;
}

describe('sixty pieces in grams, pennyweights, ounces and grains, with commas and dots', () => {
	it.each([['semicolons', SEMICOLONS], ['quoted commas', QUOTED], ['tabs', TABS]])('%s: 57 taken, 3 explained', (_, csv) => {
		const table = readTable(csv);
		expect(ROWS.length).toBe(60);
		expect(table.taken.length).toBe(57);
		expect(table.refused.map(({ row, problem }) => [row, problem.kind])).toEqual([
			[18, 'table-cell'], [34, 'table-cell'], [49, 'table-cell-missing']
		]);
		const [thousand, ounce, mark] = table.refused.map(({ problem }) => problem);
		expect(thousand).toMatchObject({ column: 'mass', found: '1,234', problem: { kind: 'number-ambiguous', asDecimal: '1.234', asThousands: '1234' } });
		expect(ounce).toMatchObject({ column: 'unit', found: 'oz', problem: { kind: 'unit-ambiguous', choices: ['ozt', 'oz-av'] } });
		expect(mark).toEqual({ kind: 'table-cell-missing', column: 'mark' });
	});

	it.each([['semicolons', SEMICOLONS], ['quoted commas', QUOTED], ['tabs', TABS]])('%s: totals equal the sum by hand', (_, csv) => {
		const sums = sumsOf(readTable(csv));
		// the mass of a row in hundred-thousand-millionths of a gram
		let gross = 0n;
		const fine: Record<Metal, bigint> = { Au: 0n, Ag: 0n, Pt: 0n, Pd: 0n };
		let pieces = 0;
		for (const [, thousandths, unit, metal, n, d, count] of good) {
			const mass = thousandths * unit;
			gross += mass;
			fine[metal] += mass * n * (24_000n / d);
			pieces += count;
		}
		expect(text(exact(sums.gross))).toBe(lowest(gross, 100_000_000_000n));
		expect(text(exact(sums.net))).toBe(lowest(gross, 100_000_000_000n));
		for (const metal of ['Au', 'Ag', 'Pt', 'Pd'] as const) {
			expect(fine[metal] > 0n).toBe(true);
			expect(text(sums.fine[metal])).toBe(lowest(fine[metal], 100_000_000_000n * 24_000n));
		}
		expect(Object.keys(sums.fine).sort()).toEqual(['Ag', 'Au', 'Pd', 'Pt']);
		expect([sums.entries, sums.pieces]).toEqual([57, pieces]);
	});

	it('a refused row is kept as it stood, and is taken once it is mended', () => {
		const { refused } = readTable(SEMICOLONS);
		expect(refused.map((row) => row.text)).toEqual(ROWS.filter((row) => typeof row === 'string'));
		const mended = [HEADING, '1.2340;g;14k;chain;1', '2.5;ozt;925;forks;6', '4,15;g;9k;ring;1'].join('\n');
		expect(readTable(mended).taken.length).toBe(3);
	});
});

describe('what tables look like', () => {
	const first = (csv: string) => {
		const { taken, refused } = readTable(csv);
		if (refused[0] !== undefined) return refused[0].problem.kind;
		return taken.map(({ piece: { article, count, weighing, mark, note } }) => [article, count, weighing.typed, weighing.unit, mark, note]);
	};
	it.each([
		['no heading', '12.4,g,14k,chain,3,left box', [['chain', 3, '12.4', 'g', '14 kt', 'left box']]],
		['typed lines', '14k chain 12.4g x3\n925 8 dwt', [['chain', 3, '12.4', 'g', '14 kt', ''], ['', 1, '8', 'dwt', '925', '']]],
		['a line with decimal commas', '18k ring 5,20 g - 0,35 g stones', [['ring', 1, '5,20', 'g', '18 kt', '']]],
		['byte order mark, unit in the heading', '\ufeffStamp,Weight (dwt)\r\n14k,3', [['', 1, '3', 'dwt', '14 kt', '']]],
		['unit beside the number', 'mass,mark\n3 dwt,14k', [['', 1, '3', 'dwt', '14 kt', '']]],
		['a column of karats', 'karat,grams\n14,3.5', [['', 1, '3.5', 'g', '14 kt', '']]],
		['line break in quotes', 'mass,mark,note\n3,14k,"a\nb"', [['', 1, '3', 'g', '14 kt', 'a\nb']]],
		['an alloy named by the article', 'mass,mark,article\n120,,brass fitting', [['brass fitting', 1, '120', 'g', 'brass', '']]],
		['a coin that was counted', 'mass,mark,article,count\n,,sovereign,2', [['sovereign', 2, '15.9761', 'g', '', 'legal mass, not weighed']]],
		['too many cells', 'mass,mark,article\n12,4,14k,ring', 'table-too-many-cells'],
		['a decimal comma that was not quoted', 'mass,unit,mark,article\n12,4,14k,ring', 'table-cell'],
		['an open quote', 'mass,mark\n"3,14k', 'table-quote-open'],
		['an unknown origin', 'mass,mark,origin\n3,14k,moon', 'table-cell-unknown'],
		['no mass', 'mass,mark\n,14k', 'table-cell-missing'],
		['two units', 'mass,unit,mark\n3 g,dwt,14k', 'table-cell-unknown']
	])('%s', (_, csv, expected) => expect(first(csv)).toEqual(expected));

	it('an open quote loses its own line only', () => {
		const { taken, refused } = readTable('mass,mark,article\n3,14k,"open\n4,18k,ring\n5,585,chain');
		expect(refused.map(({ row, text: kept }) => [row, kept])).toEqual([[2, '3,14k,"open']]);
		expect(taken.map(({ row, piece }) => [row, piece.weighing.typed])).toEqual([[3, '4'], [4, '5']]);
	});

	it('in a table that shows decimal commas, "1.234" is asked about', () => {
		const { taken, refused } = readTable('mass;mark\n12,4;14k\n1.234;14k');
		expect(taken.length).toBe(1);
		expect(refused[0]).toMatchObject({ row: 3, problem: { kind: 'table-cell', problem: { kind: 'number-ambiguous' } } });
	});

	it('takes off stones and other deductions', () => {
		const { taken } = readTable('mass,mark,stones,deductions\n5.2,18k,0.35,0.1 g springs; 2 ct diamonds');
		expect(taken[0]?.piece.deductions.map(({ what, mass }) => [what, mass.grams.toString()])).toEqual([
			['springs', '0.1'], ['stones', '0.4'], ['stones', '0.35']
		]);
	});
});

describe('written and read again', () => {
	it('gives the same pieces', () => {
		fc.assert(
			fc.property(fc.array(anyPiece, { maxLength: 6 }), (pieces) => {
				const table = readTable(writeTable(pieces), { mark: 'comma' });
				expect(table.refused).toEqual([]);
				expect(table.taken.map(({ piece }) => piece)).toEqual(pieces);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('no cell begins like a formula', () => {
		const { taken } = readTable('mass,mark,article,note\n3,14k,ring,=1+1');
		const [one] = taken;
		const csv = writeTable([{ ...one!.piece, article: '@SUM(A1)', note: '\t=cmd' }]);
		const cells = csv.split('\r\n')[1]!.split(',');
		expect(cells.filter((cell) => /^"?[=+\-@\t\r]/.test(cell))).toEqual([]);
		expect(readTable(csv).taken[0]?.piece).toMatchObject({ article: '@SUM(A1)', note: '\t=cmd' });
	});

	it('a damaged cell of our own table is named', () => {
		const csv = writeTable([readTable('3,g,14k').taken[0]!.piece]);
		expect(readTable(csv.replace('us-modern', 'us-moderm')).refused[0]?.problem).toEqual({
			kind: 'table-cell-unknown', column: 'origin', found: 'us-moderm'
		});
	});
});

describe('hostile text', () => {
	it('every row is taken or refused, and nothing throws', () => {
		fc.assert(
			fc.property(fc.array(fc.tuple(fc.constantFrom('mass,mark\n', '', 'mass;unit;mark;count\n'), hostile, hostile), { maxLength: 5 }), (parts) => {
				const csv = parts.map(([head, a, b]) => `${head}${a},${b}`).join('\n');
				const { taken, refused } = readTable(csv);
				for (const { piece } of taken) expect(piece.weighing.reading.isFinite() && piece.weighing.reading.gt(0)).toBe(true);
				for (const { problem } of refused) expect(problem.kind).toMatch(/^(?:table|line)-/);
			}),
			{ numRuns: 2_000 }
		);
	});
});

describe('a list kept by two hands', () => {
	const masses = (text: string) => {
		const { taken, refused } = readTable(text);
		return [taken.map(({ piece }) => piece.weighing.reading.toFixed()), refused.map(({ problem }) => problem.kind)];
	};

	it('asks about "1.234" where only decimal commas are written', () => {
		expect(masses('mass;unit;mark\n12,34;g;585\n1.234;g;585')).toEqual([['12.34'], ['table-cell']]);
	});

	it('reads "1.234" as for everybody where decimal dots are written too, and still asks about "1,234"', () => {
		expect(masses('mass;unit;mark\n12,34;g;585\n5.20;g;585\n1.234;g;585\n1,234;g;585')).toEqual([['12.34', '5.2', '1.234'], ['table-cell']]);
		expect(masses('585 12,34 g\n585 5.20 g\n585 1.234 g\n585 1,234 g')).toEqual([['12.34', '5.2', '1.234'], ['line-number']]);
	});
});
