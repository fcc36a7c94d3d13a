import { describe, expect, it } from 'vitest';
import { balanceIn, observe, observeAll } from '../../../src/trade/evidence/observe.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { magnet, reading, stamped14, touch, water } from './some-findings.ts';

const start = startOf(stamped14);

describe('what the findings say', () => {
	it('is nothing of a coin that nobody knows, and of a piece too light for the water scale', () => {
		const coin = { kind: 'coin' as const, id: 'c', at: 1, coin: 'moon penny', grams: decimal('8'), division: decimal('0.01'), diameter: null };
		expect(observe(start, coin, null)).toBeNull();
		expect(observe(start, water(13.1, 2), null)).toBeNull();
		expect(observeAll(start, [coin, water(13.1, 2)])).toEqual([]);
	});
	it('joins water weighings that agree and readings of one tester', () => {
		expect(observeAll(start, [water(13.1), water(13.12), reading(585), reading(590), touch(), touch(), magnet('none')])).toHaveLength(4);
	});
	it('lends the balance of a fluorescence reading to the water weighing', () => {
		const read = { ...reading(0), reads: [{ metal: 'Au' as const, perMille: decimal('585') }, { metal: 'Pd' as const, perMille: decimal('415') }] };
		expect(balanceIn(start, [read])).toEqual([{ metal: 'Pd', share: 1 }]);
		// with palladium 15.3 g/cm³ is 14 kt; without it, hardly
		const at = (findings: Parameters<typeof observeAll>[1]) => observeAll(start, findings)[0]!.solid![585]!;
		expect(at([water(15.3), read])).toBeGreaterThan(10 * at([water(15.3)]));
	});
});
