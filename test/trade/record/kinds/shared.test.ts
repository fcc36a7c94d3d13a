import { describe, expect, it } from 'vitest';
import { massUnits } from '../../../../src/trade/mass/units.ts';
import { metalIds } from '../../../../src/trade/metal/metals.ts';
import { currency, massUnit, metal, money } from '../../../../src/trade/record/kinds/shared.ts';
import { readAs } from '../../../../src/trade/record/shape.ts';

describe('shapes that kinds share', () => {
	it('take every metal and every unit there is', () => {
		for (const id of metalIds) expect(readAs(metal, id)).toEqual({ ok: true, value: id });
		for (const id of Object.keys(massUnits)) expect(readAs(massUnit, id)).toEqual({ ok: true, value: id });
	});
	it.each(['au', 'Gold', '__proto__', 'constructor', ''])('%j is no metal', (text) => {
		expect(readAs(metal, text).ok).toBe(false);
	});
	it.each(['oz', 'grams', 'toString'])('%j is no unit', (text) => {
		expect(readAs(massUnit, text).ok).toBe(false);
	});
	it('take money in whole minor units of a known currency', () => {
		expect(readAs(money, { amount: '12.30', currency: 'EUR' }).ok).toBe(true);
		expect(readAs(money, { amount: '12.3', currency: 'JPY' }).ok).toBe(false);
		expect(readAs(currency, 'XXX').ok).toBe(false);
	});
});
