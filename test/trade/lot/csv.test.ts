import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { guessDelimiter, splitRows, unguard, writeCell } from '../../../src/trade/lot/csv.ts';

const cells = (text: string, delimiter: ',' | ';' | '\t' = ',') => splitRows(text, delimiter).map((row) => row.cells);

describe('rows and cells', () => {
	it.each([
		['a,b\nc,d', [['a', 'b'], ['c', 'd']]], ['a,b\r\nc,d\r\n', [['a', 'b'], ['c', 'd']]], ['a\rb', [['a'], ['b']]], ['\ufeffa', [['a']]], ['', []], ['\n\n , \n', []],
		['"a,b",c', [['a,b', 'c']]], ['"a ""b""",c', [['a "b"', 'c']]], ['"a\r\nb",c\nd', [['a\r\nb', 'c'], ['d']]], ['18" chain,2', [['18" chain', '2']]], ['a,,', [['a', '', '']]]
	])('%j', (text, expected) => expect(cells(text)).toEqual(expected));

	it('counts the lines of the text', () => {
		expect(splitRows('a\n\n"b\nb"\r\nc', ',').map(({ row }) => row)).toEqual([1, 3, 5]);
	});

	it('reports an open or broken quote and goes on with the next line', () => {
		const rows = splitRows('"a\nb\n"c"d,e\nf', ',');
		expect(rows.map(({ row, text, problem }) => [row, text, problem?.kind ?? null])).toEqual([
			[1, '"a', 'table-quote-open'], [2, 'b', null], [3, '"c"d,e', 'table-quote-open'], [4, 'f', null]
		]);
	});

	it('any cells that are written read back', () => {
		fc.assert(
			fc.property(fc.array(fc.array(fc.string({ unit: 'binary', maxLength: 8 }), { minLength: 1, maxLength: 4 }), { maxLength: 4 }), (rows) => {
				const filled = rows.filter((row) => row.some((cell) => cell.trim() !== ''));
				const text = filled.map((row) => row.map(writeCell).join(',')).join('\r\n');
				expect(cells(text).map((row) => row.map(unguard))).toEqual(filled.map((row, at) => row.map((cell, i) => (at + i === 0 ? cell.replace(/^\ufeff/, '') : cell))));
			}),
			{ numRuns: 2_000 }
		);
	});

	it.each(['=1', '+1', '-1', '@a', '\ta', '\ra', '\na', "'=", '＝1'])('guards %j', (text) => {
		expect(writeCell(text).replace(/^"/, '')[0]).toBe("'");
		expect(unguard(`'${text}`)).toBe(text);
	});

	it.each([['a;b\nc;d', ';'], ['a\tb;c', '\t'], ['a,b', ','], ['14k 5,2 g; old\n18k 3 g\n925 8 dwt', ',']])('%j: %j', (text, sign) => {
		expect(guessDelimiter(text)).toBe(sign);
	});
});
