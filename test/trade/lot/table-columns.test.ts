import { describe, expect, it } from 'vitest';
import { isWritten, readHeading, readHeadings, WRITTEN } from '../../../src/trade/lot/table-columns.ts';

const heading = (text: string) => {
	const column = readHeading(text);
	return column === null ? null : [column.id, column.unit, column.karats];
};

describe('headings', () => {
	it.each([
		['Mass', ['mass', null, false]], ['weight (g)', ['mass', 'g', false]], ['Weight in dwt', ['mass', 'dwt', false]],
		['gross_weight', ['mass', null, false]], ['grams', ['mass', 'g', false]],
		['stones [ct]', ['stones', 'ct', false]], ['Karat', ['mark', null, true]], ['Qty.', ['count', null, false]], ['', null],
		['colour', null], ['constructor', null], ['ct', null]
	])('%s', (text, expected) => expect(heading(text)).toEqual(expected));

	it('a heading row names the mass, has no figures and no column twice', () => {
		expect(readHeadings(['mass', 'mark'])?.map((column) => column?.id)).toEqual(['mass', 'mark']);
		expect(readHeadings(['mass', 'colour', 'mark'])?.map((column) => column?.id ?? null)).toEqual(['mass', null, 'mark']);
		expect(readHeadings(['mark', 'article'])).toBe(null);
		expect(readHeadings(['mass', 'weight'])).toBe(null);
		expect(readHeadings(['12.4', 'g', '14k'])).toBe(null);
		expect(readHeadings(['14k chain 12 g'])).toBe(null);
	});

	it('our own heading row is known as ours', () => {
		expect(isWritten(WRITTEN)).toBe(true);
		expect(isWritten(WRITTEN.slice(1))).toBe(false);
		expect(readHeadings(WRITTEN)?.every((column) => column !== null)).toBe(true);
	});
});
