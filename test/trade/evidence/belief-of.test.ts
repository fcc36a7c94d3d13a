import { describe, expect, it } from 'vitest';
import { beliefOf } from '../../../src/trade/evidence/belief-of.ts';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { core, magnet, reading, stamped14, touch } from './some-findings.ts';

describe('the belief that is kept', () => {
	it('is the estimate, its doubt parted into the tester\'s own and the rest', () => {
		const findings = [touch(), core(580, { u: 5, bias: 4 })];
		const found = assess(startOf(stamped14), findings);
		const belief = beliefOf(stamped14, findings);
		expect([belief.mean, belief.low, belief.median, belief.high]).toEqual([found.mean, found.low, found.median, found.high]);
		expect(belief.odds).toEqual(found.odds);
		const all = Object.values(belief.shared).reduce((sum, u) => sum + u * u, belief.own ** 2);
		expect(Math.sqrt(all)).toBeCloseTo(found.sd, 9);
		// a tester that reads high makes the piece look finer than it is: the bulk lies lower
		expect(belief.shared['x']!).toBeLessThan(0);
	});
	it('has no shared part for a stranger\'s reading, a magnet or a tester without bias', () => {
		expect(beliefOf(stamped14, [reading(588, { tester: null }), magnet('none'), core(581, { bias: 0 })]).shared).toEqual({});
	});
	it('is moved by nearly all of the bias where only that tester speaks', () => {
		const unmarked = { ...stamped14, claimed: null, legal: null, origin: 'unmarked' as const };
		const { shared } = beliefOf(unmarked, [core(640, { u: 2, bias: 2 })]);
		expect(shared['x']!).toBeLessThan(-1.5);
		expect(shared['x']!).toBeGreaterThan(-2.5);
	});
});
