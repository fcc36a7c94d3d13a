import { assert, Decimal } from './decimal.ts';
import { exact, minus, plus, EXACT_ZERO, compareExact, type Exact } from './exact.ts';
import { round } from './rounding.ts';

/**
 * Printed parts that add up to the printed total.
 * formula: each part rounded down to a step; the steps still missing go, one each, to the parts with the largest
 * remainders (ties to the earlier part). The total must be the exact sum of the parts rounded to the same step.
 * rounding: every part to `step`; the largest remainder method.
 * source: largest remainder (Hamilton) apportionment; common practice, no source.
 */
export function allocate(parts: readonly Exact[], total: Decimal, step: Decimal): Decimal[] {
	const printed = parts.map((part) => round(part, step, 'floor'));
	let given = EXACT_ZERO;
	for (const part of printed) given = plus(given, exact(part));
	const missing = minus(exact(total), given);
	const steps = round(missing, step, 'half-even').div(step).toNumber();
	assert(
		Number.isInteger(steps) && steps >= 0 && steps <= parts.length,
		`parts do not belong to the total ${total.toString()}: ${steps} steps missing of ${parts.length}`
	);
	const order = parts
		.map((part, index) => ({ index, rest: minus(part, exact(printed[index]!)) }))
		.sort((a, b) => compareExact(b.rest, a.rest) || a.index - b.index);
	for (const { index } of order.slice(0, steps)) printed[index] = printed[index]!.plus(step);
	return printed;
}
