import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, exactToText, plus, ratio, times } from '../../../src/trade/number/exact.ts';
import { askedFor, chanceOfLoss, parseAsked, volatilityOfValue } from '../../../src/trade/price/asked.ts';
import { defaultVolatility } from '../../../src/trade/price/age.ts';
import { exactMoney, money } from '../../../src/trade/price/money.ts';
import { valueOf } from '../../../src/trade/price/value.ts';

describe('what the seller asks', () => {
	it('is read as money', () => {
		expect(parseAsked('1 250,50', 'EUR')).toMatchObject({ ok: true, value: { currency: 'EUR' } });
		expect(parseAsked('12.345', 'EUR')).toMatchObject({ ok: false, problem: { kind: 'asked-too-fine', text: '12.345' } });
		expect(parseAsked('12.345', 'KWD').ok).toBe(true);
		expect(parseAsked('0', 'EUR')).toMatchObject({ ok: false, problem: { kind: 'number-not-positive' } });
	});

	it('leaves a margin on cost and is a share of the value', () => {
		const { margin, share } = askedFor(exact(decimal('1080')), money(decimal('1000'), 'USD'));
		expect(exactToText(margin)).toBe('2/25');
		expect(exactToText(share!)).toBe('25/27');
		expect(exactToText(askedFor(ratio(900n, 1n), money(decimal('1000'), 'USD')).margin)).toBe('-1/10');
		expect(askedFor(ratio(0n, 1n), money(decimal('1000'), 'USD')).share).toBeNull();
		expect(() => askedFor(ratio(1n, 1n), money(decimal('0'), 'USD'))).toThrow(/margin on nothing/);
	});

	it('gives back the value: price x (1 + margin) = value and value x share = price', () => {
		fc.assert(
			fc.property(fc.bigInt({ min: 1n, max: 10n ** 12n }), fc.bigInt({ min: 1n, max: 10n ** 6n }), fc.integer({ min: 1, max: 10 ** 9 }), (n, d, cents) => {
				const price = money(decimal(String(cents)).div(100), 'EUR');
				const { margin, share } = askedFor({ n, d }, price);
				expect(compareExact(times(exactMoney(price), plus(exact(1n), margin)), { n, d })).toBe(0);
				expect(compareExact(times({ n, d }, share!), exactMoney(price))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('the chance of loss', () => {
	it('is one half without a margin and certain without a value', () => {
		expect(chanceOfLoss(0, 0.25, 30)).toBe(0.5);
		expect(chanceOfLoss(-1, 0.25, 30)).toBe(1);
		expect(chanceOfLoss(-0.01, 0.25, 30)).toBeGreaterThan(0.5);
	});

	it('is known at once when nothing can move', () => {
		expect(chanceOfLoss(0.08, 0.25, 0)).toBe(0);
		expect(chanceOfLoss(0, 0.25, 0)).toBe(0);
		expect(chanceOfLoss(-0.001, 0, 30)).toBe(1);
		expect(() => chanceOfLoss(-1.1, 0.25, 30)).toThrow(/under nothing/);
	});

	it('falls with the margin and rises with time, as a counted walk of prices says too', () => {
		expect(chanceOfLoss(0.1, 0.25, 30)).toBeLessThan(chanceOfLoss(0.05, 0.25, 30));
		expect(chanceOfLoss(0.1, 0.25, 60)).toBeGreaterThan(chanceOfLoss(0.1, 0.25, 30));
		// independent route: 40 000 steps up or down by the same factor in 30 days, binomial counted term by term
		const steps = 40_000;
		const up = (0.25 * Math.sqrt(30 / 365)) / Math.sqrt(steps);
		let lost = 0;
		let logChance = -steps * Math.LN2;
		for (let k = 0; (2 * k - steps) * up < -Math.log(1.08); k += 1) {
			lost += Math.exp(logChance);
			logChance += Math.log((steps - k) / (k + 1));
		}
		expect(chanceOfLoss(0.08, 0.25, 30)).toBeCloseTo(lost, 2);
	});

	it('takes a lot of several metals at the mean of their volatilities by value', () => {
		const sheet = {
			currency: 'EUR',
			quotes: [{ metal: 'Au', amount: decimal('100'), per: 'g' }, { metal: 'Ag', amount: decimal('1'), per: 'g' }],
			at: 0,
			source: 'invented'
		} as const;
		const half = valueOf({ Au: ratio(1n, 1n), Ag: ratio(100n, 1n) }, sheet);
		expect(volatilityOfValue(half)).toBeCloseTo((defaultVolatility.Au + defaultVolatility.Ag) / 2, 14);
		expect(volatilityOfValue(half, { Au: 0.2, Ag: 0.4 })).toBeCloseTo(0.3, 14);
		expect(volatilityOfValue(valueOf({}, sheet))).toBe(0);
	});
});
