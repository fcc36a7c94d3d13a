import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNumber, type NumberRules } from '../../../src/trade/number/field.ts';

const read = (text: string, rules?: NumberRules) => {
	const result = parseNumber(text, rules);
	return result.ok ? result.value.toString() : result.problem.kind;
};

describe('a number as people type it', () => {
	it.each([
		['12.30', '12.3'],
		['12,34', '12.34'],
		['12,3', '12.3'],
		['.5', '0.5'],
		[',5', '0.5'],
		['5.', '5'],
		['0,234', '0.234'],
		['1.234', '1.234'],
		['12.345', '12.345'],
		['1.2345', '1.2345'],
		['1,2345', '1.2345'],
		['1,234.5', '1234.5'],
		['1.234,5', '1234.5'],
		['1,234,567', '1234567'],
		['1.234.567', '1234567'],
		['1 234,5', '1234.5'],
		['1\u202f234.5', '1234.5'],
		["1'234.50", '1234.5'],
		['+7', '7'],
		['  7 ', '7'],
		['-0', '0'],
		['007', '7']
	])('%s is %s', (text, value) => expect(read(text)).toBe(value));

	it.each([
		['', 'number-missing'],
		['   ', 'number-missing'],
		['1,234', 'number-ambiguous'],
		['123,456', 'number-ambiguous'],
		['1e9', 'number-unreadable'],
		['-3', 'number-negative'],
		['\u22123', 'number-negative'],
		['١٢', 'number-unreadable'],
		['１２', 'number-unreadable'],
		['⚖️', 'number-unreadable'],
		['1.2.3', 'number-unreadable'],
		['12,34,567', 'number-unreadable'],
		['1,23.4', 'number-unreadable'],
		['1 23', 'number-unreadable'],
		['0x10', 'number-unreadable'],
		['NaN', 'number-unreadable'],
		['Infinity', 'number-unreadable'],
		['1/2', 'number-unreadable'],
		['12 g', 'number-unreadable'],
		['.', 'number-unreadable'],
		['1234567890', 'number-too-large'],
		['0.1234567890123456', 'number-too-many-digits']
	])('%s is refused as %s', (text, kind) => expect(read(text)).toBe(kind));

	it('asks which of the two readings is meant', () => {
		const result = parseNumber('1,234');
		expect(!result.ok && result.problem).toEqual({
			kind: 'number-ambiguous',
			text: '1,234',
			asDecimal: '1.234',
			asThousands: '1234'
		});
	});

	it('asks about a dot before three digits only those who write decimal commas', () => {
		expect(read('1.234', { mark: 'comma' })).toBe('number-ambiguous');
		expect(read('1,234', { mark: 'comma' })).toBe('number-ambiguous');
		expect(read('12,345', { mark: 'comma' })).toBe('number-ambiguous');
		expect(read('1.234', { mark: 'dot' })).toBe('1.234');
	});

	it('holds to the limits of the field', () => {
		expect(read('0', { positive: true })).toBe('number-not-positive');
		expect(read('2.5', { whole: true })).toBe('number-not-whole');
		expect(read('1001', { most: '1000' })).toBe('number-too-large');
	});

	it('gives back every plain decimal exactly, with either mark', () => {
		fc.assert(
			fc.property(fc.nat(999_999), fc.nat(99), (whole, cents) => {
				const places = cents.toString().padStart(2, '0');
				for (const mark of ['.', ',']) {
					const result = parseNumber(`${whole}${mark}${places}`);
					expect(result.ok && result.value.toFixed(2)).toBe(`${whole}.${places}`);
				}
			}),
			{ numRuns: 1_000 }
		);
	});

	it('never throws and never gives anything but a finite value or a problem', () => {
		fc.assert(
			fc.property(fc.string({ unit: fc.constantFrom(...'0123456789.,-+ eE\'x%\u00a0١') }), (text) => {
				const result = parseNumber(text);
				if (result.ok) expect(result.value.isFinite() && !result.value.isNegative()).toBe(true);
			}),
			{ numRuns: 5_000 }
		);
	});
});
