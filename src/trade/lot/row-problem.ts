import type { NumberProblem } from '../number/field.ts';
import type { UnitProblem } from '../mass/units.ts';
import type { MarkProblem } from '../metal/mark.ts';
import type { QuoteProblem } from './csv.ts';
import type { LineProblem } from './line-problem.ts';

/** What can be wrong with one cell of a table. */
export type CellProblem = NumberProblem | UnitProblem | MarkProblem;

/** What can be wrong with a row of a table or a pasted line. */
export type RowProblem =
	| LineProblem
	| QuoteProblem
	| { readonly kind: 'table-cell'; readonly column: string; readonly found: string; readonly problem: CellProblem }
	| { readonly kind: 'table-cell-unknown'; readonly column: string; readonly found: string }
	| { readonly kind: 'table-cell-missing'; readonly column: string }
	/** More cells than headings: most often a decimal comma that was not quoted. */
	| { readonly kind: 'table-too-many-cells'; readonly cells: number; readonly columns: number };
