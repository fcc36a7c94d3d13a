import { describe, expect, it } from 'vitest';
import { lookAlike, lookAlikes, looksLike } from '../../../src/trade/metal/look-alikes.ts';

const ids = (density: number, u: number) => looksLike(density, u).map(({ id }) => id);

describe('look-alikes by density', () => {
	it('are ranges in rising order', () => {
		expect(lookAlikes.every(({ low, high }) => low < high)).toBe(true);
		expect([...lookAlikes].sort((a, b) => a.low - b.low)).toEqual(lookAlikes);
		expect(lookAlike('steel').magnet).toBe('some');
	});
	it('are those within two uncertainties of a reading', () => {
		expect(ids(8.5, 0.02)).toEqual(['brass']);
		expect(ids(19.28, 0.02)).toEqual(['tungsten']);
		expect(ids(11.3, 0.05)).toEqual(['lead']);
		expect(ids(13.1, 0.05)).toEqual([]);
		expect(ids(10.36, 0.3)).toEqual(['silver']);
	});
});
