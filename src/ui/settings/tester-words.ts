import type { Tester, TesterRow } from '$trade/evidence/tester.ts';
import { testerDefaults } from '$trade/evidence/tester-figures.ts';
import { testerKindWords } from '../evidence-words.ts';
import type { Format } from '../format.ts';
import { metalName } from '../metal-name.ts';
import { dayWords } from './scale-words.ts';
import { DEFAULT_WORDS, estimateWords } from './setting-words.ts';

/** What is said of a figure that nobody has typed. */
export const ROW_DEFAULT_WORDS = 'working default';

/** "Gold 750 ‰, white". */
export function alloyWords({ metal, colour, perMille }: Pick<TesterRow, 'metal' | 'colour' | 'perMille'>, format: Format): string {
	return `${metalName(metal)} ${format.estimate(perMille, 6)}\u00a0‰${colour === 'white' ? ', white' : ''}`;
}

/** "±16 ‰". */
export function doubtWords(u: number, format: Format): string {
	return `±${format.estimate(u, 6)}\u00a0‰`;
}

/** What a tester is, in a line. */
export function testerLine({ kind, bias, gross, checkedOn }: Tester, format: Format): string {
	const checked = checkedOn === null ? 'never checked' : `checked ${dayWords(checkedOn, format)}`;
	return `${testerKindWords[kind]}, error of its own ${doubtWords(bias, format)}, wrong in ${estimateWords(gross, format)}, ${checked}`;
}

/** Whether a row says what is taken of every tester of its kind. */
export function isDefaultRow({ metal, colour, perMille, u }: TesterRow, kind: Tester['kind']): boolean {
	return testerDefaults[kind].rows.some((row) => row.metal === metal && row.colour === colour && row.perMille === perMille && row.u === u);
}

/** How many of its figures are the buyer's own. */
export function whoseFigures(tester: Tester): string {
	const { kind, rows, bias, gross } = tester;
	const usual = testerDefaults[kind];
	const own = [...rows.map((row) => !isDefaultRow(row, kind)), bias !== usual.bias, gross !== usual.gross];
	const count = own.filter(Boolean).length;
	if (count === 0) return `every figure: ${DEFAULT_WORDS}`;
	return count === own.length ? 'every figure is yours' : `${count} of ${own.length} figures are yours, the others are working defaults`;
}

/** The figures of a tester as rows for a person to read. */
export function figureRows(figures: Pick<Tester, 'kind' | 'rows' | 'bias' | 'gross'>, format: Format) {
	const { kind, rows, bias, gross } = figures;
	const usual = testerDefaults[kind];
	const whose = (isUsual: boolean): string => (isUsual ? ROW_DEFAULT_WORDS : 'yours');
	return [
		...rows.map((row) => ({ what: alloyWords(row, format), figure: doubtWords(row.u, format), whose: whose(isDefaultRow(row, kind)) })),
		{ what: 'Error of its own', figure: doubtWords(bias, format), whose: whose(bias === usual.bias) },
		{ what: 'Reading of something else', figure: estimateWords(gross, format), whose: whose(gross === usual.gross) }
	];
}
