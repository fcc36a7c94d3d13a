import { checkTester, type Tester, type TesterKind, type TesterProblem, type TesterRow } from '$trade/evidence/tester.ts';
import { testerDefaults } from '$trade/evidence/tester-figures.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '$trade/number/field.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import { typedEstimate, typedFigure } from '$ui/format/typed-text.ts';
import { ROW_DEFAULT_WORDS } from '$ui/settings/tester-words.ts';

/** How well one alloy is read, while it is typed. The alloy itself is settled when the row is added. */
export type TypedRow = { readonly metal: MetalId; readonly colour: TesterRow['colour']; readonly perMille: number; readonly u: string };

/** An alloy that is about to be added. */
export type TypedAlloy = { readonly metal: MetalId; readonly colour: TesterRow['colour']; readonly perMille: string };

/** A tester while it is typed. */
export type TypedTester = {
	readonly name: string;
	readonly kind: TesterKind;
	readonly rows: readonly TypedRow[];
	readonly bias: string;
	/** In per cent. */
	readonly gross: string;
	readonly checkedOn: string;
	readonly adding: TypedAlloy;
};

/** The most that a reading, or its bias, may be typed as; checkTester has the last word. */
export const MOST_FIGURE = '1000';

const nothingAdded: TypedAlloy = { metal: 'Au', colour: 'any', perMille: '' };

function typedFigures({ rows, bias, gross }: Pick<Tester, 'rows' | 'bias' | 'gross'>, mark: DecimalMark) {
	return {
		rows: rows.map(({ metal, colour, perMille, u }) => ({ metal, colour, perMille, u: typedFigure(u, mark) })),
		bias: typedFigure(bias, mark),
		gross: typedEstimate(gross, mark)
	};
}

/** A tester that is not described yet: its figures are the working defaults of its kind. */
export function newTester(kind: TesterKind, mark: DecimalMark): TypedTester {
	return { name: '', kind, ...typedFigures(testerDefaults[kind], mark), checkedOn: '', adding: nothingAdded };
}

export function typedTester(tester: Tester, mark: DecimalMark): TypedTester {
	const { name, kind, checkedOn } = tester;
	return { name, kind, ...typedFigures(tester, mark), checkedOn: checkedOn ?? '', adding: nothingAdded };
}

/** Of another kind: figures that are still the defaults become those of the new kind, others stay as they were typed. */
export function ofKind(typed: TypedTester, kind: TesterKind, mark: DecimalMark): TypedTester {
	const [usual, next] = [typedFigures(testerDefaults[typed.kind], mark), typedFigures(testerDefaults[kind], mark)];
	const untouched = JSON.stringify([typed.rows, typed.bias, typed.gross]) === JSON.stringify([usual.rows, usual.bias, usual.gross]);
	return { ...typed, kind, ...(untouched ? next : {}) };
}

export type TesterField = 'name' | 'rows' | 'bias' | 'gross';
/** What is wrong, in which field, and in which row of the alloys. */
export type TesterFormProblem = { readonly field: TesterField; readonly row: number | null; readonly problem: NumberProblem | TesterProblem };

/** The tester as typed, or the first thing wrong with it. */
export function readTester(id: string, typed: TypedTester, mark: DecimalMark): Result<Tester, TesterFormProblem> {
	const rows: TesterRow[] = [];
	for (const [row, { metal, colour, perMille, u }] of typed.rows.entries()) {
		const read = parseNumber(u, { mark, positive: true, most: MOST_FIGURE });
		if (!read.ok) return fail({ field: 'rows', row, problem: read.problem });
		rows.push({ metal, colour, perMille, u: read.value.toNumber() });
	}
	const bias = parseNumber(typed.bias, { mark, most: MOST_FIGURE });
	if (!bias.ok) return fail({ field: 'bias', row: null, problem: bias.problem });
	const gross = parseNumber(typed.gross, { mark, most: '100' });
	if (!gross.ok) return fail({ field: 'gross', row: null, problem: gross.problem });
	const tester = checkTester({
		id,
		name: typed.name.trim(),
		kind: typed.kind,
		rows,
		bias: bias.value.toNumber(),
		gross: gross.value.div(100).toNumber(),
		checkedOn: typed.checkedOn === '' ? null : typed.checkedOn
	});
	return tester.ok ? tester : fail(placeOf(tester.problem, rows));
}

function placeOf(problem: TesterProblem, rows: readonly TesterRow[]): TesterFormProblem {
	switch (problem.kind) {
		case 'tester-no-name':
			return { field: 'name', row: null, problem };
		case 'tester-no-rows':
			return { field: 'rows', row: null, problem };
		case 'tester-u-not-possible':
			return {
				field: 'rows',
				row: rows.findIndex(({ metal, perMille, u }) => metal === problem.metal && perMille === problem.perMille && u === problem.u),
				problem
			};
		case 'tester-bias-over-u':
			return { field: 'bias', row: null, problem };
		case 'tester-gross-too-often':
			return { field: 'gross', row: null, problem };
	}
}

/** The tester with the alloy that was typed among its rows, in order; or what is wrong with the typed fineness. An alloy that is there stays as it is. */
export function withAlloy(typed: TypedTester, mark: DecimalMark): Result<TypedTester, NumberProblem> {
	const { metal, colour, perMille: text } = typed.adding;
	const read = parseNumber(text, { mark, positive: true, most: '1000' });
	if (!read.ok) return read;
	const perMille = read.value.toNumber();
	const done = { ...typed, adding: { ...nothingAdded, metal } };
	if (typed.rows.some((row) => row.metal === metal && row.colour === colour && row.perMille === perMille)) return ok(done);
	const at = typed.rows.findIndex((row) => row.metal === metal && row.perMille > perMille);
	const after = typed.rows.findLastIndex((row) => row.metal === metal) + 1;
	const place = at >= 0 ? at : after > 0 ? after : typed.rows.length;
	return ok({ ...done, rows: typed.rows.toSpliced(place, 0, { metal, colour, perMille, u: '' }) });
}

/** Whose each figure is: said of those that are the working default, and of nothing else. */
export function whoseTyped(typed: TypedTester, mark: DecimalMark) {
	const usual = typedFigures(testerDefaults[typed.kind], mark);
	const said = (isUsual: boolean): string => (isUsual ? ROW_DEFAULT_WORDS : '');
	return {
		rows: typed.rows.map((row) =>
			said(usual.rows.some(({ metal, colour, perMille, u }) => metal === row.metal && colour === row.colour && perMille === row.perMille && u === row.u))
		),
		bias: said(typed.bias === usual.bias),
		gross: said(typed.gross === usual.gross)
	};
}
