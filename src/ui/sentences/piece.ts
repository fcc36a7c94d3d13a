import { metals } from '$trade/metal/metals.ts';
import type { PieceProblem } from '$trade/piece/piece.ts';
import type { StoneProblem } from '$trade/piece/stones.ts';
import type { Format } from '../format.ts';

/** What is wrong with a piece, its deductions or its stones. */
export type OfPiece = PieceProblem | StoneProblem;

export function pieceSentence(problem: OfPiece, format: Format): string {
	switch (problem.kind) {
		case 'piece-count-not-whole':
			return `${format.estimate(problem.count, 6)} pieces cannot be counted. The count is a whole number from 1.`;
		case 'piece-no-mass':
			return `A piece of ${format.mass(problem.gross)} has no metal to buy. Weigh it again.`;
		case 'piece-mass-too-many-digits':
			return (
				`${format.number(problem.value)} has more digits than a scale shows: ` +
				`at most ${problem.most}, and ${problem.mostPlaces} after the mark.`
			);
		case 'piece-division-not-positive':
			return `A scale cannot step by ${format.number(problem.division)}. Type the smallest step that its display shows.`;
		case 'piece-deduction-negative':
			return `${format.mass(problem.grams)} cannot be taken off for ${problem.what}. A deduction is zero or more.`;
		case 'piece-deductions-over-gross':
			return `The deductions (${format.mass(problem.deductions)}) take away the whole piece (${format.mass(problem.gross)}). Check both.`;
		case 'piece-metal-twice':
			return `${titled(metals[problem.metal].name)} is named twice. Put both parts into one figure.`;
		case 'piece-content-negative':
			return `The piece cannot hold less than no ${metals[problem.metal].name}.`;
		case 'piece-contents-over-1000':
			return `The metals add up to ${format.number(problem.perMille, { least: 0, most: 2 })} parts in a thousand. A piece has only 1000.`;
		case 'stone-count-not-whole':
			return `${format.estimate(problem.count, 6)} stones cannot be counted. The count is a whole number from 1.`;
		case 'stone-size-not-positive':
			return (
				`A stone of ${format.number(problem.length)} × ${format.number(problem.width)} × ${format.number(problem.depth)} mm has no size. ` +
				'Measure all three in millimetres.'
			);
		case 'stone-size-too-large':
			return `${format.number(problem.largest)} mm is too large for a stone in a piece (${format.number(problem.most)} mm at most). Is it in millimetres?`;
		case 'stone-gravity-unlikely':
			return (
				`No stone has a specific gravity of ${format.number(problem.gravity)}. ` +
				`It lies between ${format.number(problem.least)} and ${format.number(problem.most)}.`
			);
		case 'stone-density-like-metal':
			return (
				`The stones (${format.estimate(problem.stone)} g/cm³) are nearly as dense as the metal (${format.estimate(problem.metal)} g/cm³), ` +
				'so water cannot tell them apart. Measure the stones instead.'
			);
		case 'stone-water-impossible':
			return (
				`These two weighings give ${format.estimate(problem.grams)} g of stones in a piece of ${format.estimate(problem.gross)} g. ` +
				'Weigh again without air bubbles, or check the metal and the stone.'
			);
	}
}

function titled(word: string): string {
	return word.charAt(0).toUpperCase() + word.slice(1);
}
