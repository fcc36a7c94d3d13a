import type { Format } from '$ui/format.ts';
import type { Problem } from '$ui/sentences.ts';

/** The sentence of a problem; the catalogue is loaded when the first one is to be said, so that it does not hold up the start. */
export async function sayProblem(problem: Problem, format: Format): Promise<string> {
	const { sentence } = await import('$ui/sentences.ts');
	return sentence(problem, format);
}
