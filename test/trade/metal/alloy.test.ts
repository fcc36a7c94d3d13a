import { describe, expect, it } from 'vitest';
import { alloy, commonAlloys, finenessIn } from '../../../src/trade/metal/alloy.ts';
import { perMilleNumber } from '../../../src/trade/metal/fineness.ts';
import { exact, ratio } from '../../../src/trade/number/exact.ts';

describe('an alloy', () => {
	it('takes shares that sum to exactly one, thirds too', () => {
		const made = alloy('mine', [
			{ metal: 'Cu', share: ratio(2n, 3n) },
			{ metal: 'Zn', share: ratio(1n, 3n) }
		]);
		expect(made.ok).toBe(true);
		expect(made.ok && perMilleNumber(finenessIn(made.value, 'Cu'))).toBeCloseTo(2000 / 3, 12);
		expect(made.ok && perMilleNumber(finenessIn(made.value, 'Au'))).toBe(0);
	});

	it('leaves out metals with a share of zero', () => {
		const made = alloy('pure', [
			{ metal: 'Au', share: exact(1n) },
			{ metal: 'Ag', share: exact(0n) }
		]);
		expect(made.ok && made.value.shares.map(({ metal }) => metal)).toEqual(['Au']);
	});

	it('finds every alloy of the house whole', () => {
		for (const common of Object.values(commonAlloys)) {
			expect(alloy(common.name, common.shares), common.name).toEqual({ ok: true, value: { name: common.name, shares: common.shares } });
		}
	});
});
