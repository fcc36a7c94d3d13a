import { describe, expect, it } from 'vitest';
import { parseLine, type LineProblem } from '../../src/trade/lot/line.ts';
import { chanceOfMissing, type SampleProblem } from '../../src/trade/lot/sample.ts';
import { readTable, type RowProblem } from '../../src/trade/lot/table.ts';

const line = (text: string): LineProblem => {
	const result = parseLine(text);
	if (result.ok) throw new Error(`"${text}" was taken`);
	return result.problem;
};
const row = (text: string): RowProblem => {
	const [refused] = readTable(text).refused;
	if (refused === undefined) throw new Error(`"${text}" was taken`);
	return refused.problem;
};

/** Each kind from what a person would really type. A kind without a row does not compile. */
const reproductions: Record<RowProblem['kind'] | SampleProblem['kind'], () => { readonly kind: string }> = {
	'line-empty': () => line('   '),
	'line-too-long': () => line('14k chain 12.4 g '.repeat(20)),
	'line-number': () => line('14k chain 1,234 g'),
	'line-unit': () => line('14k chain 2 oz'),
	'line-mark': () => line('14k 925 5 g'),
	'line-coin': () => line('x2 eagle'),
	'line-coin-mass': () => line('sovereign ring 12 g'),
	'line-mass-missing': () => line('6 sterling forks'),
	'line-mark-missing': () => line('chain 12.4 g'),
	'line-two-masses': () => line('14k 5.2 g 8 dwt'),
	'line-two-counts': () => line('x3 14k 5 g 2 pcs'),
	'line-times-unclear': () => line('3 x 12.4 g 14k'),
	'line-each': () => line('14k ring 5 g each x3'),
	'line-carat-unclear': () => line('14k 5 g 0.5 ct'),
	'line-shares-unclear': () => line('Au 62.5 Pd 18 Ag 12 4 g'),
	'line-grouping-unclear': () => line('14k 1 234.5 g'),
	'line-unexplained': () => line('14k 18" chain 5 g'),
	'line-piece': () => line('14k ring 5 g - 6 g stones'),
	'table-quote-open': () => row('mass,mark\n"3,14k'),
	'table-cell': () => row('mass,mark\n1.2.3,14k'),
	'table-cell-unknown': () => row('mass,mark,origin\n3,14k,moon'),
	'table-cell-missing': () => row('mass,mark\n3,'),
	'table-too-many-cells': () => row('mass,mark\n12,4,14k'),
	'sample-impossible': () => {
		const result = chanceOfMissing(10, 11, 3);
		return result.ok ? { kind: 'none' } : result.problem;
	}
};

describe('what can be wrong with a line, a table or a sample', () => {
	it.each(Object.entries(reproductions))('%s happens', (kind, reproduce) => expect(reproduce().kind).toBe(kind));

	it('carries what a sentence needs', () => {
		expect(reproductions['line-coin']()).toMatchObject({ found: 'eagle', problem: { kind: 'coin-ambiguous' } });
		expect(reproductions['line-two-masses']()).toEqual({
			kind: 'line-two-masses', first: { start: 4, end: 9, found: '5.2 g' }, second: { start: 10, end: 15, found: '8 dwt' }
		});
		expect(reproductions['line-piece']()).toMatchObject({ problem: { kind: 'piece-deductions-over-gross' } });
		expect(reproductions['table-too-many-cells']()).toEqual({ kind: 'table-too-many-cells', cells: 3, columns: 2 });
		expect(reproductions['table-cell']()).toMatchObject({ column: 'mass', found: '1.2.3', problem: { kind: 'number-unreadable' } });
	});
});
