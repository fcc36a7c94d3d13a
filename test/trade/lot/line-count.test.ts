import { describe, expect, it } from 'vitest';
import { readAmounts } from '../../../src/trade/lot/line-amounts.ts';
import { readCounts } from '../../../src/trade/lot/line-count.ts';
import { splitLine } from '../../../src/trade/lot/line-tokens.ts';

const counts = (line: string) => {
	const { tokens } = splitLine(line);
	const amounts = readAmounts(tokens);
	if (!amounts.ok) return amounts.problem.kind;
	const free = (at: number) => tokens[at] !== undefined && !amounts.value.some(({ from, to }) => at >= from && at <= to);
	const result = readCounts(tokens, free, amounts.value, line);
	return result.ok ? result.value.map(({ typed }) => typed) : [result.problem.kind, 'found' in result.problem ? result.problem.found : ''];
};

describe('how many pieces', () => {
	it.each([
		['14k 12.4g x3', ['3']], ['3x 14k 5 g', ['3']], ['3 x 14k 5 g', ['3']], ['x 3 14k 5 g', ['3']], ['×3 14k 5 g', ['3']], ['3 pcs 14k', ['3']], ['qty: 3 14k', ['3']],
		['12.4 g x 3', ['3']], ['18k 5.2 x 3', ['3']], ['18k 5 x3', ['3']], ['925 x3 5 g', ['3']], ['3 x 925 5 g', ['3']], ['x2 x3', ['2', '3']], ['14k 5 g', []],
		['3 x 12.4 g', ['line-times-unclear', '3 x 12.4 g']], ['18k 5 x 3', ['line-times-unclear', '5 x 3']], ['3x3', ['line-times-unclear', '3x3']]
	])('%s', (line, expected) => expect(counts(line)).toEqual(expected));
});
