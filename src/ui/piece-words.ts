import { perMilleNumber } from '$trade/metal/fineness.ts';
import { metals } from '$trade/metal/metals.ts';
import { fineOf, type Piece } from '$trade/piece/piece.ts';
import { totalDeduction } from '$trade/piece/deduction.ts';
import type { Format } from './format.ts';

/** What a piece is called: its stamp and article, and how many ("14 kt chain × 3"). */
export function pieceName({ mark, article, count }: Pick<Piece, 'mark' | 'article' | 'count'>): string {
	const name = [mark, article].filter((word) => word !== '').join(' ') || 'piece without a mark';
	return count > 1 ? `${name} × ${count}` : name;
}

/** How its fine metal was found: "5.20 g − 0.35 g stones · taken at 750 ‰". */
export function pieceHow(piece: Piece, format: Format): string {
	const deductions = totalDeduction(piece.deductions).grams;
	const kinds = [...new Set(piece.deductions.map(({ what }) => what))].join(', ');
	const mass = format.weighing(piece.weighing) + (deductions.isZero() ? '' : ` − ${format.mass(deductions, 'g', { least: 0, most: 3 })} ${kinds}`);
	return [mass, takenAt(piece, format), testedWords(piece, format), piece.moreThanMelt ? 'worth more than melt' : ''].filter((part) => part !== '').join(' · ');
}

/** From here on a piece is said to be in doubt wherever it is shown. */
const DOUBTFUL = 0.05;

/** "4 tests", and the odds of a layer where they are more than a few in a hundred; nothing where nothing was tested. */
export function testedWords({ evidence }: Pick<Piece, 'evidence'>, format: Format): string {
	const count = evidence?.findings.length ?? 0;
	if (count === 0) return '';
	const layered = evidence?.belief?.odds.layered ?? 0;
	const doubt = layered > DOUBTFUL ? `, ${format.chance(layered)} to be filled` : '';
	return `${format.count(count)} ${count === 1 ? 'test' : 'tests'}${doubt}`;
}

/** "taken at 585 ‰" for one metal, "Au 625 Pd 180 Ag 120 ‰" for several, "no metal counted" for none. */
export function takenAt({ contents }: Pick<Piece, 'contents'>, format: Format): string {
	if (contents.length === 0) return 'no metal counted';
	const [only] = contents;
	if (contents.length === 1 && only !== undefined) return `taken at ${format.fineness(only.taken)}`;
	const parts = [...contents]
		.sort((a, b) => perMilleNumber(b.taken) - perMilleNumber(a.taken))
		.map(({ metal, taken }) => `${metal} ${format.number(taken.perMille, { least: 0, most: 1 })}`);
	return `${parts.join(' ')}\u00a0‰`;
}

/** Its fine metal: "7.23 g Au · 0.74 g Pd"; precious metals first, base metals only where there is no other. */
export function pieceFine(piece: Piece, format: Format): string {
	const fine = fineOf(piece);
	const precious = fine.filter(({ metal }) => metals[metal].precious);
	return (precious.length > 0 ? precious : fine).map(({ metal, grams }) => format.fine(metal, grams)).join(' · ');
}
