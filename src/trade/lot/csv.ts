/** One record of a table and the line of the text on which it begins, counted from 1. */
export type Row = { readonly row: number; readonly text: string; readonly cells: readonly string[]; readonly problem: QuoteProblem | null };

/** A quotation mark that is never closed, or closed in the middle of a cell: only its own line is lost. */
export type QuoteProblem = { readonly kind: 'table-quote-open' };

export type Delimiter = ',' | ';' | '\t';

/**
 * Splits text into records and cells: quoted cells may hold the delimiter, doubled quotes and line breaks; a byte order mark at
 * the start is skipped. A record whose quotes do not close is reported and ends at its line, so that no other record is lost.
 * source: RFC 4180, 2 (with other delimiters and line ends).
 */
export function splitRows(text: string, delimiter: Delimiter): Row[] {
	const rows: Row[] = [];
	let at = text.startsWith('\ufeff') ? 1 : 0;
	let line = 1;
	while (at < text.length) {
		const record = readRecord(text, at, delimiter);
		const end = record?.end ?? lineEnd(text, at);
		const shown = text.slice(at, end);
		const cells = record?.cells ?? [shown];
		if (cells.some((cell) => cell.trim() !== '')) {
			rows.push({ row: line, text: shown, cells, problem: record === null ? { kind: 'table-quote-open' } : null });
		}
		const after = text.startsWith('\r\n', end) ? end + 2 : end + 1;
		line += countBreaks(text, at, Math.min(after, text.length));
		at = after;
	}
	return rows;
}

function lineEnd(text: string, from: number): number {
	const match = /[\r\n]/g;
	match.lastIndex = from;
	return match.exec(text)?.index ?? text.length;
}

function countBreaks(text: string, from: number, to: number): number {
	let breaks = 0;
	for (let at = from; at < to; at += 1) {
		if (text[at] === '\n' || (text[at] === '\r' && text[at + 1] !== '\n')) breaks += 1;
	}
	return breaks;
}

/** A cell longer than this is a quote that someone forgot to close. */
const LONGEST_CELL = 20_000;

function readRecord(text: string, from: number, delimiter: Delimiter): { cells: string[]; end: number } | null {
	const cells: string[] = [];
	let at = from;
	for (;;) {
		if (text[at] === '"') {
			let cell = '';
			for (;;) {
				const close = text.indexOf('"', at + 1);
				if (close < 0 || close - from > LONGEST_CELL) return null;
				cell += text.slice(at + 1, close);
				at = close + 1;
				if (text[at] !== '"') break;
				cell += '"';
			}
			if (at < text.length && text[at] !== delimiter && text[at] !== '\n' && text[at] !== '\r') return null;
			cells.push(cell);
		} else {
			const start = at;
			while (at < text.length && text[at] !== delimiter && text[at] !== '\n' && text[at] !== '\r') at += 1;
			cells.push(text.slice(start, at));
		}
		if (text[at] !== delimiter) return { cells, end: at };
		at += 1;
	}
}

const DANGEROUS = /^[=+\-@\t\r\n'\uff1d\uff0b\uff0d\uff20]/;
const GUARDED = /^'[=+\-@\t\r\n'\uff1d\uff0b\uff0d\uff20]/;

/**
 * A cell of text as it is written: a leading apostrophe keeps a spreadsheet from running it as a formula, quotes keep it whole.
 * source: common practice against formulas in exported tables, no source; RFC 4180, 2 for the quotes.
 */
export function writeCell(value: string): string {
	const safe = DANGEROUS.test(value) ? `'${value}` : value;
	return /[",;\t\r\n]|^\s|\s$/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** The text of a cell without the apostrophe that `writeCell` puts before formulas. */
export function unguard(cell: string): string {
	return GUARDED.test(cell) ? cell.slice(1) : cell;
}

/** The delimiter of a text without a known header: a tab if there is one, else the sign that more lines hold. */
export function guessDelimiter(text: string): Delimiter {
	const lines = text.split(/\r\n|\r|\n/, 200);
	const holding = (sign: string) => lines.filter((line) => line.includes(sign)).length;
	if (holding('\t') > 0) return '\t';
	return holding(';') > 0 && holding(';') * 2 >= lines.filter((line) => line.trim() !== '').length ? ';' : ',';
}
