import { describe, expect, it } from 'vitest';
import { parseUnit, type MassUnitId, type UnitProblem } from '../../src/trade/mass/units.ts';
import { checkScale, type Scale, type ScaleProblem } from '../../src/trade/mass/scale.ts';
import {
	sameLoad, warnings, weighing, type SameLoadProblem, type Weighing, type WeighingProblem, type WeighingWarning
} from '../../src/trade/mass/weighing.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import type { NumberProblem } from '../../src/trade/number/field.ts';
import type { Result } from '../../src/trade/number/result.ts';

type OfWeighing = Exclude<WeighingProblem['kind'], NumberProblem['kind']>;
type Kind = UnitProblem['kind'] | OfWeighing | SameLoadProblem['kind'] | WeighingWarning['kind'] | ScaleProblem['kind'];

function problemOf<P>(result: Result<unknown, P>): P {
	if (result.ok) throw new Error('no problem where one was wanted');
	return result.problem;
}

function taken(typed: string, unit: MassUnitId, options: Parameters<typeof weighing>[2] = {}): Weighing {
	const result = weighing(typed, unit, options);
	if (!result.ok) throw new Error(result.problem.kind);
	return result.value;
}

const counter: Scale = {
	id: 'c1', name: 'counter scale', unit: 'g', division: decimal('0.1'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null
};

/** Each kind from what a person would really type. A kind without a row does not compile. */
const reproductions: Record<Kind, () => { readonly kind: string }> = {
	'unit-missing': () => problemOf(parseUnit(' ')),
	'unit-unknown': () => problemOf(parseUnit('bushel')),
	'unit-ambiguous': () => problemOf(parseUnit('oz')),
	'mass-tare-not-less': () => problemOf(weighing('3.05', 'g', { tare: '15.20' })),
	'mass-changed': () => problemOf(sameLoad(taken('12.40', 'g'), taken('11.90', 'g'))),
	'load-under-minimum': () => warnings(taken('4.9', 'g', { scale: counter }), counter)[0]!,
	'load-under-fifty-divisions': () => warnings(taken('0.12', 'g'))[0]!,
	'reading-between-divisions': () => warnings(taken('12.34', 'g', { scale: counter }), counter)[0]!,
	'scale-name-missing': () => problemOf(checkScale({ ...counter, name: ' ' })),
	'scale-verification-under-division': () => problemOf(checkScale({ ...counter, verification: decimal('0.01') }))
};

describe('what can be wrong with a weighing', () => {
	it.each(Object.entries(reproductions))('%s happens', (kind, reproduce) => {
		expect(reproduce().kind).toBe(kind);
	});

	it('carries the numbers that a sentence needs', () => {
		expect(reproductions['unit-ambiguous']()).toEqual({ kind: 'unit-ambiguous', text: 'oz', choices: ['ozt', 'oz-av'] });
		expect(reproductions['mass-tare-not-less']()).toEqual({
			kind: 'mass-tare-not-less', reading: decimal('3.05'), tare: decimal('15.20'), unit: 'g'
		});
		const changed = reproductions['mass-changed']() as SameLoadProblem;
		expect(changed.difference.grams.toString()).toBe('-0.5');
		expect(changed.allowed).toBeCloseTo(0.03 / Math.sqrt(6), 12);
		const least = reproductions['load-under-minimum']() as Extract<WeighingWarning, { kind: 'load-under-minimum' }>;
		expect([least.load.grams.toString(), least.minimum.grams.toString(), least.scale]).toEqual(['4.9', '5', 'counter scale']);
	});

	it('passes on what is wrong with a number, in the reading, a repeat or the tare', () => {
		expect(problemOf(weighing('', 'g')).kind).toBe('number-missing');
		expect(problemOf(weighing('0', 'g')).kind).toBe('number-not-positive');
		expect(problemOf(weighing('-3', 'g')).kind).toBe('number-negative');
		expect(problemOf(weighing('1e9', 'g')).kind).toBe('number-unreadable');
		expect(problemOf(weighing('5.00', 'g', { repeats: ['5.00', '5,000'] })).kind).toBe('number-ambiguous');
		expect(problemOf(weighing('5.00', 'g', { tare: 'cup' })).kind).toBe('number-unreadable');
	});
});
