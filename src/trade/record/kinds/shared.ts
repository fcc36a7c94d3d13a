import { isMetalId, metals, type MetalId } from '../../metal/metals.ts';
import type { Fineness } from '../../metal/fineness.ts';
import { massUnits, type MassUnitId } from '../../mass/units.ts';
import type { Weighing } from '../../mass/weighing.ts';
import { ONE } from '../../number/decimal.ts';
import { compareExact, exact } from '../../number/exact.ts';
import { isCurrencyCode, minorUnit, type CurrencyCode } from '../../price/currency.ts';
import type { Money } from '../../price/money.ts';
import { checked, decimalText, exactText, list, nullable, object, oneOf, positiveText, refined, text, type Shape } from '../shape.ts';

/** Shapes that several kinds of record share. */
export const metal: Shape<MetalId> = checked('a metal', (found): found is MetalId => isMetalId(found) && Object.hasOwn(metals, found));

export const massUnit: Shape<MassUnitId> = oneOf(Object.keys(massUnits) as MassUnitId[]);

export const currency: Shape<CurrencyCode> = checked('a currency', (found): found is CurrencyCode => isCurrencyCode(found));

const MOST_PER_MILLE = exact(ONE.times(1000));
export const fineness = refined(object<Fineness>({ perMille: exactText }), ({ perMille }) =>
	perMille.n >= 0n && compareExact(perMille, MOST_PER_MILLE) <= 0 ? null : 'a fineness from 0 to 1000'
);

/** Not less than nothing, and a whole number of the currency's smallest unit. */
export const money: Shape<Money> = refined(object<Money>({ amount: decimalText, currency }), ({ amount, currency: of }) =>
	amount.gte(0) && amount.div(minorUnit(of)).isInteger() ? null : 'an amount that can be paid'
);

export const weighing: Shape<Weighing> = object<Weighing>({
	typed: text,
	reading: decimalText,
	unit: massUnit,
	division: nullable(positiveText),
	scale: nullable(text),
	repeats: list(decimalText),
	tare: nullable(decimalText)
});
