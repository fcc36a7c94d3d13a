import type { LineProblem } from '$trade/lot/line.ts';
import type { SampleProblem } from '$trade/lot/sample.ts';
import type { RowProblem } from '$trade/lot/table.ts';
import type { Format } from '../format.ts';
import { massSentence } from './mass.ts';
import { metalSentence } from './metal.ts';
import { numberSentence } from './number.ts';
import { pieceSentence } from './piece.ts';

/** What is wrong with a typed line, a row of a table or a sample of a bag. */
export type LotProblem = LineProblem | RowProblem | SampleProblem;

export function lotSentence(problem: LotProblem, format: Format): string {
	switch (problem.kind) {
		case 'line-empty':
			return 'Type a piece, such as “14k chain 12.4g x3”.';
		case 'line-too-long':
			return `This line has ${problem.length} letters; ${problem.most} fit. Put each piece on a line of its own.`;
		case 'line-number':
			return numberSentence(problem.problem);
		case 'line-unit':
			return massSentence(problem.problem, format);
		case 'line-mark':
		case 'line-coin':
			return metalSentence(problem.problem);
		case 'line-coin-mass': {
			const many = problem.count === 1 ? problem.coin : `${format.count(problem.count)} × ${problem.coin}`;
			return (
				`${many} should weigh ${format.mass(problem.legal)}, not ${format.mass(problem.given)}. ` +
				'Is it mounted, another coin, or another count? A mounted one is entered by its mark.'
			);
		}
		case 'line-mass-missing':
			if (problem.unsure === null) return 'The mass is missing. Write it with its unit, such as 12.4g or 8 dwt.';
			return /[a-z]\s*$/i.test(problem.unsure.found)
				? `“${problem.unsure.found}” stands behind a minus sign, so it is taken off. Write the whole mass before it.`
				: `Is “${problem.unsure.found}” the mass? Write its unit with it, such as ${problem.unsure.found}g.`;
		case 'line-mark-missing':
			return problem.words === ''
				? 'The mark is missing. Write it first, such as 14k, 585, 925 or brass.'
				: `“${problem.words}” has no mark. Write it first, such as 14k, 585, 925 or brass.`;
		case 'line-two-masses':
			return two('masses', problem.first.found, problem.second.found, 'The mass is that of all pieces together.');
		case 'line-two-counts':
			return two('counts', problem.first.found, problem.second.found, 'Keep one.');
		case 'line-times-unclear':
			return `“${problem.found}”: is that the mass of each or of all together? Write the mass of all together, then the count, such as 12.4g x3.`;
		case 'line-each':
			return `“${problem.found}”: write the mass of all pieces together, as the scale shows it.`;
		case 'line-carat-unclear':
			return `“${problem.found}” can be karats of gold or carats of stones. Write kt for gold; for stones take them off, such as −0.5ct stones.`;
		case 'line-shares-unclear':
			return `“${problem.found}” is not clear. Write each metal with its parts per thousand, such as Au 625 Pd 180.`;
		case 'line-grouping-unclear':
			return `“${problem.found}” can be one number, ${problem.together}, or two. Write it without the space, or say what the first figure is.`;
		case 'line-unexplained':
			return `We cannot place “${problem.found}”. Take it out, or write what it is.`;
		case 'line-piece':
			return pieceSentence(problem.problem, format);
		case 'table-quote-open':
			return 'A quotation mark is opened and not closed in this row.';
		case 'table-cell':
			return `${problem.column}: ${cellSentence(problem.problem, format)}`;
		case 'table-cell-unknown':
			return `${problem.column}: we do not know “${problem.found}”.`;
		case 'table-cell-missing':
			return `${problem.column} is empty in this row.`;
		case 'table-too-many-cells':
			return (
				`This row has ${problem.cells} cells for ${problem.columns} headings. ` +
				'A decimal comma splits a cell in a table with commas: put the figure in quotation marks.'
			);
		case 'sample-impossible':
			return (
				`${format.count(problem.tested)} tested and ${format.count(problem.bad)} bad cannot be in a bag of ${format.count(problem.pieces)}. ` +
				'All three are whole numbers, and neither part is more than the bag.'
			);
	}
}

type InCell = Extract<RowProblem, { readonly kind: 'table-cell' }>['problem'];

function cellSentence(problem: InCell, format: Format): string {
	switch (problem.kind) {
		case 'unit-missing':
		case 'unit-unknown':
		case 'unit-ambiguous':
			return massSentence(problem, format);
		case 'number-missing':
		case 'number-unreadable':
		case 'number-ambiguous':
		case 'number-negative':
		case 'number-not-positive':
		case 'number-not-whole':
		case 'number-too-large':
		case 'number-too-many-digits':
			return numberSentence(problem);
		default:
			return metalSentence(problem);
	}
}

function two(what: string, first: string, second: string, then: string): string {
	return `There are two ${what} in this line, “${first}” and “${second}”. ${then}`;
}
