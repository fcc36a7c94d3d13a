import { decimal } from '../number/decimal.ts';
import { parseNumber, type DecimalMark } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { parseUnit, toMass, type MassUnitId } from '../mass/units.ts';
import { findCoin } from '../metal/coins.ts';
import { parseMark, type Mark } from '../metal/mark.ts';
import { isOrigin } from '../evidence/origin.ts';
import { statedDeduction } from '../piece/deduction.ts';
import { checkPiece, type Piece } from '../piece/piece.ts';
import { guessDelimiter, splitRows, unguard, type Delimiter, type Row } from './csv.ts';
import { readAmounts } from './line-amounts.ts';
import { readLineMark } from './line-mark.ts';
import { makePiece } from './line-piece.ts';
import { splitLine } from './line-tokens.ts';
import type { LineOptions } from './line-problem.ts';
import { parseLine } from './line.ts';
import type { CellProblem, RowProblem } from './row-problem.ts';
import { isWritten, readHeadings, UNNAMED, type Column, type ColumnId } from './table-columns.ts';
import { readWritten } from './table-written.ts';

export type { CellProblem, RowProblem } from './row-problem.ts';

export type TakenRow = { readonly row: number; readonly piece: Piece };
/** A row that was not understood, as it stood, so that it can be mended. */
export type RefusedRow = { readonly row: number; readonly text: string; readonly problem: RowProblem };
export type Table = { readonly taken: readonly TakenRow[]; readonly refused: readonly RefusedRow[] };

/**
 * Pieces from pasted text: typed lines, or a table with commas, semicolons or tabs, with headings or without. Every row is taken
 * or refused with its reason; none is dropped. In a table that shows decimal commas and
 * no decimal dots, "1.234" is asked about as well.
 * rounding: none.
 * source: RFC 4180, 2, for tables; our own way of writing for lines.
 */
export function readTable(text: string, options: LineOptions = {}): Table {
	const headed = findHeadings(text);
	if (headed !== null) {
		const { rows, columns, written } = headed;
		const mark = options.mark ?? (showsCommas(rows, columns) ? 'comma' : undefined);
		return readRows(rows, (row) => (written ? readOurs(row, columns.length) : readCells(row.cells, columns, { ...options, mark })));
	}
	const delimiter = guessDelimiter(text);
	const dots = /(?:^|[^\d.,])\d+\.\d{1,2}(?![\d.,])/m.test(text);
	const commas = /(?:^|[^\d.,])\d+,\d{1,2}(?![\d.,])/m.test(text) && delimiter !== ',' && !dots;
	const mark = options.mark ?? (commas ? 'comma' : undefined);
	const unnamed = (row: Row) => (isUnnamed(row.cells) ? readCells(row.cells, UNNAMED, { ...options, mark }) : null);
	const line = (row: Row) => parseLine(row.text, { ...options, mark });
	return readRows(splitRows(text, delimiter), (row) => unnamed(row) ?? line(row));
}

function readRows(rows: readonly Row[], read: (row: Row) => Result<Piece, RowProblem>): Table {
	const taken: TakenRow[] = [];
	const refused: RefusedRow[] = [];
	for (const row of rows) {
		const piece = row.problem === null ? read(row) : fail<RowProblem>(row.problem);
		if (piece.ok) taken.push({ row: row.row, piece: piece.value });
		else refused.push({ row: row.row, text: row.text, problem: piece.problem });
	}
	return { taken, refused };
}

type Headed = { readonly rows: readonly Row[]; readonly columns: readonly (Column | null)[]; readonly written: boolean };

function findHeadings(text: string): Headed | null {
	const start = text.replace(/^\ufeff/, '').slice(0, 2_000);
	let best: { delimiter: Delimiter; known: number } | null = null;
	for (const delimiter of [',', ';', '\t'] as const) {
		const columns = readHeadings(splitRows(start, delimiter)[0]?.cells ?? []);
		const known = columns?.filter((column) => column !== null).length ?? 0;
		if (known > (best?.known ?? 0)) best = { delimiter, known };
	}
	if (best === null) return null;
	const [heading, ...rows] = splitRows(text, best.delimiter);
	const columns = heading === undefined ? null : readHeadings(heading.cells);
	return heading === undefined || columns === null ? null : { rows, columns, written: isWritten(heading.cells) };
}

