import type { OddsProblem } from '$trade/evidence/odds.ts';
import type { PrudenceProblem } from '$trade/evidence/prudence.ts';
import type { TesterProblem } from '$trade/evidence/tester.ts';
import { metals } from '$trade/metal/metals.ts';
import { hypothesisWords } from '../evidence-words.ts';
import type { Format } from '../format.ts';

/** What is wrong with a described tester, or with how the buyer weighs what it shows. */
export type OfTester = TesterProblem | OddsProblem | PrudenceProblem;

export function testerSentence(problem: OfTester, format: Format): string {
	const figure = (value: number): string => format.estimate(value, 6);
	const percent = (share: number): string => `${format.estimate(share * 100, 6)}\u00a0%`;
	switch (problem.kind) {
		case 'tester-no-name':
			return 'Give it a name, so that you know it among others: pocket reader, acids of the fair.';
		case 'tester-no-rows':
			return 'Say of at least one alloy how well it is read.';
		case 'tester-u-not-possible': {
			const alloy = `${metals[problem.metal].name} of ${figure(problem.perMille)}\u00a0‰ read to ±${figure(problem.u)}\u00a0‰`;
			return `Nothing tells ${alloy}. A fineness goes from 0 to 1000 ‰, what a reading is good to from just above 0 to ${figure(problem.most)}\u00a0‰.`;
		}
		case 'tester-bias-over-u':
			return (
				`An error of its own of ${figure(problem.bias)}\u00a0‰ cannot be: it is a part of what each reading is good to, ` +
				`and the best of them is good to ±${figure(problem.least)}\u00a0‰.`
			);
		case 'tester-gross-too-often':
			return `A test that is of something else ${percent(problem.gross)} of the time tells nothing. Type from 0 to ${percent(problem.most)}.`;
		case 'odds-outside':
			return `${percent(problem.chance)} for “${hypothesisWords[problem.hypothesis]}”: a chance lies from 0 to 100\u00a0%.`;
		case 'odds-not-whole':
			return `These add up to ${percent(problem.sum)}. A piece is one of them and nothing else, so they must add up to 100\u00a0%.`;
		case 'prudence-outside':
			return (
				`${percent(problem.prudence)} cannot be reckoned with. Type from ${percent(problem.least)}, an even chance, to ${percent(problem.most)}: ` +
				'nobody is quite sure.'
			);
	}
}
