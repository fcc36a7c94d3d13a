import { describe, expect, it } from 'vitest';
import { readAmounts } from '../../../src/trade/lot/line-amounts.ts';
import { readCarats } from '../../../src/trade/lot/line-carats.ts';
import { splitLine } from '../../../src/trade/lot/line-tokens.ts';

/** What is left as masses: karats are gone, carats of stones are taken off. */
const left = (line: string) => {
	const { tokens } = splitLine(line);
	const amounts = readAmounts(tokens);
	const judged = amounts.ok ? readCarats(tokens, amounts.value, line) : amounts;
	return judged.ok ? judged.value.map(({ typed, unit, off, what }) => [typed, unit, off, what]) : judged.problem.kind;
};

describe('karats or carats', () => {
	it.each([
		['18ct ring 5 g', [['5', 'g', false, null]]],
		['18 carat diamond ring 5 g', [['5', 'g', false, null]]],
		['14k ring 3 g 0.5ct diamond', [['3', 'g', false, null], ['0.5', 'ct', true, 'stones']]],
		['14k ring 3 g diamonds 0.5ct', [['3', 'g', false, 'stones'], ['0.5', 'ct', true, 'stones']]],
		['585 ring 3 g -0.5ct', [['3', 'g', false, null], ['0.5', 'ct', true, null]]],
		['18ct ring 3 g 0.5ct diamonds', [['3', 'g', false, null], ['0.5', 'ct', true, 'stones']]],
		['14k 3 g 0.5 ct', 'line-carat-unclear'],
		['sterling 3 g 18 ct', 'line-carat-unclear'],
		['25 ct ring 3 g', 'line-carat-unclear'],
		['18 ct 9 ct ring 3 g', 'line-carat-unclear'],
		['30 ct 0.5 ct stones 3 g', 'line-carat-unclear']
	])('%s', (line, expected) => expect(left(line)).toEqual(expected));
});
