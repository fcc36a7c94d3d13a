import { describe, expect, it } from 'vitest';
import { defaultSpreads, isSpreadId, spreadFor, spreadIdFor } from '../../../src/trade/piece/class-spread.ts';

describe('how far pieces run from what they are taken at', () => {
	it.each([
		['14 kt', 'us-modern', 'us-modern'], ['585', 'uncontrolled', 'uncontrolled'], ['weighted 925', 'us-modern', 'weighted'],
		['1/20 14 kt', 'us-modern', 'layered'], ['gold plated 925', 'us-modern', 'layered'], ['rolled gold plate', 'unmarked', 'layered'], ['', 'unmarked', 'unmarked']
	] as const)('%s, %s: %s', (mark, origin, id) => expect(spreadIdFor(mark, origin)).toBe(id));

	it('grows as the control of marks gets weaker', () => {
		const sizes = (['hallmarked', 'us-modern', 'us-before-1981', 'uncontrolled'] as const).map((id) => defaultSpreads[id]);
		for (const [at, spread] of sizes.slice(1).entries()) {
			expect(spread.shared > sizes[at]!.shared && spread.own > sizes[at]!.own).toBe(true);
		}
	});

	it('is the buyer\'s where he set it', () => {
		const own = { shared: 0.1, own: 0.2 };
		expect(spreadFor('14 kt', 'us-modern', { 'us-modern': own })).toBe(own);
		expect(spreadFor('14 kt', 'hallmarked', { 'us-modern': own })).toBe(defaultSpreads.hallmarked);
		expect(['layered', 'toString'].map(isSpreadId)).toEqual([true, false]);
	});
});
