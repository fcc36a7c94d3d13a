import type { Mass } from '$trade/mass/mass.ts';
import type { ScaleProblem } from '$trade/mass/scale.ts';
import { massUnits, type UnitProblem } from '$trade/mass/units.ts';
import type { SameLoadProblem, WeighingProblem, WeighingWarning } from '$trade/mass/weighing.ts';
import type { NumberProblem } from '$trade/number/field.ts';
import type { Format } from '../format.ts';

/** What is wrong or doubtful with a typed unit or a weighing. */
export type MassProblem = UnitProblem | Exclude<WeighingProblem, NumberProblem> | SameLoadProblem | WeighingWarning | ScaleProblem;

export function massSentence(problem: MassProblem, format: Format): string {
	const grams = (load: Mass): string => format.mass(load.grams);
	switch (problem.kind) {
		case 'unit-missing':
			return 'Type the unit of the mass, such as g, dwt or ozt.';
		case 'unit-unknown':
			return `We do not know the unit “${problem.text}”. Write it like g, dwt, ozt, gr or ct.`;
		case 'unit-ambiguous': {
			const names = problem.choices.map((id) => `${massUnits[id].name} (${massUnits[id].symbol})`);
			return `“${problem.text}” is used for more than one unit. Which is it: ${names.slice(0, -1).join(', ')} or ${names.at(-1)}?`;
		}
		case 'mass-tare-not-less': {
			const [reading, tare] = [format.mass(problem.reading, problem.unit), format.mass(problem.tare, problem.unit)];
			return `The container (${tare}) weighs no less than the whole reading (${reading}). Were the two swapped?`;
		}
		case 'mass-changed':
			return (
				`First ${grams(problem.first)}, now ${grams(problem.second)}: more than two readings of one load can differ. ` +
				'Check that it is the same load, then weigh both again before paying.'
			);
		case 'load-under-minimum':
			return (
				`${grams(problem.load)} is less than “${problem.scale}” weighs well (${grams(problem.minimum)}). ` +
				'Use a finer scale or weigh pieces together.'
			);
		case 'load-under-fifty-divisions':
			return (
				`${grams(problem.load)} is under fifty steps of the display (${grams(problem.least)}). ` +
				'Use a finer scale or weigh pieces together.'
			);
		case 'reading-between-divisions': {
			const [reading, step] = [format.mass(problem.reading, problem.unit), format.mass(problem.division, problem.unit)];
			return `A scale that steps by ${step} cannot show ${reading}. Check the reading, or which scale was used.`;
		}
		case 'scale-name-missing':
			return 'Give the scale a name, so that you know it among others: counter scale, pocket scale.';
		case 'scale-verification-under-division': {
			const [e, d] = [format.mass(problem.verification, problem.unit), format.mass(problem.division, problem.unit)];
			return `A display that steps by ${d} cannot be verified to ${e}. On the plate of the scale, e is never smaller than d: were the two swapped?`;
		}
	}
}
