import { describe, expect, it } from 'vitest';
import { deductionWord, endingFraction, readAmounts, readNumber } from '../../../src/trade/lot/line-amounts.ts';
import { splitLine } from '../../../src/trade/lot/line-tokens.ts';

const amounts = (line: string) => {
	const result = readAmounts(splitLine(line).tokens);
	if (!result.ok) return result.problem.kind;
	return result.value.map(({ typed, unit, off, what }) => [typed, unit, off, what]);
};

describe('numbers with a unit', () => {
	it.each([
		['14k 12.4g', [['12.4', 'g', false, null]]],
		['0.35 oz t 22k', [['0.35', 'ozt', false, null]]],
		['1/4 troy ounces', [['1/4', 'ozt', false, null]]],
		['5 g - 0.3 g stones', [['5', 'g', false, null], ['0.3', 'g', true, 'stones']]],
		['5 g less 0.3 g of springs', [['5', 'g', false, null], ['0.3', 'g', true, 'springs']]],
		['5 g less stones 0.3 g', [['5', 'g', false, null], ['0.3', 'g', false, null]]],
		['5 g stones -0.3 g', [['5', 'g', false, 'stones'], ['0.3', 'g', true, 'stones']]],
		['412 g -80% filler', [['412', 'g', false, null], ['80', null, true, 'filler']]],
		['58.5% 4 g', [['4', 'g', false, null]]],
		['18 ct', [['18', 'ct', false, null]]],
		['14k', []],
		['2 oz', 'line-unit'],
		['2 taels', 'line-unit']
	])('%s', (line, expected) => expect(amounts(line)).toEqual(expected));

	it.each([['1/4', '0.25'], ['1/10', '0.1'], ['1/3', null], ['1/0', null], ['0/5', '0']])('%s ends as %s', (text, value) => {
		expect(endingFraction(text)).toBe(value);
	});

	it('a number says where it is wrong', () => {
		expect(readNumber('1/3', 4, 7, undefined)).toMatchObject({ ok: false, problem: { kind: 'line-number', start: 4, end: 7, found: '1/3' } });
		expect(readNumber('0', 0, 1, undefined)).toMatchObject({ problem: { problem: { kind: 'number-not-positive' } } });
		expect(readNumber('2.5', 0, 3, undefined, true)).toMatchObject({ problem: { problem: { kind: 'number-not-whole' } } });
		expect(readNumber('1.234', 0, 5, 'comma')).toMatchObject({ problem: { problem: { kind: 'number-ambiguous' } } });
	});

	it.each([['rubies', 'stones'], ['Springs', 'springs'], ['pitch', 'filler'], ['chain', null]])('%s is %s', (word, what) => {
		expect(deductionWord(splitLine(word).tokens[0])).toBe(what);
	});
});
