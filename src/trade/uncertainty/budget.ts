import type { Uncertain } from './uncertain.ts';

/** One row of the budget: the size of a source's doubt in the unit of the value, and its share of the variance (0 to 1). */
export type BudgetRow = { readonly source: string; readonly u: number; readonly share: number };

/**
 * What it is: where the doubt of an estimate comes from, largest first; a source that adds nothing is left out.
 * formula: u = absolute contribution, in the unit of the value; share = u squared / sum of all u squared.
 * rounding: none.
 * source: JCGM 100:2008, 5.1.2 equation 11b and the layout of table H.1 (a budget by component).
 */
export function budget(a: Uncertain): BudgetRow[] {
	const rows = Object.entries(a.contributions)
		.map(([source, signed]) => ({ source, u: Math.abs(signed) }))
		.filter(({ u }) => u > 0)
		.sort((x, y) => y.u - x.u || (x.source < y.source ? -1 : 1));
	const largest = rows[0]?.u ?? 1;
	// squares relative to the largest, so that very small doubts do not vanish
	const total = rows.reduce((sum, { u }) => sum + (u / largest) ** 2, 0);
	return rows.map(({ source, u }) => ({ source, u, share: (u / largest) ** 2 / total }));
}
