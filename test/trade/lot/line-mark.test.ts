import { describe, expect, it } from 'vitest';
import { isStamp, readLineCoin, readLineMark } from '../../../src/trade/lot/line-mark.ts';
import { joinWords, splitLine } from '../../../src/trade/lot/line-tokens.ts';

/** The mark, and the words that were not needed for it. */
const mark = (line: string) => {
	const { tokens } = splitLine(line);
	const found = readLineMark(tokens, (at) => tokens[at] !== undefined);
	if (!found.ok) return 'problem' in found.problem ? (found.problem.problem as { kind: string }).kind : found.problem.kind;
	if (found.value === null) return null;
	const { used } = found.value;
	return [found.value.mark.text, joinWords(line, tokens.filter((_, at) => !used.has(at)))];
};

describe('the mark of a line', () => {
	it.each([
		['14k chain', ['14 kt', 'chain']], ['chain K14', ['14 kt', 'chain']], ['18ct ring', ['18 kt', 'ring']],
		['1/20 14kgf chain', ['1/20 14 kt', 'chain']],
		['gold filled chain 14k 1/20', ['1/20 14 kt', 'chain']], ['spoon sterling 925', ['sterling', 'spoon']],
		['weighted bowl sterling', ['weighted 925', 'bowl']],
		['platinum ring 950', ['Pt 950', 'ring']], ['pt950', ['Pt 950', '']], ['gold 58.5%', ['585', '']], ['gold 580 ring', ['Au 580', 'ring']],
		['Au 625 Pd 180', ['Au 625 Pd 180', '']], ['stainless steel lid', ['stainless steel', 'lid']], ['gold coloured brass', ['brass', 'gold coloured']],
		['heavy 14k chain', ['14 kt', 'heavy chain']], ['heavy gold electroplate 18k', ['heavy gold electroplate', '']], ['925 plate', ['925', 'plate']],
		['coin silver spoon', ['coin', 'spoon']], ['gold coin 22k', ['22 kt', 'coin']], ['fine silver bar', ['Ag 999', 'bar']],
		['in a box 14k', ['14 kt', 'in a box']],
		['ring', null], ['silver spoon', 'mark-fineness-missing'], ['14k 925', 'mark-two-marks'], ['brass 14k', 'mark-two-marks'],
		['999', 'mark-metal-ambiguous'],
		['14k gf', 'mark-layer-share-missing'], ['Au 62 Ag 20', 'line-shares-unclear'], ['Au 62% Ag 20%', ['Au 620 Ag 200', '']]
	])('%s', (line, expected) => expect(mark(line)).toEqual(expected));

	it.each([
		['585', true], ['.925', true], ['9999', true],
		['999.9', true], ['586', false], ['14', false],
		['12.4', false]
	])('%s is a stamp: %s', (text, expected) => {
		expect(isStamp(text)).toBe(expected);
	});
});

describe('a coin in a line', () => {
	const coin = (line: string) => {
		const { tokens } = splitLine(line);
		const found = readLineCoin(tokens);
		if (found === null) return null;
		const name = found.coin.ok ? found.coin.value.id : found.coin.problem.kind;
		return [name, line.slice(tokens[found.from]!.start, tokens[found.to]!.end)];
	};
	it.each([
		['x2 sovereign', ['sovereign', 'sovereign']], ['2 half sovereigns 1912', ['half-sovereign', 'half sovereigns 1912']],
		['1/10 oz gold eagle', ['us-eagle-5', '1/10 oz gold eagle']],
		['eagle', ['coin-ambiguous', 'eagle']], ['14k ring', null]
	])('%s', (line, expected) => expect(coin(line)).toEqual(expected));
});
