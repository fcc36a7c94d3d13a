import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mass } from '../../../src/trade/mass/mass.ts';
import { checkScale, errorBands, maximumPermissibleError, minimumLoad, type AccuracyClass, type Scale } from '../../../src/trade/mass/scale.ts';
import { toMass } from '../../../src/trade/mass/units.ts';
import { decimal, Decimal } from '../../../src/trade/number/decimal.ts';

const scale = (accuracyClass: Scale['accuracyClass'], e: string, unit: Scale['unit'] = 'g'): Scale => ({
	id: 's', name: 'counter scale', unit, division: decimal(e), verification: decimal(e), accuracyClass, checkedOn: null
});

describe('the error that a scale may have', () => {
	it('is not known without a class', () => {
		expect(maximumPermissibleError(scale(null, '0.01'), mass('5'))).toBeNull();
	});

	it('counts the load in e of the scale, in its own unit', () => {
		const troy = scale('II', '0.001', 'ozt');
		const e = decimal('0.0311034768');
		expect(maximumPermissibleError(troy, toMass(decimal('5'), 'ozt'))!.grams.equals(e.div(2))).toBe(true);
		expect(maximumPermissibleError(troy, toMass(decimal('5.001'), 'ozt'))!.grams.equals(e)).toBe(true);
	});

	it('never falls as the load grows, is one of three multiples of e, and doubles in service (1 000 cases)', () => {
		const load = fc.bigInt({ min: 0n, max: 10n ** 8n }).map((n) => ({ grams: new Decimal(n.toString()).div(100) }));
		const class_ = fc.constantFrom<AccuracyClass>('I', 'II', 'III', 'IIII');
		fc.assert(
			fc.property(class_, fc.constantFrom('0.001', '0.01', '0.1', '1'), load, load, (accuracyClass, e, a, b) => {
				const [small, large] = a.grams.lte(b.grams) ? [a, b] : [b, a];
				const s = scale(accuracyClass, e);
				const [first, second] = [maximumPermissibleError(s, small)!, maximumPermissibleError(s, large)!];
				expect(first.grams.lte(second.grams)).toBe(true);
				expect(['0.5', '1', '1.5']).toContain(first.grams.div(decimal(e)).toString());
				expect(maximumPermissibleError(s, small, 'inService')!.grams.equals(first.grams.times(2))).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('the least load', () => {
	it('is twenty e for a scale without a class, in the unit of the scale', () => {
		expect(minimumLoad(scale(null, '0.01')).grams.toString()).toBe('0.2');
		expect(minimumLoad(scale('III', '0.1', 'dwt')).grams.toString()).toBe('3.11034768');
	});

	it('changes for class II at e = 0.1 g, also on a troy scale', () => {
		expect(minimumLoad(scale('II', '0.001', 'ozt')).grams.equals(toMass(decimal('0.02'), 'ozt').grams)).toBe(true);
		expect(minimumLoad(scale('II', '0.01', 'ozt')).grams.equals(toMass(decimal('0.5'), 'ozt').grams)).toBe(true);
	});
});

describe('the permitted errors by load', () => {
	it('are none without a class', () => {
		expect(errorBands(scale(null, '0.01'))).toEqual([]);
	});

	it.each(['I', 'II', 'III', 'IIII'] as const)('say for class %s what the error at a load says, on both sides of each limit', (class_) => {
		const s = scale(class_, '0.1', 'dwt');
		const bands = errorBands(s);
		expect(bands).toHaveLength(3);
		const little = decimal('0.000001');
		for (const [index, { upTo, error }] of bands.entries()) {
			const above = upTo === null ? bands[index - 1]!.upTo!.grams.plus(little) : upTo.grams;
			expect(maximumPermissibleError(s, { grams: above })!.grams.equals(error.grams)).toBe(true);
			if (upTo === null) continue;
			expect(maximumPermissibleError(s, { grams: upTo.grams.plus(little) })!.grams.equals(bands[index + 1]!.error.grams)).toBe(true);
		}
	});
});

describe('a scale as described', () => {
	it('needs a name, and an interval that its display can show', () => {
		expect(checkScale({ ...scale('II', '0.1'), name: '' })).toEqual({ ok: false, problem: { kind: 'scale-name-missing' } });
		const fine = { ...scale('II', '0.1'), verification: decimal('0.05') };
		expect(checkScale(fine)).toMatchObject({ ok: false, problem: { kind: 'scale-verification-under-division', unit: 'g' } });
		const usual = { ...scale('II', '0.1'), division: decimal('0.01') };
		expect(checkScale(usual)).toEqual({ ok: true, value: usual });
	});
});
