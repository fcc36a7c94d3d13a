import type { DecimalMark, NumberProblem } from '$trade/number/field.ts';

export type NumberChoice = { readonly label: string; readonly text: string };

/**
 * The two readings of a number that could be either, as texts that can only be read one way. Where decimals are
 * written with a comma a leading nought makes "01,234" unmistakable and keeps the digits typed.
 */
export function numberChoices(problem: NumberProblem, mark: DecimalMark): readonly NumberChoice[] {
	if (problem.kind !== 'number-ambiguous') return [];
	const group = mark === 'comma' ? '.' : ',';
	const decimals = mark === 'comma' ? problem.asDecimal.replace('.', ',') : problem.asDecimal;
	const thousands = problem.asThousands.replace(/\B(?=(\d{3})+$)/g, group);
	return [
		{ label: `it is ${decimals}`, text: mark === 'comma' ? `0${decimals}` : decimals },
		{ label: `it is ${thousands}, in thousands`, text: problem.asThousands }
	];
}
