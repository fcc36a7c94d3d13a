import { describe, expect, it } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { unseenCores } from '../../../src/trade/evidence/unseen.ts';
import { bar999, core, magnet, reading, stamped14, touch, water } from './some-findings.ts';

describe('what no test so far can see', () => {
	const of = (...args: Parameters<typeof assess>) => unseenCores(assess(...args));

	it('is tungsten under 24 kt, whatever surface and water say, until it is drilled', () => {
		const start = startOf(bar999);
		expect(of(start, [])[0]).toBe('tungsten');
		expect(of(start, [reading(998, { u: 1 }), water(19.28, 100), magnet('none')])).toEqual(['tungsten']);
		expect(of(start, [reading(998, { u: 1 }), core(998, { u: 2 })])).toEqual([]);
	});
	it('is nothing that water or a cut has shown', () => {
		const start = startOf({ ...stamped14, build: 'hollow' });
		expect(of(start, [touch(), reading(588), water(8.6)])).not.toContain('brass');
		expect(of(start, [touch(), reading(588), core(12)])).toEqual([]);
	});
	it('is everything under a 14 kt surface that only the surface was read of, and nothing after water', () => {
		const start = startOf(stamped14);
		expect(of(start, [reading(588)])).toEqual(expect.arrayContaining(['brass', 'copper', 'silver', 'steel']));
		expect(of(start, [touch({ how: 'notch' }), reading(588), water(13.2)])).toEqual([]);
	});
});