function showsCommas(rows: readonly Row[], columns: readonly (Column | null)[]): boolean {
	const at = columns.findIndex((column) => column?.id === 'mass');
	const shows = (decimals: RegExp) => rows.some(({ cells }) => decimals.test(cells[at] ?? ''));
	// a list kept by two hands shows both: then a dot is what it is for everybody, and only "1,234" is asked about
	return shows(/^\s*\d+,\d{1,2}(?!\d)/) && !shows(/^\s*\d+\.\d{1,2}(?!\d)/);
}

function readOurs(row: Row, columns: number): Result<Piece, RowProblem> {
	const { cells } = row;
	if (cells.length > columns) return fail({ kind: 'table-too-many-cells', cells: cells.length, columns });
	return readWritten(cells);
}

/** A row without headings is a table's when it begins with a number alone and then a unit or nothing: "12.4,g,14k,chain,3". */
function isUnnamed(cells: readonly string[]): boolean {
	if (cells.length < 3 || !/^\s*[\d.,'\u2019]*\d\s*$/.test(cells[0]!)) return false;
	const unit = parseUnit(cells[1]!);
	return unit.ok || unit.problem.kind !== 'unit-unknown';
}

function readCells(
	cells: readonly string[],
	columns: readonly (Column | null)[],
	options: LineOptions
): Result<Piece, RowProblem> {
	const used = cells.reduce((last, each, at) => (each.trim() === '' ? last : at + 1), 0);
	if (used > columns.length) return fail({ kind: 'table-too-many-cells', cells: used, columns: columns.length });
	const place = (id: ColumnId) => columns.findIndex((column) => column?.id === id);
	const cell = (id: ColumnId) => unguard((cells[place(id)] ?? '').trim());
	const problem = (column: ColumnId, of: CellProblem) =>
		fail<RowProblem>({ kind: 'table-cell', column, found: cell(column).slice(0, 60), problem: of });
	const rules = options.mark === undefined ? {} : { mark: options.mark };
	// the count
	const count = cell('count') === '' ? ok(decimal('1')) : parseNumber(cell('count'), { ...rules, positive: true, whole: true });
	if (!count.ok) return problem('count', count.problem);
	// the mass with its unit, in its own cell or beside it
	const massCell = /^([\d.,'\u2019 \u00a0\u202f+\u2212-]*)(\D*)$/.exec(cell('mass'));
	if (cell('mass') !== '' && massCell === null) {
		return problem('mass', { kind: 'number-unreadable', text: cell('mass').slice(0, 60) });
	}
	const [, figure = '', beside = ''] = massCell ?? [];
	const unitText = beside.trim() !== '' ? beside : cell('unit');
	const unit = unitText === '' ? ok(columns[place('mass')]?.unit ?? options.unit ?? 'g') : parseUnit(unitText);
	if (!unit.ok) return problem(beside.trim() !== '' ? 'mass' : 'unit', unit.problem);
	if (beside.trim() !== '' && cell('unit') !== '' && !sameUnit(cell('unit'), unit.value)) {
		return fail({ kind: 'table-cell-unknown', column: 'unit', found: cell('unit').slice(0, 60) });
	}
	if (figure.trim() !== '') {
		const mass = parseNumber(figure, { ...rules, positive: true });
		if (!mass.ok) return problem('mass', mass.problem);
	}
	// the mark, or what the article says
	const article = cell('article');
	const marked = readMarkCell(cell('mark'), columns[place('mark')]?.karats ?? false, article);
	if (!marked.ok) return marked;
	const coin = marked.value === null ? findCoin(cell('mark') === '' ? article : cell('mark')) : null;
	const nowhere = { start: 0, end: 0, from: 0, to: 0 };
	const amounts = figure.trim() === '' ? [] : [{ ...nowhere, typed: figure.trim(), unit: unit.value, off: false, what: null }];
	if (amounts.length === 0 && coin?.ok !== true) return fail({ kind: 'table-cell-missing', column: 'mass' });
	if (marked.value === null && coin?.ok !== true) return fail({ kind: 'table-cell-missing', column: 'mark' });
	const origin = cell('origin').toLowerCase();
	if (origin !== '' && !isOrigin(origin)) return fail({ kind: 'table-cell-unknown', column: 'origin', found: origin.slice(0, 60) });
	const made = makePiece({
		line: '',
		article: article === '' && coin?.ok === true ? cell('mark') : article,
		amounts,
		counts: [{ ...nowhere, typed: count.value.toFixed() }],
		unsure: null,
		mark: marked.value,
		coin: coin?.ok === true ? { coin: coin.value, place: { start: 0, end: 0, found: coin.value.name } } : null,
		options: origin === '' ? options : { ...options, origin }
	});
	if (!made.ok) return made;
	const note = [cell('note'), made.value.note].filter((text) => text !== '').join('; ');
	return takeOff({ ...made.value, note }, cell('deductions'), cell('stones'), unit.value, options);
}

function sameUnit(text: string, unit: MassUnitId): boolean {
	const read = parseUnit(text);
	return read.ok && read.value === unit;
}

/** Null: no mark in the cell, and none in the article either. */
function readMarkCell(cell: string, karats: boolean, article: string): Result<Mark | null, RowProblem> {
	if (cell === '') {
		const { tokens } = splitLine(article);
		const found = readLineMark(tokens, (at) => at >= 0 && at < tokens.length && tokens[at]!.kind === 'word');
		return found.ok ? ok(found.value?.mark ?? null) : found;
	}
	const mark = parseMark(karats && /^\d+(?:[.,]\d+)?$/.test(cell) ? `${cell}k` : cell);
	if (mark.ok) return mark;
	return findCoin(cell).ok ? ok(null) : fail({ kind: 'table-cell', column: 'mark', found: cell.slice(0, 60), problem: mark.problem });
}

/** "0.35 g stones" or, in a column of stones, "0.35"; without a unit in the row's own. */
function takeOff(piece: Piece, cell: string, stones: string, unit: MassUnitId, options: LineOptions): Result<Piece, RowProblem> {
	const deductions = [...piece.deductions];
	for (const [column, text] of [['deductions', cell], ['stones', stones]] as const) {
		for (const part of text.split(';').map((each) => each.trim()).filter((each) => each !== '')) {
			const { tokens } = splitLine(/^[-\u2212]/.test(part) ? part : `-${part}`);
			const read = readAmounts(tokens);
			const unreadable = fail<RowProblem>({ kind: 'table-cell-unknown', column, found: part.slice(0, 60) });
			if (!read.ok) return unreadable;
			const [amount] = read.value;
			const bare = amount === undefined && tokens.length === 2 && tokens[1]!.kind === 'number' ? tokens[1]!.text : null;
			if (amount === undefined ? bare === null : amount.unit === null || amount.to !== tokens.length - 1) return unreadable;
			const rules: { positive: true; mark?: DecimalMark } = { positive: true };
			if (options.mark !== undefined) rules.mark = options.mark;
			const number = parseNumber(amount?.typed ?? bare!, rules);
			if (!number.ok) return fail({ kind: 'table-cell', column, found: part.slice(0, 60), problem: number.problem });
			const what = column === 'stones' ? 'stones' : (amount?.what ?? 'other');
			deductions.push(statedDeduction(what, toMass(number.value, amount?.unit ?? unit), part));
		}
	}
	const filler = deductions.filter(({ what }) => what === 'filler');
	const kept = filler.length > 1 ? deductions.filter((each) => each !== filler[0]) : deductions;
	const checked = checkPiece({ ...piece, deductions: kept });
	return checked.ok ? checked : fail({ kind: 'line-piece', problem: checked.problem });
}
