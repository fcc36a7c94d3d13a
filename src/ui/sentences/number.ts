import type { NumberProblem } from '$trade/number/field.ts';

/** What is wrong with a typed number, and what to do about it. */
export function numberSentence(problem: NumberProblem): string {
	switch (problem.kind) {
		case 'number-missing':
			return 'A number is needed here.';
		case 'number-unreadable':
			return `“${problem.text}” is not a number we can read. Write it like 12.30 or 12,30.`;
		case 'number-ambiguous': {
			// neither mark is used here, because the mark is what is in question
			const whole = problem.asDecimal.split('.')[0] ?? '0';
			return `“${problem.text}” can be read two ways: a little over ${whole}, or ${problem.asThousands}. Which is it?`;
		}
		case 'number-negative':
			return `“${problem.text}” is below zero; this must be zero or more.`;
		case 'number-not-positive':
			return `“${problem.text}” is zero; this must be more than zero.`;
		case 'number-not-whole':
			return `“${problem.text}” is not a whole number.`;
		case 'number-too-large':
			return `“${problem.text}” is more than ${problem.most}, the most that fits here.`;
		case 'number-too-many-digits':
			return `“${problem.text}” has more than ${problem.most} digits.`;
	}
}
