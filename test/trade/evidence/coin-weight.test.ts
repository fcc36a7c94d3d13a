import { describe, expect, it } from 'vitest';
import { coinDensity, coinObservation } from '../../../src/trade/evidence/coin-weight.ts';
import { coinById } from '../../../src/trade/metal/coins.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

const sovereign = coinById('sovereign')!;
const weighed = (grams: string, diameter: string | null = null) =>
	coinObservation({ grams: decimal(grams), division: decimal('0.01'), diameter: diameter === null ? null : decimal(diameter) }, sovereign);
const ratio = (of: ReturnType<typeof weighed>, core: 'brass' | 'lead' | 'tungsten') => Number(of.core!(core)) / of.solid![0]!;

describe('a coin against the table', () => {
	it('knows the density of its alloy: 22 parts gold, 2 parts copper', () => {
		// 17.7 ideal, a little less for gold with copper
		expect(coinDensity(sovereign)).toBeGreaterThan(17.4);
		expect(coinDensity(sovereign)).toBeLessThan(17.8);
	});
	it('speaks for a coin of the right weight and size', () => {
		expect(ratio(weighed('7.98'), 'brass')).toBeLessThan(0.15);
		expect(ratio(weighed('7.96', '22.05'), 'brass')).toBeLessThan(ratio(weighed('7.96'), 'brass'));
	});
	it('speaks against one that has the size of a sovereign and the weight of brass', () => {
		// 7.988 g x 8.55 / 17.6
		expect(ratio(weighed('3.88', '22.05'), 'brass')).toBeGreaterThan(1_000);
		expect(ratio(weighed('3.88', '22.05'), 'brass')).toBeGreaterThan(100 * ratio(weighed('3.88', '22.05'), 'lead'));
	});
	it('speaks against one that is right in weight and too wide', () => {
		expect(ratio(weighed('7.98', '31.6'), 'brass')).toBeGreaterThan(1);
	});
});
