import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, minus, ratio, times } from '../../../src/trade/number/exact.ts';
import { exactMoney } from '../../../src/trade/price/money.ts';
import { offerFor, shareFor, tiers, type Tier } from '../../../src/trade/price/offer.ts';

const tier = (from: string, share: string): Tier => ({ from: decimal(from), share: decimal(share) });
const three = [tier('0', '0.7'), tier('1000', '0.8'), tier('10000', '0.85')];

describe('tiers', () => {
	it('are put in order', () => {
		const found = tiers([three[2]!, three[0]!, three[1]!]);
		expect(found).toEqual({ ok: true, value: three });
	});

	it('say what is wrong with them', () => {
		expect(tiers([])).toMatchObject({ problem: { kind: 'offer-no-tiers' } });
		expect(tiers([tier('5', '0.8')])).toMatchObject({ problem: { kind: 'offer-first-tier' } });
		expect(tiers([tier('0', '0.8'), tier('0.00', '0.9')])).toMatchObject({ problem: { kind: 'offer-tier-twice' } });
		expect(tiers([tier('-1', '0.8')])).toMatchObject({ problem: { kind: 'offer-tier-from' } });
		expect(tiers([tier('0', '1.01')])).toMatchObject({ problem: { kind: 'offer-share' } });
		expect(tiers([tier('0', '0')])).toMatchObject({ problem: { kind: 'offer-share' } });
		expect(tiers([tier('0', '1')]).ok).toBe(true);
	});

	it('begin at their limit, to the last digit', () => {
		expect(shareFor(exact(decimal('999.999999')), three).toString()).toBe('0.7');
		expect(shareFor(ratio(1000n, 1n), three).toString()).toBe('0.8');
		expect(shareFor(ratio(3000n, 3n), [...three].reverse()).toString()).toBe('0.8');
		expect(shareFor(ratio(1_000_000n, 1n), three).toString()).toBe('0.85');
		expect(() => shareFor(ratio(0n, 1n), [tier('5', '0.8')])).toThrow(/no tier/);
	});
});

describe('an offer', () => {
	it('goes down to the minor unit unless told otherwise', () => {
		expect(offerFor(exact(decimal('954.0583')), 'USD', three).offer.amount.toString()).toBe('667.84');
		expect(offerFor(exact(decimal('954.0583')), 'JPY', three).offer.amount.toString()).toBe('667');
		expect(offerFor(exact(decimal('954.0583')), 'USD', three, { step: decimal('5') }).offer.amount.toString()).toBe('665');
		expect(offerFor(exact(decimal('954.0583')), 'USD', three, { step: decimal('5'), direction: 'half-up' }).offer.amount.toString()).toBe('670');
	});

	it('never falls when the value grows within a tier, and is under its share by less than a step', () => {
		const value = fc.tuple(fc.bigInt({ min: 0n, max: 10n ** 12n }), fc.bigInt({ min: 1n, max: 10n ** 6n })).map(([n, d]) => ({ n, d }));
		fc.assert(
			fc.property(value, fc.constantFrom('0.01', '0.05', '1', '5', '10'), (worth, text) => {
				const step = decimal(text);
				const { share, unrounded, offer } = offerFor(worth, 'EUR', three, { step });
				expect(compareExact(unrounded, times(worth, exact(share)))).toBe(0);
				const given = minus(unrounded, exactMoney(offer));
				expect(given.n >= 0n && compareExact(given, exact(step)) < 0).toBe(true);
				expect(offer.amount.div(step).isInteger()).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is not made for less than nothing', () => {
		expect(() => offerFor(ratio(-1n, 1n), 'EUR', three)).toThrow(/less than nothing/);
	});
});
