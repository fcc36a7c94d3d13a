import { describe, expect, it } from 'vitest';
import { alloy, type Share } from '../../src/trade/metal/alloy.ts';
import { findCoin } from '../../src/trade/metal/coins.ts';
import { parseFineness } from '../../src/trade/metal/fineness.ts';
import { parseMark } from '../../src/trade/metal/mark.ts';
import { exact, ratio } from '../../src/trade/number/exact.ts';
import type { Result } from '../../src/trade/number/result.ts';
import { metalSentence, type MetalProblem } from '../../src/ui/sentences/metal.ts';

const half = (metal: Share['metal']): Share => ({ metal, share: ratio(1n, 2n) });

/** Every kind of problem with a metal, from what a person typed, through the function that the pages call. */
const cases: readonly (readonly [kind: MetalProblem['kind'], result: Result<unknown, { readonly kind: string }>, says: RegExp])[] = [
	['mark-missing', parseMark(' '), /^Type the mark/],
	['mark-unknown', parseMark('14k italy'), /do not know the mark “14k italy”/],
	['mark-karat-unknown', parseMark('15.5k'), /15\.5 kt .* 15 kt or 16 kt\?/],
	['mark-karat-over-24', parseMark('25k'), /^25 kt cannot be/],
	['mark-karat-not-gold', parseMark('14k pt'), /says karats and platinum/],
	['mark-over-whole', parseMark('Au 625 Pd 180 Ag 320'), /adds up to 1125 parts/],
	['mark-figures-unknown', parseMark('586'), /^586 alone/],
	['mark-metal-ambiguous', parseMark('999'), /Au 999, Ag 999, Pt 999 or Pd 999\?/],
	['mark-fineness-missing', parseMark('plat'), /how fine the platinum is/],
	['mark-layer-share-missing', parseMark('14k gf'), /1\/20 14 kt, 1\/10 14 kt or 1\/40 14 kt/],
	['mark-two-marks', parseMark('14k 925'), /14 kt and 925/],
	['fineness-unit-missing', parseFineness('14'), /14 kt, 14 % or 14 ‰/],
	['fineness-over-whole', parseFineness('1200'), /more than 1000/],
	['alloy-empty', alloy('mine', [{ metal: 'Au', share: exact(0n) }]), /no metal in it/],
	['alloy-share-negative', alloy('mine', [{ metal: 'Au', share: ratio(-1n, 2n) }]), /gold below zero \(-1\/2\)/],
	['alloy-metal-twice', alloy('mine', [half('Ag'), half('Ag')]), /names silver twice/],
	['alloy-not-whole', alloy('mine', [half('Ag')]), /add up to 1\/2 instead of 1/],
	['coin-unknown', findCoin('doubloon'), /do not know a coin called “doubloon”/],
	['coin-ambiguous', findCoin('eagle'), /“eagle” could be .* or .*\?/]
];

describe('every problem with a metal', () => {
	it.each(cases)('%s is made by what was typed, and its sentence says what to do', (kind, result, says) => {
		expect(result.ok).toBe(false);
		if (result.ok) return;
		expect(result.problem.kind).toBe(kind);
		const text = metalSentence(result.problem as MetalProblem);
		expect(text).toMatch(says);
		expect(text).not.toMatch(/undefined|\[object/);
	});
});
