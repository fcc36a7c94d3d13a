import { describe, expect, it } from 'vitest';
import { mass } from '../../src/trade/mass/mass.ts';
import { inUnit, massUnits, toMass } from '../../src/trade/mass/units.ts';
import { barFineOunces, goldBarGross, silverBarGross } from '../../src/trade/metal/bar.ts';
import { fineMass } from '../../src/trade/metal/fine-mass.ts';
import { fromPerMille } from '../../src/trade/metal/fineness.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { divide, exact } from '../../src/trade/number/exact.ts';
import { round } from '../../src/trade/number/rounding.ts';

describe('large bars', () => {
	// source: LBMA Good Delivery Rules, Annex C (weight lists): gross 401.125 ozt, assay 995.8, fine 399.440 ozt
	it('401.125 ozt at 995.8 is 399.440 ozt fine', () => {
		expect(barFineOunces(decimal('401.125'), fromPerMille(decimal('995.8'))).toFixed(3)).toBe('399.440');
		// second route: whole numbers, millionths of an ounce
		expect(Math.round((401125 * 9958) / 1e4)).toBe(399440);
	});

	// source: LBMA Good Delivery Rules, Annex B (weighing): multiples of 0.025 ozt rounded down, and the bar at least 0.002 ozt over;
	// the readings are ours
	it.each([
		['401.127', '401.125'], ['401.126', '401.1'], ['401.125', '401.1'], ['401.149', '401.125'], ['401.151', '401.125'], ['401.152', '401.15']
	])('a gold bar of %s ozt is booked at %s ozt', (weighed, booked) => expect(goldBarGross(decimal(weighed)).toString()).toBe(booked));

	// source: LBMA Good Delivery Rules, specification for silver bars: multiples of 0.10 ozt rounded down; 1164.9 in Annex C
	it('a silver bar is booked at a tenth of an ounce, down', () => {
		expect(silverBarGross(decimal('1164.97')).toString()).toBe('1164.9');
		expect(silverBarGross(decimal('1164.9')).toString()).toBe('1164.9');
	});

	// source: LBMA Good Delivery Rules, Annex C: 1 troy ounce = 0.0311034768 kg
	it('a bar weighed in kilograms is turned into ounces with the factor of the rules', () => {
		expect(massUnits.ozt.grams.div(1000).toString()).toBe('0.0311034768');
		const bar = toMass(decimal('401.125'), 'ozt');
		expect(round(divide(exact(bar.grams), exact(decimal('31.1034768'))), decimal('0.001'), 'half-even').toFixed(3)).toBe('401.125');
	});
});

describe('standard small bars', () => {
	const fine = (grams: string, perMille: string) => {
		const grammes = fineMass(mass(grams), 'Au', fromPerMille(decimal(perMille))).grams;
		return round(divide(grammes, exact(massUnits.ozt.grams)), decimal('0.001'), 'half-up').toFixed(3);
	};

	// source: agreed table of fine gold in standard small bars, seen in a copy (rows of 50 g and less follow no single rule and are left out)
	it.each([
		['1000', '995', '31.990'], ['1000', '999', '32.119'], ['1000', '999.9', '32.148'],
		['500', '995', '15.995'], ['500', '999', '16.059'], ['500', '999.9', '16.074'],
		['100', '995', '3.199'], ['100', '999', '3.212'], ['100', '999.9', '3.215']
	])('%s g at %s holds %s ozt fine', (grams, perMille, ounces) => {
		expect(fine(grams, perMille)).toBe(ounces);
		// second route: floating point, far from a tie
		expect(((Number(grams) * Number(perMille)) / 1000 / 31.1034768).toFixed(3)).toBe(ounces);
	});

	// source: same table, bar of 10 tola of 3/8 ozt
	it.each([['995', '3.731'], ['999', '3.746'], ['999.9', '3.750']])('10 tola at %s holds %s ozt fine', (perMille, ounces) => {
		const bar = toMass(decimal('10'), 'tola');
		expect(round(inUnit(bar, 'ozt'), decimal('0.001'), 'half-even').toFixed(3)).toBe('3.750');
		expect(fine(bar.grams.toString(), perMille)).toBe(ounces);
	});
});
