import { describe, expect, it } from 'vitest';
import {
	alloyNames, coatedWords, filledWords, fineWords, karatWords, phrases, plumbWords, rolledWords, silentWords, silverNames, weightedWords
} from '../../../src/trade/metal/mark-words.ts';
import { perMilleNumber } from '../../../src/trade/metal/fineness.ts';
import { parseMark } from '../../../src/trade/metal/mark.ts';
import { metalWords } from '../../../src/trade/metal/stamps.ts';

describe('the words of stamps', () => {
	it('have one meaning each', () => {
		const sorts = [
			[...karatWords], [...plumbWords], [...silentWords], [...silverNames.keys()], [...fineWords], [...weightedWords],
			[...filledWords], [...rolledWords], [...coatedWords.keys()], [...metalWords.keys()]
		];
		const all = sorts.flat().filter((word) => word !== 'kp');
		const twice = all.filter((word, index) => all.indexOf(word) !== index);
		expect(twice).toEqual([]);
	});

	it('of every phrase and every alloy are understood', () => {
		for (const phrase of [...phrases.keys(), ...alloyNames.keys()]) expect(parseMark(phrase).ok, phrase).toBe(true);
	});

	it('take a base metal by its name as pure', () => {
		const lead = parseMark('Lead');
		const contents = lead.ok ? lead.value.contents.map(({ metal, fineness }) => [metal, perMilleNumber(fineness)]) : null;
		expect(contents).toEqual([['Pb', 1000]]);
	});
});
