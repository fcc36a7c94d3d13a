import { exact, compareExact, times, type Exact } from '$trade/number/exact.ts';
import { decimal } from '$trade/number/decimal.ts';
import { round } from '$trade/number/rounding.ts';
import type { Fineness } from '$trade/metal/fineness.ts';

const FINEST = decimal('0.000001');
const KARATS_PER_PER_MILLE: Exact = { n: 24n, d: 1000n };

/** A fineness as text that reads back as the same: parts per thousand, or karats where only those come out even. */
export function finenessText({ perMille }: Fineness): string {
	const asKarats = terminating(times(perMille, KARATS_PER_PER_MILLE));
	return terminating(perMille) ?? (asKarats === null ? round(perMille, decimal('0.01'), 'half-even').toFixed() : `${asKarats} kt`);
}

function terminating(value: Exact): string | null {
	const rounded = round(value, FINEST, 'half-even');
	return compareExact(exact(rounded), value) === 0 ? rounded.toFixed() : null;
}
