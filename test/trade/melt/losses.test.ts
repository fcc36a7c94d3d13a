import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exactToText } from '../../../src/trade/number/exact.ts';
import { lossClasses } from '../../../src/trade/piece/loss-class.ts';
import {
	defaultLosses, expected, lossesOf, lossRange, parseLossRange, uncertainRange, type LossPart
} from '../../../src/trade/melt/losses.ts';

const parts: readonly LossPart[] = ['nonMetal', 'metalLoss', 'retention'];

describe('losses by class', () => {
	it('has a default for every class that its own limits would accept', () => {
		for (const id of lossClasses) {
			for (const part of parts) {
				const { low, high } = defaultLosses[id][part];
				expect(lossRange(part, low, high), `${id} ${part}`).toEqual({ ok: true, value: { low, high } });
			}
		}
	});

	it('keeps the order of the trade: stones and dental carry most dirt, a clean piece loses least', () => {
		for (const id of lossClasses) {
			if (id === 'bar') continue;
			expect(defaultLosses.clean.metalLoss.low.lte(defaultLosses[id].metalLoss.low)).toBe(true);
			expect(defaultLosses.dental.nonMetal.high.gte(defaultLosses[id].nonMetal.high)).toBe(true);
		}
	});

	it('takes what the buyer set and keeps the rest', () => {
		const own = { clean: { retention: { low: decimal('0.99'), high: decimal('0.99') } } };
		expect(lossesOf('clean', own).retention.low.toString()).toBe('0.99');
		expect(lossesOf('clean', own).metalLoss).toBe(defaultLosses.clean.metalLoss);
		expect(lossesOf('worn', own)).toEqual(defaultLosses.worn);
	});

	it('is read from two percent fields', () => {
		expect(parseLossRange('nonMetal', '2', '15 ', 'comma')).toEqual({ ok: true, value: { low: decimal('0.02'), high: decimal('0.15') } });
		expect(parseLossRange('nonMetal', '2', 'x')).toMatchObject({ problem: { kind: 'number-unreadable' } });
		expect(parseLossRange('nonMetal', '', '2')).toMatchObject({ problem: { kind: 'number-missing' } });
		expect(parseLossRange('retention', '101', '101')).toMatchObject({ problem: { kind: 'number-too-large' } });
		expect(parseLossRange('retention', '20', '99')).toMatchObject({ problem: { kind: 'loss-range-outside', part: 'retention' } });
		expect(parseLossRange('metalLoss', '2', '1')).toMatchObject({ problem: { kind: 'loss-range-reversed' } });
	});

	it('is calculated at the middle, with the spread of a rectangle', () => {
		const range = { low: decimal('0.02'), high: decimal('0.15') };
		expect(exactToText(expected(range))).toBe('17/200');
		const { value, contributions } = uncertainRange(range, 'non-metal:lemel');
		expect(value).toBeCloseTo(0.085, 15);
		expect(contributions['non-metal:lemel']).toBeCloseTo(0.13 / Math.sqrt(12), 15);
		expect(uncertainRange({ low: range.low, high: range.low }, 's').contributions['s']).toBe(0);
	});

	it('accepts a range exactly when it is in order and within its limits', () => {
		const share = fc.integer({ min: 0, max: 1000 });
		fc.assert(
			fc.property(share, share, (a, b) => {
				const found = lossRange('metalLoss', decimal(String(a)).div(1000), decimal(String(b)).div(1000));
				expect(found.ok).toBe(a <= b && b <= 500);
			}),
			{ numRuns: 1_000 }
		);
	});
});
