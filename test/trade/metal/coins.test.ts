import { describe, expect, it } from 'vitest';
import { coinById, coins, findCoin, wear, wornMass } from '../../../src/trade/metal/coins.ts';
import { perMilleNumber } from '../../../src/trade/metal/fineness.ts';
import { standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';

const found = (text: string) => {
	const result = findCoin(text);
	return result.ok ? result.value.id : result.problem.kind;
};

describe('a coin by its name', () => {
	it.each([
		['sovereign', 'sovereign'], ['Sovereigns', 'sovereign'], ['gold sovereign 1912', 'sovereign'], ['half sovereign', 'half-sovereign'],
		['Krugerrand', 'krugerrand'], ['1/4 oz krugerrand', 'krugerrand-quarter'], ['morgan dollar 1881', 'us-dollar-silver'],
		['silver eagle', 'us-silver-eagle'], ['20 francs', 'francs-20'], ['war nickel', 'us-war-nickel'], ['90% half', 'us-half-90'],
		['double eagle', 'us-double-eagle'], ['silver dime coin', 'us-dime-90'], ['us-eagle-50', 'us-eagle-50']
	])('finds "%s"', (text, id) => expect(found(text)).toBe(id));

	it('asks when a name means several, and says so when it knows none', () => {
		for (const text of ['eagle', 'maple leaf', 'half dollar', 'florin', 'Britannia']) expect(found(text)).toBe('coin-ambiguous');
		for (const text of ['', 'chain', 'toString', '1912', 'sovereign ring']) expect(found(text)).toBe('coin-unknown');
	});

	it('finds every coin by its own full name and by its id', () => {
		for (const coin of coins) {
			expect(found(coin.name), coin.name).toBe(coin.id);
			expect(coinById(coin.id)).toBe(coin);
		}
		expect(coinById('none')).toBeNull();
	});
});

describe('the coins', () => {
	it('have ids of their own, a mass, a fineness within the whole and a source', () => {
		expect(new Set(coins.map((coin) => coin.id)).size).toBe(coins.length);
		for (const coin of coins) {
			expect(coin.mass.grams.gt(0)).toBe(true);
			const total = coin.contents.reduce((sum, { fineness }) => sum + perMilleNumber(fineness), 0);
			expect(total, coin.id).toBeGreaterThan(300);
			expect(total, coin.id).toBeLessThanOrEqual(1000 + 1e-9);
			expect(coin.source).not.toBe('');
		}
	});

	it('share the doubt of their wear: ten coins have ten times the doubt of one, not the root of ten', () => {
		const sovereign = coinById('sovereign')!;
		const one = wornMass(sovereign, 1);
		const ten = wornMass(sovereign, 10);
		expect(one.value).toBeCloseTo(7.98805 * (1 - wear['circulated-gold'].lost), 9);
		expect(standardUncertainty(ten) / standardUncertainty(one)).toBeCloseTo(10, 9);
	});
});
