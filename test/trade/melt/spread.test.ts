import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exact, ratio } from '../../../src/trade/number/exact.ts';
import { balance } from '../../../src/trade/melt/balance.ts';
import { expected, lossesOf, type Losses } from '../../../src/trade/melt/losses.ts';
import { spread, type MeltParcel } from '../../../src/trade/melt/spread.ts';

const parcel: MeltParcel = {
	lossClass: 'worn',
	net: decimal('100'),
	fine: { Au: ratio(100n * 14n, 24n), Cu: exact(decimal('20')) },
	netDoubt: { value: 100, contributions: { 'scale:1': 0.02 } },
	fineDoubt: { Au: { value: 1400 / 24, contributions: { 'scale:1': 0.0117, 'class:14 kt|chain|us-modern': -0.6 } } }
};
const losses = lossesOf('worn');
const shares = ({ nonMetal, metalLoss, retention }: Losses) => ({
	nonMetal: expected(nonMetal),
	metalLoss: expected(metalLoss),
	retention: expected(retention)
});
const half = (high: string, low: string) => (Number(high) - Number(low)) / 2 / Math.sqrt(3);

describe('the doubts of one parcel in the crucible', () => {
	it('moves the bar and the gold by each source as the formula says', () => {
		const { bar, retained, grossLoss } = spread(parcel, losses, null);
		// M = g (1 − d)(1 − l), F = r (1 − d) f
		expect(bar.contributions['scale:1']).toBeCloseTo(0.02 * 0.994 * 0.9935, 12);
		expect(bar.contributions['non-metal:worn']).toBeCloseTo(-100 * 0.9935 * half('0.01', '0.002'), 12);
		expect(bar.contributions['loss:worn']).toBeCloseTo(-100 * 0.994 * half('0.01', '0.003'), 12);
		expect(bar.contributions['retention:worn']).toBeCloseTo(0, 12);
		expect(bar.contributions['class:14 kt|chain|us-modern']).toBeCloseTo(0, 12);
		expect(retained.Au!.contributions['class:14 kt|chain|us-modern']).toBeCloseTo(-0.6 * 0.99875 * 0.994, 12);
		expect(retained.Au!.contributions['retention:worn']).toBeCloseTo((1400 / 24) * 0.994 * half('0.9995', '0.998'), 12);
		expect(grossLoss.contributions['loss:worn']).toBeCloseTo(-bar.contributions['loss:worn']!, 12);
		expect(grossLoss.contributions['scale:1']).toBeCloseTo(0.02 * (1 - 0.994 * 0.9935), 12);
	});

	it('turns copper down when the class loses more, and not the gold', () => {
		const { retained } = spread(parcel, losses, null);
		expect(retained.Cu!.contributions['loss:worn']).toBeLessThan(0);
		expect(Object.keys(retained.Au!.contributions)).not.toContain('loss:worn');
	});

	it('stays at its bound: the metal loss of the class moves nothing there', () => {
		const pure: MeltParcel = { lossClass: 'clean', net: decimal('100'), fine: { Au: exact(decimal('99.99')) } };
		const clean = lossesOf('clean');
		const { limit } = balance(exact(pure.net), pure.fine, shares(clean));
		expect(limit).toBe('most');
		const { bar, retained } = spread(pure, clean, limit);
		expect(Object.keys(bar.contributions)).not.toContain('loss:clean');
		expect(retained.Au!.value).toBeLessThan(bar.value);
		const { bar: least } = spread(pure, clean, 'least');
		expect(least.value).toBeGreaterThan(bar.value);
	});

	it('is the exact balance in numbers', () => {
		const exactly = balance(exact(parcel.net), parcel.fine, shares(losses));
		const { bar, retained } = spread(parcel, losses, exactly.limit);
		expect(bar.value).toBeCloseTo(Number(exactly.bar.n) / Number(exactly.bar.d), 9);
		const copper = exactly.metals.Cu!.retained;
		expect(retained.Cu!.value).toBeCloseTo(Number(copper.n) / Number(copper.d), 9);
	});
});
