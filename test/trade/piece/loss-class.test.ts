import { describe, expect, it } from 'vitest';
import { parseMark } from '../../../src/trade/metal/mark.ts';
import { isLossClass, lossClasses, lossClassFor } from '../../../src/trade/piece/loss-class.ts';

const contents = (stamp: string) => {
	const mark = parseMark(stamp);
	return mark.ok ? mark.value.contents.map(({ metal, fineness }) => ({ metal, taken: fineness })) : [];
};

describe('how a piece behaves in the crucible', () => {
	it.each([
		['ring', '14k', 'clean'], ['chain', '14k', 'worn'], ['watch case', '18k', 'worn'], ['diamond ring', '14k', 'stone-set'],
		['ring', '9k', 'zinc-solder'],
		['ring', '10k', 'zinc-solder'], ['ring', '375', 'zinc-solder'], ['ring', '12k', 'clean'], ['bangle', '1/20 14k gf', 'worn'],
		['spoon', 'sterling', 'clean'],
		['dental crown', '18k', 'dental'], ['lemel', '14k', 'lemel'], ['bar', '999.9 gold', 'bar'], ['fitting', 'brass', 'base'],
		['bar', 'copper', 'base'], ['ring', 'vermeil', 'clean'], ['ring', '18k hge', 'base']
	] as const)('%s, %s: %s', (article, stamp, expected) => expect(lossClassFor(article, contents(stamp))).toBe(expected));

	it('is clean again when the stones are taken off', () => expect(lossClassFor('diamond ring', contents('14k'), true)).toBe('clean'));
	it('knows its classes', () => expect([lossClasses.every(isLossClass), isLossClass('dirt')]).toEqual([true, false]));
});
