import type { Scale } from '../../mass/scale.ts';
import { name, nullable, object, oneOf, positiveText, text } from '../shape.ts';
import { massUnit } from './shared.ts';

/** A scale of the shop. The record's subject is the scale's id. */
export const scaleShape = object<Scale>({
	id: name,
	name: text,
	unit: massUnit,
	division: positiveText,
	verification: positiveText,
	accuracyClass: nullable(oneOf(['I', 'II', 'III', 'IIII'])),
	checkedOn: nullable(text)
});
