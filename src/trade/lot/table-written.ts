import { decimal, type Decimal } from '../number/decimal.ts';
import { compareExact, exactFromText, exactToText, EXACT_ZERO } from '../number/exact.ts';
import { fail, type Result } from '../number/result.ts';
import { massUnits, type MassUnitId } from '../mass/units.ts';
import { isMetalId } from '../metal/metals.ts';
import { isOrigin } from '../evidence/origin.ts';
import { isDeductionKind, type Deduction } from '../piece/deduction.ts';
import { isLossClass } from '../piece/loss-class.ts';
import { checkPiece, type Content, type Piece } from '../piece/piece.ts';
import { stoneCuts, type StoneCut } from '../piece/stones.ts';
import { unguard, writeCell } from './csv.ts';
import { WRITTEN, type ColumnId } from './table-columns.ts';
import type { RowProblem } from './row-problem.ts';

/**
 * Pieces as a table with everything that is known of them, so that reading it gives the same pieces.
 * Comma-separated, a dot before decimals, a heading row, lines ended by CR LF; cells that a spreadsheet would run are guarded.
 * rounding: none.
 * source: RFC 4180, 2.
 */
export function writeTable(pieces: readonly Piece[]): string {
	const rows = pieces.map((piece) => WRITTEN.map((column) => writeCell(cellOf(piece, column))).join(','));
	return `${[WRITTEN.join(','), ...rows].join('\r\n')}\r\n`;
}

/** Lists in one cell are parted by "; " and ":", so these and "%" are written as in addresses. */
const pack = (text: string) => text.replace(/[%;:\s]/g, (sign) => `%${sign.charCodeAt(0).toString(16).padStart(4, '0')}`);
const unpack = (text: string) => text.replace(/%([0-9a-f]{4})/g, (_, code: string) => String.fromCharCode(parseInt(code, 16)));
const split = (cell: string) => (cell === '' ? [] : cell.split('; '));

function cellOf(piece: Piece, column: ColumnId): string {
	const { weighing } = piece;
	switch (column) {
		case 'count':
			return piece.count.toString();
		case 'mass':
			return weighing.reading.toFixed();
		case 'unit':
			return weighing.unit;
		case 'contents':
			return piece.contents.map(({ metal, taken }) => `${metal} ${exactToText(taken.perMille)}`).join('; ');
		case 'deductions':
			return piece.deductions.map(writeDeduction).join('; ');
		case 'loss class':
			return piece.lossClass;
		case 'more than melt':
			return piece.moreThanMelt ? 'yes' : 'no';
		case 'division':
			return weighing.division?.toFixed() ?? '';
		case 'scale':
			return weighing.scale === null ? '' : pack(weighing.scale);
		case 'repeats':
			return weighing.repeats.map((value) => value.toFixed()).join('; ');
		case 'tare':
			return weighing.tare?.toFixed() ?? '';
		case 'photos':
			return piece.photos.map(pack).join('; ');
		case 'typed':
			return weighing.typed;
		case 'stones':
			return '';
		case 'article':
		case 'mark':
		case 'origin':
		case 'note':
			return piece[column];
	}
}

function writeDeduction({ what, mass, u, how, stones }: Deduction): string {
	const parts = [what, mass.grams.toFixed(), u.toString(), pack(how)];
	if (stones !== undefined) {
		const { cut, count, length, width, depth, gravity } = stones;
		parts.push(cut, count.toString(), ...[length, width, depth, gravity].map((value) => value.toFixed()));
	}
	return parts.join(':');
}

class Unreadable {
	constructor(
		readonly column: string,
		readonly found: string
	) {}
}

/** A row that `writeTable` wrote; anything else in it is named with its column. */
export function readWritten(cells: readonly string[]): Result<Piece, RowProblem> {
	const cell = (column: ColumnId) => unguard(cells[WRITTEN.indexOf(column)] ?? '');
	const bad = (column: ColumnId): never => {
		throw new Unreadable(column, cell(column).slice(0, 60));
	};
	const plain = (text: string, column: ColumnId): Decimal => (/^\d{1,40}(?:\.\d{1,40})?$/.test(text) ? decimal(text) : bad(column));
	const optional = (column: ColumnId) => (cell(column) === '' ? null : plain(cell(column), column));
	try {
		const unit = Object.hasOwn(massUnits, cell('unit')) ? (cell('unit') as MassUnitId) : bad('unit');
		const count = /^\d{1,9}$/.test(cell('count')) ? Number(cell('count')) : bad('count');
		const [origin, lossClass] = [cell('origin'), cell('loss class')];
		const piece = checkPiece({
			article: cell('article'),
			count,
			weighing: {
				typed: cell('typed'),
				reading: plain(cell('mass'), 'mass'),
				unit,
				division: optional('division'),
				scale: cell('scale') === '' ? null : unpack(cell('scale')),
				repeats: split(cell('repeats')).map((text) => plain(text, 'repeats')),
				tare: optional('tare')
			},
			mark: cell('mark'),
			origin: isOrigin(origin) ? origin : bad('origin'),
			contents: split(cell('contents')).map((text) => readContent(text) ?? bad('contents')),
			deductions: split(cell('deductions')).map((text) => readDeduction(text) ?? bad('deductions')),
			lossClass: isLossClass(lossClass) ? lossClass : bad('loss class'),
			moreThanMelt: cell('more than melt') === 'yes' || (cell('more than melt') === 'no' ? false : bad('more than melt')),
			note: cell('note'),
			photos: split(cell('photos')).map(unpack)
		});
		return piece.ok ? piece : fail({ kind: 'line-piece', problem: piece.problem });
	} catch (thrown) {
		if (thrown instanceof Unreadable) return fail({ kind: 'table-cell-unknown', column: thrown.column, found: thrown.found });
		throw thrown;
	}
}

export function readContent(text: string): Content | null {
	const [metal = '', share = ''] = text.split(' ');
	const perMille = exactFromText(share);
	if (!isMetalId(metal) || perMille === null || compareExact(perMille, EXACT_ZERO) < 0) return null;
	return { metal, taken: { perMille } };
}

function readDeduction(text: string): Deduction | null {
	const [what = '', grams = '', u = '', how = '', cut, count = '', ...sizes] = text.split(':');
	const number = Number(u);
	const plain = /^\d{1,40}(?:\.\d{1,40})?$/;
	if (!isDeductionKind(what) || !plain.test(grams) || u === '' || !Number.isFinite(number) || number < 0) return null;
	const deduction: Deduction = { what, mass: { grams: decimal(grams) }, u: number, how: unpack(how) };
	if (cut === undefined) return deduction;
	if (!(stoneCuts as readonly string[]).includes(cut) || !/^\d{1,9}$/.test(count)) return null;
	if (sizes.length !== 4 || !sizes.every((size) => plain.test(size))) return null;
	const [length, width, depth, gravity] = sizes.map((size) => decimal(size));
	return {
		...deduction,
		stones: { cut: cut as StoneCut, count: Number(count), length: length!, width: width!, depth: depth!, gravity: gravity! }
	};
}

