import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { joinWords, splitLine } from '../../../src/trade/lot/line-tokens.ts';

const kinds = (line: string) => splitLine(line).tokens.map(({ kind, text, glued }) => `${glued ? '+' : ''}${kind} ${text}`);

describe('the parts of a line', () => {
	it.each([
		['14k 12.4g x3', ['number 14', '+word k', 'number 12.4', '+word g', 'word x', '+number 3']],
		['1/20 14k', ['fraction 1/20', 'number 14', '+word k']],
		['5,20 g - 0,35 g', ['number 5,20', 'word g', 'minus -', 'number 0,35', 'word g']],
		['5g\u22120.3', ['number 5', '+word g', '+minus \u2212', '+number 0.3']],
		['14-karat', ['number 14', 'word karat']],
		['14k, x', ['number 14', '+word k', 'word x']],
		['12,', ['number 12']],
		['12..5', ['number 12..5']],
		["1'234.5", ["number 1'234.5"]],
		['58.5%', ['number 58.5', '+percent %']],
		['½ १', ['odd ½', 'odd १']],
		['3×', ['number 3', '+word ×']]
	])('%s', (line, expected) => expect(kinds(line)).toEqual(expected));

	it('every part stands where it says', () => {
		fc.assert(
			fc.property(fc.string({ unit: 'binary', maxLength: 40 }), (line) => {
				let last = 0;
				for (const { text, start, end } of splitLine(line).tokens) {
					expect(start >= last && end > start && line.slice(start, end) === text).toBe(true);
					last = end;
				}
			}),
			{ numRuns: 2_000 }
		);
	});

	it.each([
		['14k # left box', null, 'left box'], ['14k #', null, ''], ['pre-1981 14k', 'us-before-1981', ''], ['14k hallmarked', 'hallmarked', ''],
		['no mark 585', 'unmarked', ''], ['US modern 14k', 'us-modern', ''], ['a#b', null, '']
	])('%s: origin and note', (line, origin, note) => {
		expect([splitLine(line).origin, splitLine(line).note]).toEqual([origin, note]);
	});

	it.each([["men's t-bar", "men's t-bar"], ['a  b', 'a b'], ['(worn) ring', 'worn ring'], ['R&B', 'R&B']])('%s is joined as %s', (line, joined) => {
		expect(joinWords(line, splitLine(line).tokens)).toBe(joined);
	});
});
