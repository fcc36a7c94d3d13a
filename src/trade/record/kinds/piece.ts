import type { Mass } from '../../mass/mass.ts';
import { origins } from '../../evidence/origin.ts';
import { deductionKinds, type Deduction } from '../../piece/deduction.ts';
import { lossClasses } from '../../piece/loss-class.ts';
import { checkPiece, type Content, type Piece } from '../../piece/piece.ts';
import { stoneCuts, type StoneSize } from '../../piece/stones.ts';
import {
	decimalText, flag, list, name, notNegative, number, object, oneOf, refined, text, whole, type Reader, type Shape
} from '../shape.ts';
import { evidence } from './evidence.ts';
import { fineness, metal, weighing } from './shared.ts';

/** One entry of a lot. `order` is its place in the list; a piece put between two others gets a number between theirs. */
export type PieceBody = { readonly lot: string; readonly order: number; readonly piece: Piece };

const mass = object<Mass>({ grams: decimalText });

const stones = object<StoneSize>({
	cut: oneOf(stoneCuts),
	count: whole,
	length: decimalText,
	width: decimalText,
	depth: decimalText,
	gravity: decimalText
});

/** What every version of a piece holds. */
const fields = {
	article: text,
	count: whole,
	weighing,
	mark: text,
	origin: oneOf(origins),
	contents: list(object<Content>({ metal, taken: fineness })),
	deductions: list(object<Deduction>({ what: oneOf(deductionKinds), mass, u: notNegative, how: text, stones }, ['stones'])),
	lossClass: oneOf(lossClasses),
	moreThanMelt: flag,
	note: text,
	photos: list(name)
};

/** A piece whose masses and contents are possible: what the sums of a lot may be given. */
const possible = <P extends Piece>(shape: Shape<P>) =>
	refined(shape, (value) => {
		const checked = checkPiece(value);
		return checked.ok ? null : `a possible piece (${checked.problem.kind})`;
	});

export const pieceShape = object<PieceBody>({
	lot: name,
	order: number,
	piece: possible(object<Piece>({ ...fields, evidence }, ['evidence']))
});

/** Version 1 knew no evidence. */
type UntestedPiece = Omit<Piece, 'evidence'>;

export const pieceShape1: Reader<PieceBody> = object<Omit<PieceBody, 'piece'> & { readonly piece: UntestedPiece }>({
	lot: name,
	order: number,
	piece: possible(object<UntestedPiece>(fields))
});
