import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	compareFineness, fromKarat, fromPerMille, fromShare, karatsOf, parseFineness, perMilleNumber, shareOf
} from '../../../src/trade/metal/fineness.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exactToText, ratio } from '../../../src/trade/number/exact.ts';

const read = (text: string) => {
	const result = parseFineness(text);
	return result.ok ? exactToText(result.value.perMille) : result.problem.kind;
};

describe('fineness', () => {
	it('keeps 14 kt a fraction and apart from 585 and from 583.33', () => {
		expect(exactToText(fromKarat(decimal('14')).perMille)).toBe('1750/3');
		expect(compareFineness(fromKarat(decimal('14')), fromPerMille(decimal('585')))).toBe(-1);
		expect(compareFineness(fromKarat(decimal('14')), fromPerMille(decimal('583.33')))).toBe(1);
		expect(compareFineness(fromKarat(decimal('18')), fromPerMille(decimal('750')))).toBe(0);
	});

	it('gives the karats back that were put in', () => {
		fc.assert(
			fc.property(fc.integer({ min: 0, max: 24_000 }), (n) => {
				const karats = decimal((n / 1000).toFixed(3));
				expect(compareExact(karatsOf(fromKarat(karats)), ratio(karats, 1n))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('goes through a share of one and back', () => {
		fc.assert(
			fc.property(fc.bigInt({ min: 0n, max: 10_000n }), fc.bigInt({ min: 1n, max: 10_000n }), (a, b) => {
				const share = a <= b ? ratio(a, b) : ratio(b, a);
				expect(compareExact(shareOf(fromShare(share)), share)).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('refuses more than the whole as our own mistake', () => {
		expect(() => fromPerMille(decimal('1000.1'))).toThrow(/between 0 and 1000/);
		expect(() => fromKarat(decimal('24.1'))).toThrow(/between 0 and 1000/);
		expect(() => fromPerMille(decimal('-1'))).toThrow(/between 0 and 1000/);
	});
});

describe('a fineness as typed', () => {
	it.each([
		['585', '585'], ['58.5%', '585'], ['58,5 %', '585'], ['14k', '1750/3'], ['14 kt', '1750/3'], ['14ct', '1750/3'],
		['999.9', '9999/10'], ['999,9', '9999/10'], ['0.585', '585'], ['.925', '925'], ['9999', '9999/10'], ['99999', '99999/100'],
		['750 ‰', '750'], ['1000', '1000'], ['0', '0'], ['21.6 karat', '900'], ['916,667', '916667/1000'], ['100', '100'], ['5 ‰', '5']
	])('reads %s', (text, perMille) => expect(read(text)).toBe(perMille));

	it.each([
		['', 'number-missing'], ['14', 'fineness-unit-missing'], ['58.5', 'fineness-unit-missing'], ['1', 'fineness-unit-missing'],
		['1001', 'fineness-over-whole'], ['25k', 'fineness-over-whole'], ['101%', 'fineness-over-whole'], ['-585', 'number-unreadable'],
		['1e3', 'number-unreadable'], ['gold', 'number-unreadable'], ['5.8.5', 'number-unreadable'], ['٥٨٥', 'number-unreadable']
	])('asks about or refuses "%s"', (text, kind) => expect(read(text)).toBe(kind));

	it('offers what a bare number may mean', () => {
		expect(parseFineness('14')).toEqual({
			ok: false,
			problem: { kind: 'fineness-unit-missing', text: '14', choices: ['14 kt', '14 %', '14 ‰'] }
		});
	});

	it('never lets text through as something outside 0 to 1000', () => {
		fc.assert(
			fc.property(fc.oneof(fc.string(), fc.stringMatching(/^[\d.,%k ]{0,12}$/)), (text) => {
				const result = parseFineness(text);
				if (!result.ok) return;
				const value = perMilleNumber(result.value);
				expect(value >= 0 && value <= 1000).toBe(true);
			}),
			{ numRuns: 2_000 }
		);
	});
});
