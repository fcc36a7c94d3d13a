import type { AlloyProblem } from '$trade/metal/alloy.ts';
import type { CoinProblem } from '$trade/metal/coins.ts';
import type { FinenessProblem } from '$trade/metal/fineness.ts';
import type { MarkProblem } from '$trade/metal/mark.ts';
import { metals } from '$trade/metal/metals.ts';
import type { NumberProblem } from '$trade/number/field.ts';

/** What is wrong with a typed mark, fineness, recipe or coin. */
export type MetalProblem = MarkProblem | Exclude<FinenessProblem, NumberProblem> | AlloyProblem | CoinProblem;

const either = (choices: readonly string[]): string => {
	const shown = choices.slice(0, 6);
	return shown.length < 2 ? shown.join('') : `${shown.slice(0, -1).join(', ')} or ${shown.at(-1)}`;
};

export function metalSentence(problem: MetalProblem): string {
	switch (problem.kind) {
		case 'mark-missing':
			return 'Type the mark on the piece, such as 14k, 585, 925 or Pt 950.';
		case 'mark-unknown':
			return `We do not know the mark “${problem.text}”. Write it like 14k, 585, sterling, Pt 950 or 1/20 14k GF.`;
		case 'mark-karat-unknown':
			return `${problem.karats} kt is not a mark that makers strike. Look again: is it ${either(problem.nearest)}?`;
		case 'mark-karat-over-24':
			return `${problem.karats} kt cannot be: 24 kt is pure gold. Look at the mark again.`;
		case 'mark-karat-not-gold':
			return `“${problem.text}” says karats and ${metals[problem.metal].name}, but karats are for gold. Write parts per thousand, such as Pt 950.`;
		case 'mark-over-whole':
			return `“${problem.text}” adds up to ${problem.perMille} parts in a thousand. A piece has only 1000.`;
		case 'mark-figures-unknown':
			return `${problem.figures} alone is no usual mark. Say what it is: ${problem.figures}k for karats, or the metal before parts per thousand, such as Au 585.`;
		case 'mark-metal-ambiguous':
			return `${problem.figures} is struck on more than one metal. Is it ${either(problem.choices)}?`;
		case 'mark-fineness-missing':
			return `“${problem.text}” does not say how fine the ${metals[problem.metal].name} is. Is it ${either(problem.choices)}, or something else?`;
		case 'mark-layer-share-missing':
			return `“${problem.text}” does not say how much of the piece is the layer. Look for a fraction, such as ${either(problem.choices)}.`;
		case 'mark-two-marks':
			return `“${problem.text}” holds marks that differ: ${problem.marks.join(' and ')}. Weigh each part by itself and enter it under its own mark.`;
		case 'fineness-unit-missing':
			return `“${problem.text}” could be ${either(problem.choices)}. Write the unit with it.`;
		case 'fineness-over-whole':
			return `“${problem.text}” is more than ${problem.most}, which would be pure metal.`;
		case 'alloy-empty':
			return `The recipe “${problem.name}” has no metal in it yet.`;
		case 'alloy-share-negative':
			return `The recipe “${problem.name}” has a share of ${metals[problem.metal].name} below zero (${problem.share}).`;
		case 'alloy-metal-twice':
			return `The recipe “${problem.name}” names ${metals[problem.metal].name} twice. Put both shares in one row.`;
		case 'alloy-not-whole':
			return `The shares of “${problem.name}” add up to ${problem.sum} instead of 1. Correct them; we do not scale them for you.`;
		case 'coin-unknown':
			return `We do not know a coin called “${problem.text}”. Enter it by its mass and fineness instead.`;
		case 'coin-ambiguous':
			return `“${problem.text}” could be ${either(problem.choices)}. Which is it?`;
	}
}
