import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { barFineOunces, goldBarGross, silverBarGross } from '../../../src/trade/metal/bar.ts';
import { fromPerMille } from '../../../src/trade/metal/fineness.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

describe('large bars', () => {
	it('books gold on a multiple of 0.025 ozt that the bar exceeds by 0.002 to 0.027 ozt', () => {
		fc.assert(
			fc.property(fc.integer({ min: 350_000, max: 430_000 }), (thousandths) => {
				const weighed = decimal((thousandths / 1000).toFixed(3));
				const booked = goldBarGross(weighed);
				expect(booked.mod(decimal('0.025')).isZero()).toBe(true);
				const over = weighed.minus(booked);
				expect(over.gte(decimal('0.002')) && over.lt(decimal('0.027'))).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('books silver on a multiple of 0.1 ozt, down', () => {
		expect(silverBarGross(decimal('1164.99')).toString()).toBe('1164.9');
	});

	it('never finds more fine metal than the bar', () => {
		expect(barFineOunces(decimal('400'), fromPerMille(decimal('1000'))).toString()).toBe('400');
	});

	it('does not book a bar lighter than the turn', () => {
		expect(() => goldBarGross(decimal('0.001'))).toThrow(/turn of the scale/);
	});
});
