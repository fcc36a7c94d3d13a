import { parseUnit, type MassUnitId } from '../mass/units.ts';

/** What a column of a table is about. */
export type ColumnId =
	| 'article' | 'count' | 'mass' | 'unit' | 'mark' | 'origin' | 'contents' | 'deductions' | 'stones' | 'loss class'
	| 'more than melt' | 'note' | 'division' | 'scale' | 'repeats' | 'tare' | 'photos' | 'typed';

export type Column = {
	readonly id: ColumnId;
	/** From a heading such as "mass (dwt)". */
	readonly unit: MassUnitId | null;
	/** Bare figures are karats. */
	readonly karats: boolean;
};

/** The columns that `writeTable` writes, in this order. Masses are in the row's unit with a dot; deductions in grams. */
export const WRITTEN: readonly ColumnId[] = [
	'article', 'count', 'mass', 'unit', 'mark', 'origin', 'contents', 'deductions', 'loss class', 'more than melt', 'note',
	'division', 'scale', 'repeats', 'tare', 'photos', 'typed'
];

/** The order of columns without a heading. */
export const UNNAMED: readonly Column[] = (['mass', 'unit', 'mark', 'article', 'count', 'note'] as const).map((id) => ({
	id,
	unit: null,
	karats: false
}));

const NAMES: Readonly<Record<string, ColumnId>> = {
	article: 'article', item: 'article', description: 'article', piece: 'article', what: 'article',
	count: 'count', qty: 'count', quantity: 'count', pieces: 'count', pcs: 'count',
	mass: 'mass', weight: 'mass', wt: 'mass', gross: 'mass', 'gross mass': 'mass', 'gross weight': 'mass',
	unit: 'unit', units: 'unit', 'mass unit': 'unit',
	mark: 'mark', stamp: 'mark', fineness: 'mark', purity: 'mark', hallmark: 'mark', karat: 'mark', karats: 'mark', carat: 'mark',
	origin: 'origin', source: 'origin',
	contents: 'contents', composition: 'contents',
	deductions: 'deductions', deduction: 'deductions', less: 'deductions',
	stones: 'stones', stone: 'stones', 'stone mass': 'stones', 'stone weight': 'stones',
	'loss class': 'loss class', 'more than melt': 'more than melt',
	note: 'note', notes: 'note', remark: 'note', remarks: 'note', comment: 'note',
	division: 'division', scale: 'scale', repeats: 'repeats', tare: 'tare', photos: 'photos', typed: 'typed'
};

/** A heading as a column: "Mass", "weight (g)", "dwt"; null for one that is not known. */
export function readHeading(heading: string): Column | null {
	const text = heading.trim().toLowerCase().replace(/[_.:]+/g, ' ').replace(/\s+/g, ' ').trim();
	if (text === '' || text.length > 40) return null;
	const karats = /^(?:karats?|carat)$/.test(text);
	if (Object.hasOwn(NAMES, text)) return { id: NAMES[text]!, unit: null, karats };
	const parts = /^(.+?)\s*(?:[([]|\bin\b|\s)\s*([a-z ]+?)\s*[)\]]?$/.exec(text);
	const name = parts?.[1]?.trim() ?? '';
	const inside = parseUnit(parts?.[2] ?? '');
	if (inside.ok && Object.hasOwn(NAMES, name)) return { id: NAMES[name]!, unit: inside.value, karats: false };
	const alone = parseUnit(text);
	return alone.ok && alone.value !== 'ct' ? { id: 'mass', unit: alone.value, karats: false } : null;
}

/** The columns of a heading row; null when it is none: a heading names the mass, has no figures and no column twice. */
export function readHeadings(cells: readonly string[]): (Column | null)[] | null {
	const columns = cells.map(readHeading);
	const known = columns.filter((column) => column !== null);
	if (!known.some(({ id }) => id === 'mass') || known.length < Math.min(2, cells.length)) return null;
	if (cells.some((cell) => /^\s*[\d.,]+/.test(cell))) return null;
	return new Set(known.map(({ id }) => id)).size === known.length ? columns : null;
}

export function isWritten(cells: readonly string[]): boolean {
	return cells.length === WRITTEN.length && cells.every((cell, at) => cell === WRITTEN[at]);
}
