import type { Scale } from '../../mass/scale.ts';
import { decimalText, name, nullable, object, oneOf, text } from '../shape.ts';
import { massUnit } from './shared.ts';

/** A scale of the shop. The record's subject is the scale's id. */
export const scaleShape = object<Scale>({
	id: name,
	name: text,
	unit: massUnit,
	division: decimalText,
	verification: decimalText,
	accuracyClass: nullable(oneOf(['I', 'II', 'III', 'IIII'])),
	checkedOn: nullable(text)
});
