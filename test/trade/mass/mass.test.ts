import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mass, minusMass, plusMass } from '../../../src/trade/mass/mass.ts';

describe('a mass', () => {
	it('is grams, digit for digit', () => {
		expect(mass('12.30').grams.toFixed(2)).toBe('12.30');
		expect(plusMass(mass('0.1'), mass('0.2')).grams.toString()).toBe('0.3');
		expect(minusMass(mass('0.3'), mass('0.5')).grams.toString()).toBe('-0.2');
	});

	it('adds in any order and takes back what was added (1 000 cases)', () => {
		const text = (sign: string, whole: bigint, rest: bigint) => `${sign}${whole}.${rest.toString().padStart(3, '0')}`;
		const whole = fc.bigInt({ min: 0n, max: 10n ** 9n });
		const grams = fc.tuple(fc.constantFrom('', '-'), whole, fc.bigInt({ min: 0n, max: 999n })).map((parts) => mass(text(...parts)));
		fc.assert(
			fc.property(grams, grams, grams, (a, b, c) => {
				expect(plusMass(plusMass(a, b), c).grams.equals(plusMass(plusMass(c, b), a).grams)).toBe(true);
				expect(minusMass(plusMass(a, b), b).grams.equals(a.grams)).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('comes from plain text only', () => {
		expect(() => mass('12,3')).toThrow(/not a plain decimal/);
		expect(() => mass('')).toThrow(/not a plain decimal/);
	});
});
