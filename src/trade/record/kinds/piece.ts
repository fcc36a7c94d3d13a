import type { Mass } from '../../mass/mass.ts';
import { exact, compareExact } from '../../number/exact.ts';
import { ONE } from '../../number/decimal.ts';
import type { Fineness } from '../../metal/fineness.ts';
import { origins } from '../../evidence/origin.ts';
import { deductionKinds, type Deduction } from '../../piece/deduction.ts';
import { lossClasses } from '../../piece/loss-class.ts';
import { checkPiece, type Content, type Piece } from '../../piece/piece.ts';
import { stoneCuts, type StoneSize } from '../../piece/stones.ts';
import { decimalText, exactText, flag, list, name, notNegative, number, object, oneOf, refined, text, whole } from '../shape.ts';
import { metal, weighing } from './shared.ts';

/** One entry of a lot. `order` is its place in the list; a piece put between two others gets a number between theirs. */
export type PieceBody = { readonly lot: string; readonly order: number; readonly piece: Piece };

const mass = object<Mass>({ grams: decimalText });

const MOST_PER_MILLE = exact(ONE.times(1000));
const fineness = refined(object<Fineness>({ perMille: exactText }), ({ perMille }) =>
	perMille.n >= 0n && compareExact(perMille, MOST_PER_MILLE) <= 0 ? null : 'a fineness from 0 to 1000'
);

const stones = object<StoneSize>({
	cut: oneOf(stoneCuts),
	count: whole,
	length: decimalText,
	width: decimalText,
	depth: decimalText,
	gravity: decimalText
});

/** A piece whose masses and contents are possible: what the sums of a lot may be given. */
const piece = refined(
	object<Piece>({
		article: text,
		count: whole,
		weighing,
		mark: text,
		origin: oneOf(origins),
		contents: list(object<Content>({ metal, taken: fineness })),
		deductions: list(
			object<Deduction>({ what: oneOf(deductionKinds), mass, u: notNegative, how: text, stones }, ['stones'])
		),
		lossClass: oneOf(lossClasses),
		moreThanMelt: flag,
		note: text,
		photos: list(name)
	}),
	(value) => {
		const checked = checkPiece(value);
		return checked.ok ? null : `a possible piece (${checked.problem.kind})`;
	}
);

export const pieceShape = object<PieceBody>({ lot: name, order: number, piece });
