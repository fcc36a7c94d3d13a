import { describe, expect, it } from 'vitest';
import { mass } from '../../src/trade/mass/mass.ts';
import { maximumPermissibleError, minimumLoad, type AccuracyClass, type Scale } from '../../src/trade/mass/scale.ts';
import { decimal } from '../../src/trade/number/decimal.ts';

const scale = (accuracyClass: AccuracyClass, e: string): Scale => ({
	id: 's', name: 'scale', unit: 'g', division: decimal(e), verification: decimal(e), accuracyClass, checkedOn: null
});
const error = (accuracyClass: AccuracyClass, e: string, load: string, occasion: 'verification' | 'inService' = 'verification') =>
	maximumPermissibleError(scale(accuracyClass, e), mass(load), occasion)!.grams.toString();

// Source: OIML R 76-1:2006, 3.5.1, table 6: 0.5 e, 1 e and 1.5 e by the load in e; the upper end of a band belongs to it
describe('OIML R 76-1:2006, table 6: largest permitted errors at verification', () => {
	it.each<[AccuracyClass, string, string, string]>([
		['I', '0.001', '50', '0.0005'],
		['I', '0.001', '50.001', '0.001'],
		['I', '0.001', '200', '0.001'],
		['I', '0.001', '200.001', '0.0015'],
		['II', '0.01', '0', '0.005'],
		['II', '0.01', '50.00', '0.005'],
		['II', '0.01', '50.01', '0.01'],
		['II', '0.01', '200.00', '0.01'],
		['II', '0.01', '200.01', '0.015'],
		['II', '0.01', '1000.00', '0.015'],
		['III', '0.1', '50.0', '0.05'],
		['III', '0.1', '50.1', '0.1'],
		['III', '0.1', '200.0', '0.1'],
		['III', '0.1', '200.1', '0.15'],
		['IIII', '5', '250', '2.5'],
		['IIII', '5', '255', '5'],
		['IIII', '5', '1000', '5'],
		['IIII', '5', '1005', '7.5']
	])('class %s, e %s g, load %s g: %s g', (accuracyClass, e, load, text) => {
		expect(error(accuracyClass, e, load)).toBe(text);
	});
});

// Source: The Non-automatic Weighing Instruments (EEC Requirements) Regulations 1995 (UK SI 1995/1907), schedule 2, 4.2: in service
// twice the errors of 4.1; OIML R 76-1:2006, 3.5.2 says the same
describe('UK SI 1995/1907, schedule 2, paragraph 4.2: twice as much in service', () => {
	it.each<[AccuracyClass, string, string, string]>([
		['II', '0.01', '50.00', '0.01'],
		['II', '0.01', '50.01', '0.02'],
		['III', '0.1', '200.1', '0.3'],
		['I', '0.001', '200.001', '0.003']
	])('class %s, e %s g, load %s g: %s g', (accuracyClass, e, load, text) => {
		expect(error(accuracyClass, e, load, 'inService')).toBe(text);
	});
});

// Source: Minnesota Department of Commerce, precious metals, on NIST Handbook 44 (2.20 Scales): a class II scale with a division of
// 0.1 g is allowed 0.1 g in use for 0 to 500 g
describe('Minnesota Department of Commerce on NIST Handbook 44, 2.20: class II, 0.1 g, in use', () => {
	it('is allowed 0.1 g up to 500 g and more above', () => {
		expect(error('II', '0.1', '0.1', 'inService')).toBe('0.1');
		expect(error('II', '0.1', '500', 'inService')).toBe('0.1');
		expect(error('II', '0.1', '500.1', 'inService')).toBe('0.2');
	});
});

// Source: OIML R 76-1:2006, 3.2, table 3, column "minimum capacity (lower limit)"
describe('OIML R 76-1:2006, table 3: least load', () => {
	it.each<[AccuracyClass, string, string]>([
		['I', '0.001', '0.1'],
		['II', '0.001', '0.02'],
		['II', '0.01', '0.2'],
		['II', '0.05', '1'],
		['II', '0.1', '5'],
		['II', '1', '50'],
		['III', '0.1', '2'],
		['III', '2', '40'],
		['III', '5', '100'],
		['IIII', '5', '50']
	])('class %s, e %s g: %s g', (accuracyClass, e, text) => {
		expect(minimumLoad(scale(accuracyClass, e)).grams.toString()).toBe(text);
	});
});

// Source: Minnesota Department of Commerce, precious metals, on NIST Handbook 44, 2.20, table 8: class II, 0.1 g: 5 g (50 divisions);
// 0.01 g: 0.2 g (20 divisions)
describe('Minnesota Department of Commerce on NIST Handbook 44, table 8: smallest item on a class II scale', () => {
	it.each([['0.1', '5'], ['0.01', '0.2']])('division %s g: %s g', (e, text) => {
		expect(minimumLoad(scale('II', e)).grams.toString()).toBe(text);
	});
});
