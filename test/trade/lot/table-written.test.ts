import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { splitRows } from '../../../src/trade/lot/csv.ts';
import { WRITTEN } from '../../../src/trade/lot/table-columns.ts';
import { readContent, readWritten, writeTable } from '../../../src/trade/lot/table-written.ts';
import { hostile, pieceOf } from '../piece/some-pieces.ts';

const cellsOf = (line: string) => splitRows(writeTable([pieceOf(line)]), ',')[1]!.cells;

describe('a written row', () => {
	it('is documented by its heading row and readable by people', () => {
		const csv = writeTable([pieceOf('18k ring 5,20 g - 0,35 g stones # box, left')]);
		expect(csv).toBe(
			'article,count,mass,unit,mark,origin,contents,deductions,loss class,more than melt,note,division,scale,repeats,tare,photos,typed\r\n' +
				'ring,1,5.2,g,18 kt,us-modern,Au 750,"stones:0.35:0.034999999999999996:0,35%0020g",clean,no,"box, left",,,,,,"5,20"\r\n'
		);
		expect(writeTable([])).toBe(`${WRITTEN.join(',')}\r\n`);
	});

	it.each(WRITTEN.filter((column) => !['article', 'mark', 'note', 'scale', 'photos', 'typed'].includes(column)))('a damaged %s is named', (column) => {
		const cells = [...cellsOf('14k ring 5.2 g')];
		cells[WRITTEN.indexOf(column)] = 'damaged';
		expect(readWritten(cells)).toEqual({ ok: false, problem: { kind: 'table-cell-unknown', column, found: 'damaged' } });
	});

	it('an impossible piece is refused with its reason', () => {
		const cells = [...cellsOf('14k ring 5.2 g')];
		cells[WRITTEN.indexOf('contents')] = 'Au 1001';
		expect(readWritten(cells)).toMatchObject({ problem: { kind: 'line-piece', problem: { kind: 'piece-contents-over-1000' } } });
	});

	it('any text in any cell is a piece or a problem', () => {
		const good = cellsOf('14k ring 5.2 g -0.2 g stones');
		fc.assert(
			fc.property(fc.integer({ min: 0, max: WRITTEN.length - 1 }), hostile, (at, text) => {
				const result = readWritten(good.map((cell, i) => (i === at ? text : cell)));
				if (result.ok) expect(result.value.weighing.reading.gt(0)).toBe(true);
				else expect(result.problem.kind).toMatch(/^(?:table-cell-unknown|line-piece)$/);
			}),
			{ numRuns: 2_000 }
		);
	});

	it.each([
		['Au 585', true], ['Au 1750/3', true], ['Xx 585', false],
		['Au', false], ['Au -1', false], ['Au 1/0', false],
		['toString 5', false]
	])('%s is a content: %s', (text, known) => {
		expect(readContent(text) !== null).toBe(known);
	});
});
