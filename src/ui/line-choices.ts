import type { LineProblem } from '$trade/lot/line.ts';
import { massUnits } from '$trade/mass/units.ts';
import type { DecimalMark } from '$trade/number/field.ts';
import { numberChoices } from './number-choices.ts';

/** One way to settle what a typed line leaves open: what the button says, and the line it makes. */
export type LineChoice = { readonly label: string; readonly line: string };

/** The answers to a question that a typed line raises, each a line that can only be read one way; none where there is no question. */
export function lineChoices(line: string, problem: LineProblem, mark: DecimalMark): readonly LineChoice[] {
	const put = (start: number, end: number, text: string): string => line.slice(0, start) + text + line.slice(end);
	switch (problem.kind) {
		case 'line-number':
			return numberChoices(problem.problem, mark).map(({ label, text }) => ({ label, line: put(problem.start, problem.end, text) }));
		case 'line-unit':
			if (problem.problem.kind !== 'unit-ambiguous') return [];
			return problem.problem.choices.map((id) => ({
				label: massUnits[id].name,
				line: put(problem.start, problem.end, massUnits[id].symbol)
			}));
		case 'line-mark':
			if (!('choices' in problem.problem)) return [];
			return problem.problem.choices.slice(0, 6).map((choice) => ({ label: choice, line: put(problem.start, problem.end, choice) }));
		case 'line-coin':
			if (problem.problem.kind !== 'coin-ambiguous') return [];
			return problem.problem.choices.slice(0, 8).map((choice) => ({ label: choice, line: put(problem.start, problem.end, choice) }));
		case 'line-grouping-unclear':
			return [{ label: `it is ${problem.together}`, line: put(problem.start, problem.end, problem.together) }];
		default:
			return [];
	}
}
