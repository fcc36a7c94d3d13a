import { describe, expect, it } from 'vitest';
import { bagPlan, type BagPiece } from '$trade/lot/bag.ts';
import { formatFor } from '$ui/format.ts';
import { neededWords, restWords, toldWords } from '../../src/routes/bag-words.ts';

const format = formatFor('en');
const amount = (value: number) => `${format.estimate(value, 3)} USD`;
const piece = (odds: number, opened = false): BagPiece => ({
	key: `p${odds}${opened}`, count: 1, odds, opened, stake: { whole: 1_000, price: 500 },
	cases: { layered: { lost: 500, won: 0, atLoss: 1 }, sound: { lost: 0, won: 100, atLoss: 0 } }
});
const plan = (...pieces: BagPiece[]) => bagPlan(pieces, 0.05, 1e9);
const plain = (sentences: readonly string[]) => sentences.join(' ').replaceAll('\u00a0', ' ');

describe('what is said of a bag', () => {
	it('tells what opened pieces mean for the others', () => {
		expect(toldWords(plan(piece(0.1)), format)).toBe('');
		expect(toldWords(plan(piece(0.9, true), piece(0.1)), format)).toBe(
			'1 was opened, 1 filled. One seller’s pieces are alike: that makes a filling in each of the others 6 times likelier.'
		);
		expect(plain([toldWords(plan(piece(0.001, true), piece(0.002, true), piece(0.1)), format)])).toBe(
			'2 were opened, none filled. That makes a filling in each of the others less likely, to 65.5 % of its odds.'
		);
		// who is certain that none is filled learns nothing from one that is not
		expect(toldWords(bagPlan([piece(0, true), piece(0)], 0, 12), format)).toBe('1 was opened, none filled.');
	});

	it('says what is risked with the rest: many, one, none', () => {
		// alone: 1 − 0.9 x 0.9; alike, at weight 4: 1 − 3.6/4 x 4.6/5
		expect(plain(restWords(plan(piece(0.1), piece(0.1)), amount, format))).toBe(
			'2 pieces, worth 1,080 USD on average at a price of 1,000 USD. Bought untested they cost 100 USD in losses on average; ' +
				'0.2 of them, on average, are worth less than their price. ' +
				'The chance that at least one of them is filled is 17.2 % if one seller’s pieces are alike, and 19 % if each stands alone.'
		);
		expect(plain(restWords(plan(piece(0.1)), amount, format))).toBe(
			'1 piece, worth 540 USD on average at a price of 500 USD. Bought untested it costs 50 USD in losses on average; the chance that it is filled is 10 %.'
		);
		expect(plain(restWords(plan(piece(0.1, true)), amount, format))).toBe('Nothing is left that is neither opened nor worth it.');
		expect(plain(restWords(plan(piece(0), piece(0)), amount, format))).toContain('The chance that at least one of them is filled is 0 %.');
	});

	it('says how many to open at random', () => {
		expect(neededWords(57, 60, 1, format)).toBe('Open 57 at random, and it is missed once in twenty times at most.');
		expect(neededWords(38, 60, 3, format)).toBe('Open 38 at random, and all of them are missed once in twenty times at most.');
		expect(neededWords(6, 6, 1, format)).toBe('Open all 6: fewer would miss it more than once in twenty times.');
		expect(neededWords(1, 1, 1, format)).toBe('Open it: there is no other.');
	});
});
