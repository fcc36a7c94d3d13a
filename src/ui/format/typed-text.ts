import type { Decimal } from '$trade/number/decimal.ts';
import type { DecimalMark } from '$trade/number/field.ts';

/**
 * A figure as the buyer would type it: his own mark, no groups, every digit, at least so many places. What he would be asked
 * about ("52,315" could be thousands) starts with a nought, as after his own choice between the two readings.
 */
export function typedNumber(value: Decimal, mark: DecimalMark, least = 0): string {
	const text = value.toFixed(Math.max(least, value.decimalPlaces()));
	if (mark === 'dot') return text;
	return /^[1-9]\d{0,2}\.\d{3}$/.test(text) ? `0${text.replace('.', ',')}` : text.replace('.', ',');
}

/** A share as a percentage to be typed over: 0.85 is "85". */
export function typedPercent(share: Decimal, mark: DecimalMark): string {
	return typedNumber(share.times(100), mark);
}

/** An estimated share as a percentage to be typed over, to four places: 0.16 is "16". */
export function typedEstimate(share: number, mark: DecimalMark): string {
	return typedFigure(share * 100, mark);
}

/** An estimate in its own unit to be typed over, to four places. */
export function typedFigure(value: number, mark: DecimalMark): string {
	const text = String(Number(value.toFixed(4)));
	if (mark === 'dot') return text;
	return /^[1-9]\d{0,2}\.\d{3}$/.test(text) ? `0${text.replace('.', ',')}` : text.replace('.', ',');
}
