import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Scale } from '../../../src/trade/mass/scale.ts';
import {
	divisionOf, massOf, massUncertainty, sameLoad, warnings, weighing, type Weighing, type WeighingOptions
} from '../../../src/trade/mass/weighing.ts';
import type { MassUnitId } from '../../../src/trade/mass/units.ts';
import { decimal, Decimal } from '../../../src/trade/number/decimal.ts';
import { covariance, plusUncertain, standardUncertainty } from '../../../src/trade/uncertainty/uncertain.ts';

const taken = (typed: string, unit: MassUnitId = 'g', options: WeighingOptions = {}): Weighing => {
	const result = weighing(typed, unit, options);
	if (!result.ok) throw new Error(`${typed}: ${result.problem.kind}`);
	return result.value;
};
const counter: Scale = {
	id: 'c1', name: 'counter scale', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null
};

describe('a weighing', () => {
	it('keeps what was typed', () => {
		expect(taken(' 12.30 ')).toEqual({
			typed: '12.30', reading: decimal('12.3'), unit: 'g', division: null, scale: null, repeats: [], tare: null
		});
	});

	it.each([
		['12.30', '0.01'], ['12.3', '0.1'], ['12', '1'], ['100', '1'], ['0.050', '0.001'], ['12,30', '0.01'],
		['1 234.5', '0.1'], ['1,234.50', '0.01'],
		['.5', '0.1'], ['5.', '1'], ['0,234', '0.001']
	])('"%s" steps by %s where no division is given', (typed, step) => {
		expect(divisionOf(taken(typed)).toString()).toBe(step);
	});

	it('takes the division given, then that of a scale showing the same unit, then the digits', () => {
		expect(divisionOf(taken('12.30', 'g', { division: decimal('0.02'), scale: counter })).toString()).toBe('0.02');
		expect(divisionOf(taken('12.3', 'g', { scale: counter })).toString()).toBe('0.01');
		expect(divisionOf(taken('12.3', 'dwt', { scale: counter })).toString()).toBe('0.1');
		expect(taken('12.3', 'g', { scale: counter }).scale).toBe('c1');
	});

	it('steps by the last digit of the number where the text is of no help', () => {
		expect(divisionOf({ ...taken('12.30'), typed: '' }).toString()).toBe('0.1');
		expect(divisionOf({ ...taken('12'), typed: 'twelve' }).toString()).toBe('1');
	});

	it('passes on the buyer\'s decimal mark', () => {
		expect(weighing('1.234', 'g', { mark: 'comma' })).toMatchObject({ ok: false, problem: { kind: 'number-ambiguous' } });
		expect(massOf(taken('1.234')).grams.toString()).toBe('1.234');
	});
});

describe('the mass of a weighing', () => {
	it('is the reading in grams, exactly', () => {
		expect(massOf(taken('8', 'dwt')).grams.toString()).toBe('12.44139072');
		expect(massOf(taken('12.345678', 'g', { division: decimal('0.01') })).grams.toString()).toBe('12.345678');
	});

	it('is the mean of repeats to a tenth of the division, ties to even', () => {
		expect(massOf(taken('10.00', 'g', { repeats: ['10.01', '10.01'] })).grams.toString()).toBe('10.007');
		expect(massOf(taken('1', 'g', { repeats: ['1.5', '1.25', '1.25'] })).grams.toString()).toBe('1.2');
		expect(massOf(taken('1', 'g', { repeats: ['1.5', '1.5', '1.4'] })).grams.toString()).toBe('1.4');
	});

	it('leaves the container out', () => {
		expect(massOf(taken('15.20', 'g', { tare: '3.05' })).grams.toString()).toBe('12.15');
		expect(massOf(taken('10', 'dwt', { tare: '2' })).grams.toString()).toBe('12.44139072');
	});

	it('does not depend on the order of the repeats (1 000 cases)', () => {
		const reading = fc.integer({ min: 1, max: 100_000 }).map((n) => new Decimal(n).div(100).toFixed(2));
		fc.assert(
			fc.property(fc.array(reading, { minLength: 2, maxLength: 8 }), (texts) => {
				const of = (list: readonly string[]) => taken(list[0]!, 'g', { division: decimal('0.01'), repeats: list.slice(1) });
				const [a, b] = [of(texts), of([...texts].reverse())];
				expect(massOf(a).grams.equals(massOf(b).grams)).toBe(true);
				const mean = texts.reduce((total, text) => total + Number(text), 0) / texts.length;
				expect(Math.abs(massOf(a).grams.toNumber() - mean)).toBeLessThanOrEqual(0.0005 + 1e-9);
				const [ua, ub] = [massUncertainty(a, 'k'), massUncertainty(b, 'k')].map(standardUncertainty) as [number, number];
				expect(Math.abs(ua - ub)).toBeLessThan(1e-9 * (1 + ua));
			}),
			{ numRuns: 1_000 }
		);
	});
});

