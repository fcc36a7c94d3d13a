import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { parseNumber } from '../../../src/trade/number/field.ts';
import { typedEstimate, typedFigure, typedNumber, typedPercent } from '../../../src/ui/format/typed-text.ts';

describe('a figure to be typed over', () => {
	it('has the mark of the buyer and at least the places asked for', () => {
		expect(typedNumber(decimal('4186.2'), 'dot', 2)).toBe('4186.20');
		expect(typedNumber(decimal('4186.2'), 'comma', 2)).toBe('4186,20');
		expect(typedNumber(decimal('52.315'), 'dot', 2)).toBe('52.315');
		expect(typedNumber(decimal('52.315'), 'comma', 2)).toBe('052,315');
		expect(typedPercent(decimal('0.85'), 'dot')).toBe('85');
		expect(typedPercent(decimal('0.9995'), 'comma')).toBe('99,95');
		expect(typedEstimate(0.16, 'dot')).toBe('16');
		expect(typedEstimate(0.07, 'comma')).toBe('7');
		expect(typedEstimate(0.0035, 'comma')).toBe('0,35');
		expect(typedFigure(12.5, 'comma')).toBe('12,5');
		expect(typedFigure(16, 'dot')).toBe('16');
		expect(typedFigure(1.125, 'comma')).toBe('01,125');
	});

	it('is read back as the same figure, whatever the mark, and never asked about (2 000 cases)', () => {
		const figure = fc.tuple(fc.bigInt({ min: 0n, max: 999_999_999n }), fc.integer({ min: 0, max: 6 }));
		fc.assert(
			fc.property(figure, fc.constantFrom('dot' as const, 'comma' as const), fc.integer({ min: 0, max: 3 }), ([digits, places], mark, least) => {
				const value = decimal(digits.toString()).div(decimal(`1${'0'.repeat(places)}`));
				const read = parseNumber(typedNumber(value, mark, least), { mark });
				expect(read.ok && read.value.equals(value)).toBe(true);
			}),
			{ numRuns: 2_000 }
		);
	});

	it('holds for estimates too (1 000 cases)', () => {
		fc.assert(
			fc.property(fc.integer({ min: 0, max: 100_000 }), fc.constantFrom('dot' as const, 'comma' as const), (thousandths, mark) => {
				const read = parseNumber(typedEstimate(thousandths / 100_000, mark), { mark });
				expect(read.ok && Number(read.value) / 100).toBeCloseTo(thousandths / 100_000, 9);
			}),
			{ numRuns: 1_000 }
		);
	});
});
