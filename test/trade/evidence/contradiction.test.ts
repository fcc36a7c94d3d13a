import { describe, expect, it } from 'vitest';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { contradictions, saysOf } from '../../../src/trade/evidence/contradiction.ts';
import type { Finding } from '../../../src/trade/evidence/finding.ts';
import { bar999, chain14, core, karat, magnet, reading, stamped14, touch, water } from './some-findings.ts';

const pairs = (subject: Parameters<typeof startOf>[0], ...findings: Finding[]) =>
	contradictions(startOf(subject), findings).map(({ first, second }) => `${first.by} ${second.by}`);

describe('voices that cannot both be right', () => {
	it('are none where all agree', () => {
		expect(pairs(stamped14, touch(), reading(588), water(13.2), magnet('none'), core(580))).toEqual([]);
		expect(pairs(bar999, reading(998, { u: 1 }), water(19.28, 100))).toEqual([]);
	});
	it('are the streak and the water, when the streak says 14 kt and the water says brass', () => {
		expect(pairs(chain14, touch(), reading(588), water(8.6))).toEqual(['mark water', 'touch water', 'fluorescence water']);
		expect(saysOf(startOf(chain14), water(8.6))).toMatchObject({ by: 'water', like: ['brass', 'nickel-silver'] });
	});
	it('are the mark and a reading of 417, or a core of nothing', () => {
		expect(pairs(stamped14, reading(417))).toEqual(['mark fluorescence']);
		expect(pairs(stamped14, core(10))).toEqual(['mark core']);
		expect(pairs(stamped14, touch({ holds: null, attackedBy: karat(9) }))).toEqual(['mark touch']);
		// finer than the mark is no contradiction of a mark that is a minimum
		expect(pairs(stamped14, reading(610))).toEqual([]);
	});
	it('are the mark and a magnet that pulls', () => {
		expect(pairs(stamped14, magnet('strong'))).toEqual(['mark magnet']);
		expect(pairs(stamped14, magnet('weak'))).toEqual([]);
	});
	it('are not a weighing that is too light to speak', () => {
		expect(pairs(stamped14, water(8.6, 2))).toEqual([]);
		expect(saysOf(startOf(stamped14), water(8.6, 2))).toBeNull();
	});
});
