import { ZERO } from '../number/decimal.ts';
import { fail, ok, type Result } from '../number/result.ts';
import type { Mass } from '../mass/mass.ts';
import type { Scale } from '../mass/scale.ts';
import { massOf, massUncertainty, TIMES_ALLOWED, type SameLoadProblem, type Weighing } from '../mass/weighing.ts';
import { minusUncertain, standardUncertainty, sumUncertain } from '../uncertainty/uncertain.ts';

/**
 * Whether a whole lot on the scale at payment is the lot whose entries were weighed one by one.
 * formula: absolute (second weighing − sum of the entries' gross masses) <= 3 x standard uncertainty of that difference (grams); the
 * error of a scale that was used for both cancels as far as the loads agree.
 * rounding: none.
 * source: common practice, no source (weigh twice; three standard uncertainties); JCGM 100:2008 (GUM) 5.2.2 for the difference.
 */
export function weighAgain(
	entries: readonly Weighing[],
	second: Weighing,
	scales: readonly Scale[] = []
): Result<{ readonly difference: Mass; readonly allowed: number }, SameLoadProblem> {
	const scaleOf = (w: Weighing) => scales.find(({ id }) => id === w.scale) ?? null;
	const first = { grams: entries.reduce((total, w) => total.plus(massOf(w).grams), ZERO) };
	const doubt = sumUncertain(entries.map((w, index) => massUncertainty(w, `entry ${index}`, scaleOf(w))));
	const off = minusUncertain(doubt, massUncertainty(second, 'again', scaleOf(second)));
	const allowed = TIMES_ALLOWED * standardUncertainty(off);
	const difference = { grams: massOf(second).grams.minus(first.grams) };
	if (difference.grams.abs().toNumber() <= allowed) return ok({ difference, allowed });
	return fail({ kind: 'mass-changed', first, second: massOf(second), difference, allowed });
}
