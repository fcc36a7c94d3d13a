import { errorBands, minimumLoad, type Scale } from '$trade/mass/scale.ts';
import type { Mass } from '$trade/mass/mass.ts';
import { inUnit } from '$trade/mass/units.ts';
import type { Format } from '../format.ts';

/** What a scale is, in a line: "steps by 0.01 g, class II, e 0.1 g, checked 3 May 2026". */
export function scaleLine(scale: Scale, format: Format): string {
	const { unit, division, verification, accuracyClass, checkedOn } = scale;
	const verified = accuracyClass === null ? 'not verified' : `class ${accuracyClass}, e ${format.mass(verification, unit)}`;
	return `steps by ${format.mass(division, unit)}, ${verified}, ${checkedOn === null ? 'never checked' : `checked ${dayWords(checkedOn, format)}`}`;
}

/** The least load in words. */
export function minimumWords(scale: Scale, format: Format): string {
	return `Weigh nothing under ${inScaleUnit(minimumLoad(scale), scale, format)} on it.`;
}

/** The permitted errors as rows: up to which load, how far off when verified, how far off at work. */
export function errorRows(scale: Scale, format: Format) {
	const bands = errorBands(scale);
	return bands.map(({ upTo, error }, index) => {
		const before = bands[index - 1]?.upTo ?? null;
		const load = upTo === null ? `above ${before === null ? '0' : inScaleUnit(before, scale, format)}` : `up to ${inScaleUnit(upTo, scale, format)}`;
		return {
			load,
			verified: inScaleUnit(error, scale, format),
			inService: inScaleUnit({ grams: error.grams.times(2) }, scale, format)
		};
	});
}

function inScaleUnit(mass: Mass, { unit }: Scale, format: Format): string {
	return format.mass(inUnit(mass, unit), unit);
}

/** The day of a check as it was typed in a date field. */
export function dayWords(day: string, format: Format): string {
	const at = new Date(`${day}T12:00`).getTime();
	return Number.isNaN(at) ? day : format.date(at);
}
