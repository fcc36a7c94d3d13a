import type { RefusedRow, Table } from '$trade/lot/table.ts';

const LINES = /\r\n|\r|\n/;

/** The text with one refused row written anew; rows are counted from 1, as `readTable` counts them. */
export function withMended(text: string, refused: Pick<RefusedRow, 'row'>, mended: string): string {
	const lines = text.split(LINES);
	lines[refused.row - 1] = mended;
	return lines.join('\n');
}

/**
 * What is left to mend after the understood rows were taken: the refused rows as they stood, under the headings they
 * were read with; empty when there is nothing left.
 */
export function mendable(text: string, { taken, refused }: Table): string {
	if (refused.length === 0) return '';
	const first = Math.min(...taken.map(({ row }) => row), ...refused.map(({ row }) => row));
	const headings = text
		.split(LINES)
		.slice(0, first - 1)
		.filter((line) => line.trim() !== '');
	return [...headings, ...refused.map((each) => each.text)].join('\n');
}
