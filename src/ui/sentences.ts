import type { NumberProblem } from '$trade/number/field.ts';
import { numberSentence } from './sentences/number.ts';

/** Everything that a person can cause. */
export type Problem = NumberProblem;

/**
 * The one catalogue: what was found, where, and what to do. Every kind is listed, so a new problem without a
 * sentence does not compile.
 */
export function sentence(problem: Problem): string {
	switch (problem.kind) {
		case 'number-missing':
		case 'number-unreadable':
		case 'number-ambiguous':
		case 'number-negative':
		case 'number-not-positive':
		case 'number-not-whole':
		case 'number-too-large':
		case 'number-too-many-digits':
			return numberSentence(problem);
	}
}