describe('the doubt of a weighing', () => {
	it('is the division over the square root of twelve, or of six with a tare', () => {
		expect(standardUncertainty(massUncertainty(taken('12.30'), 'k'))).toBeCloseTo(0.01 / Math.sqrt(12), 15);
		expect(standardUncertainty(massUncertainty(taken('12.30', 'g', { tare: '1.00' }), 'k'))).toBeCloseTo(0.01 / Math.sqrt(6), 15);
		expect(standardUncertainty(massUncertainty(taken('8.00', 'dwt'), 'k'))).toBeCloseTo((0.01 * 1.55517384) / Math.sqrt(12), 15);
		expect(massUncertainty(taken('12.30'), 'k').value).toBe(12.3);
	});

	it('adds the scatter of the repeats', () => {
		const repeated = massUncertainty(taken('10.00', 'g', { repeats: ['10.02', '10.04'] }), 'k');
		expect(standardUncertainty(repeated)).toBeCloseTo(Math.sqrt(0.01 ** 2 / 12 + 0.02 ** 2 / 3), 12);
	});

	it('shares the error of a scale with a class among all it weighed', () => {
		const a = massUncertainty(taken('20.00', 'g', { scale: counter }), '1', counter);
		const b = massUncertainty(taken('30.00', 'g', { scale: counter }), '2', counter);
		const shared = 0.05 / Math.sqrt(3);
		expect(a.contributions['scale:c1']).toBeCloseTo(shared, 15);
		expect(Object.keys(a.contributions).sort()).toEqual(['reading:1', 'scale:c1']);
		expect(covariance(a, b)).toBeCloseTo(shared ** 2, 15);
		expect(standardUncertainty(plusUncertain(a, b))).toBeCloseTo(Math.sqrt((2 * shared) ** 2 + (2 * 0.01 ** 2) / 12), 12);
	});

	it('takes the error at the load on the pan, container included', () => {
		const heavy = massUncertainty(taken('501.00', 'g', { scale: counter, tare: '400.00' }), 'k', counter);
		expect(heavy.contributions['scale:c1']).toBeCloseTo(0.1 / Math.sqrt(3), 15);
	});

	it('says nothing of a scale without a class, and refuses another scale', () => {
		expect(Object.keys(massUncertainty(taken('5.00'), 'k', { ...counter, accuracyClass: null }).contributions)).toEqual(['reading:k']);
		expect(() => massUncertainty(taken('5.00', 'g', { scale: counter }), 'k', { ...counter, id: 'other' })).toThrow(/weighed on c1/);
	});
});

describe('warnings', () => {
	const kinds = (w: Weighing, scale: Scale | null = null) => warnings(w, scale).map((warning) => warning.kind);

	it('are silent for a good weighing', () => {
		expect(kinds(taken('12.30', 'g', { scale: counter }), counter)).toEqual([]);
		expect(kinds(taken('0.50'))).toEqual([]);
	});

	it('tell a load under the least of the scale, under fifty divisions, and digits that the display cannot show', () => {
		expect(kinds(taken('4.99', 'g', { scale: counter }), counter)).toEqual(['load-under-minimum']);
		expect(kinds(taken('5.00', 'g', { scale: counter }), counter)).toEqual([]);
		expect(kinds(taken('0.49'))).toEqual(['load-under-fifty-divisions']);
		expect(kinds(taken('12.345', 'g', { division: decimal('0.01') }))).toEqual(['reading-between-divisions']);
		expect(kinds(taken('12.34', 'g', { division: decimal('0.02') }))).toEqual([]);
		expect(kinds(taken('12.34', 'g', { division: decimal('0.02'), repeats: ['12.35'] }))).toEqual(['reading-between-divisions']);
	});

	it('look at the net load: a heavy container does not help', () => {
		const light = taken('100.40', 'g', { scale: counter, tare: '100.00' });
		expect(kinds(light, counter)).toEqual(['load-under-minimum', 'load-under-fifty-divisions']);
	});
});

describe('weigh twice', () => {
	it('lets one step of the display pass and stops at two', () => {
		expect(sameLoad(taken('12.34'), taken('12.35')).ok).toBe(true);
		expect(sameLoad(taken('12.34'), taken('12.36')).ok).toBe(false);
		expect(sameLoad(taken('12.36'), taken('12.34')).ok).toBe(false);
	});

	it('allows for the error of two scales, but not of one used twice', () => {
		const other: Scale = { ...counter, id: 'c2' };
		const first = taken('12.34', 'g', { scale: counter });
		const apart = taken('12.45', 'g', { scale: other });
		expect(sameLoad(first, apart, [counter, other]).ok).toBe(true);
		expect(sameLoad(first, { ...apart, scale: 'c1' }, [counter, other]).ok).toBe(false);
	});

	it('compares across units', () => {
		expect(sameLoad(taken('8.00', 'dwt'), taken('12.44')).ok).toBe(true);
		expect(sameLoad(taken('8.00', 'dwt'), taken('12.50')).ok).toBe(false);
	});

	it('is the same both ways, and allows three standard uncertainties (1 000 cases)', () => {
		const text = fc.integer({ min: 1_000, max: 1_010 }).map((n) => new Decimal(n).div(100).toFixed(2));
		fc.assert(
			fc.property(text, text, (a, b) => {
				const [there, back] = [sameLoad(taken(a), taken(b)), sameLoad(taken(b), taken(a))];
				expect(there.ok).toBe(back.ok);
				const steps = Math.round(Math.abs(Number(a) - Number(b)) * 100);
				expect(there.ok).toBe(steps <= 3 / Math.sqrt(6));
			}),
			{ numRuns: 1_000 }
		);
	});
});
