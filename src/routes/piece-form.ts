import type { MetalId } from '$trade/metal/metals.ts';
import { parseFineness, type FinenessProblem } from '$trade/metal/fineness.ts';
import { parseMark, type MarkProblem } from '$trade/metal/mark.ts';
import type { MassUnitId } from '$trade/mass/units.ts';
import { weighing, type WeighingProblem } from '$trade/mass/weighing.ts';
import type { Scale } from '$trade/mass/scale.ts';
import { exactFromText, exactToText, reduce } from '$trade/number/exact.ts';
import type { DecimalMark } from '$trade/number/field.ts';
import type { Origin } from '$trade/evidence/origin.ts';
import type { Deduction } from '$trade/piece/deduction.ts';
import type { LossClassId } from '$trade/piece/loss-class.ts';
import { checkPiece, type Content, type Piece, type PieceProblem } from '$trade/piece/piece.ts';
import { finenessText } from '$ui/format/fineness-text.ts';

/** One metal of the form: the fineness as text, and its exact value while the text has not been touched. */
export type ContentField = { readonly metal: MetalId; readonly text: string; readonly kept: string | null };

/** A piece while it is being changed: texts as typed. Deductions are whole; they are added and taken off, not edited. */
export type PieceForm = {
	readonly typed: string;
	readonly unit: MassUnitId;
	readonly article: string;
	readonly mark: string;
	readonly origin: Origin;
	readonly count: number;
	readonly contents: readonly ContentField[];
	readonly deductions: readonly Deduction[];
	readonly lossClass: LossClassId;
	readonly moreThanMelt: boolean;
	readonly note: string;
};

export type FormProblem = {
	readonly field: 'mass' | 'mark' | 'contents' | 'piece';
	/** Which metal of the contents. */
	readonly index: number;
	readonly problem: WeighingProblem | MarkProblem | FinenessProblem | PieceProblem;
};

export function formOf(piece: Piece): PieceForm {
	const { weighing: held, article, mark, origin, count, contents, deductions, lossClass, moreThanMelt, note } = piece;
	return {
		typed: held.typed,
		unit: held.unit,
		article,
		mark,
		origin,
		count,
		contents: contents.map(fieldOf),
		deductions,
		lossClass,
		moreThanMelt,
		note
	};
}

function fieldOf({ metal, taken }: Content): ContentField {
	return { metal, text: finenessText(taken), kept: exactToText(taken.perMille) };
}

/** The metals that a mark promises, as fields; null when the mark is not understood or promises none. */
export function contentsOfMark(mark: string): readonly ContentField[] | null {
	const read = parseMark(mark);
	if (!read.ok || read.value.contents.length === 0) return null;
	return read.value.contents.map(({ metal, fineness }) => fieldOf({ metal, taken: { perMille: reduce(fineness.perMille) } }));
}

export type FormOptions = { readonly mark: DecimalMark; readonly scale: Scale | null };

/** The piece that a form makes out of the one it was opened with, or everything that is wrong with it. */
export function pieceOf(
	form: PieceForm,
	before: Piece,
	options: FormOptions
): { readonly piece: Piece; readonly problems: readonly [] } | { readonly piece: null; readonly problems: readonly FormProblem[] } {
	const problems: FormProblem[] = [];
	const untouched = form.typed === before.weighing.typed && form.unit === before.weighing.unit;
	const weighed = untouched ? { ok: true as const, value: before.weighing } : weighing(form.typed, form.unit, options);
	if (!weighed.ok) problems.push({ field: 'mass', index: 0, problem: weighed.problem });
	let mark = form.mark.trim();
	if (mark !== '' && mark !== before.mark) {
		const read = parseMark(mark);
		if (read.ok) mark = read.value.text;
		else problems.push({ field: 'mark', index: 0, problem: read.problem });
	}
	const contents: Content[] = [];
	form.contents.forEach(({ metal, text, kept }, index) => {
		const held = kept === null ? null : exactFromText(kept);
		const read = held !== null ? { ok: true as const, value: { perMille: held } } : parseFineness(text);
		if (read.ok) contents.push({ metal, taken: { perMille: reduce(read.value.perMille) } });
		else problems.push({ field: 'contents', index, problem: read.problem });
	});
	if (problems.length > 0 || !weighed.ok) return { piece: null, problems };
	const { article, origin, count, deductions, lossClass, moreThanMelt, note } = form;
	const checked = checkPiece({
		...before,
		article: article.trim(),
		weighing: weighed.value,
		mark,
		origin,
		count,
		contents,
		deductions,
		lossClass,
		moreThanMelt,
		note: note.trim()
	});
	if (checked.ok) return { piece: checked.value, problems: [] };
	return { piece: null, problems: [{ field: 'piece', index: 0, problem: checked.problem }] };
}

