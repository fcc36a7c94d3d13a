import { describe, expect, it } from 'vitest';
import { emptySums } from '../../src/trade/lot/sums.ts';
import { parseLossRange, type LossProblem } from '../../src/trade/melt/losses.ts';
import { yieldFromSums } from '../../src/trade/melt/of-sums.ts';
import type { MeltProblem } from '../../src/trade/melt/yield.ts';
import type { Result } from '../../src/trade/number/result.ts';
import { formatFor } from '../../src/ui/format.ts';
import { moneySentence } from '../../src/ui/sentences/price.ts';

type Kind = LossProblem['kind'] | MeltProblem['kind'];

function problemOf<P extends { readonly kind: string }, K extends P['kind']>(result: Result<unknown, P>, kind: K): Extract<P, { kind: K }> {
	if (result.ok) throw new Error('no problem where one was wanted');
	if (result.problem.kind !== kind) throw new Error(result.problem.kind);
	return result.problem as Extract<P, { kind: K }>;
}

/** Each kind from what a person would really type, and a word that its sentence must hold. A kind without a row does not compile. */
const reproductions: Record<Kind, readonly [() => LossProblem | MeltProblem, string]> = {
	'loss-range-reversed': [() => problemOf(parseLossRange('nonMetal', '15', '2'), 'loss-range-reversed'), 'smaller figure first'],
	'loss-range-outside': [() => problemOf(parseLossRange('retention', '0.2', '0.5'), 'loss-range-outside'), 'fine metal kept'],
	'melt-empty': [() => problemOf(yieldFromSums(emptySums()), 'melt-empty'), 'Nothing is left']
};

describe('every problem with a melt can be produced, and says what was found', () => {
	it.each(Object.entries(reproductions))('%s', (kind, [make, word]) => {
		const problem = make();
		expect(problem.kind).toBe(kind);
		expect(moneySentence(problem, formatFor('en'))).toContain(word);
	});
});
