import { assert } from '../number/decimal.ts';
import { normalCdf } from '../uncertainty/normal.ts';

/**
 * Fineness as the estimate sees it: cells of one part per thousand, the cell of 585 reaching from 584.5 to 585.5. The first
 * and the last cell are half as wide.
 */
export const CELLS = 1001;
export type Vector = Float64Array;

/** Where a cell begins and ends, in parts per thousand. */
export const cellLow = (cell: number): number => Math.max(0, cell - 0.5);
export const cellHigh = (cell: number, cells = CELLS): number => Math.min(cells - 1, cell + 0.5);

/** A likelihood of 1 everywhere: it knows nothing. */
export function flat(cells = CELLS): Vector {
	return new Float64Array(cells).fill(1);
}

/** How far from its middle a bell is still worth computing, in standard deviations; beyond it is under 1e-15. */
const REACH = 8;

/**
 * The chance of a reading per part per thousand, for each cell as the truth: a bell about the reading, averaged over the cell,
 * and everywhere the small chance of a reading that is of something else altogether.
 * formula: (1 − gross) x (area of the bell over the cell) + gross / 1000, all figures in parts per thousand.
 * rounding: none.
 * source: JCGM 101:2008, 6.4.7 (normal distribution of a reading); the mixture with a flat part is common practice, no source.
 */
export function readingLikelihood(perMille: number, u: number, gross: number): Vector {
	assert(u > 0 && gross >= 0 && gross < 1, `a reading needs an uncertainty above zero and a chance of error below one: ${u}, ${gross}`);
	const values = new Float64Array(CELLS).fill(gross / 1000);
	const first = Math.max(0, Math.ceil(perMille - REACH * u - 1));
	const last = Math.min(CELLS - 1, Math.floor(perMille + REACH * u + 1));
	let below = normalCdf((first - 0.5 - perMille) / u);
	for (let cell = first; cell <= last; cell += 1) {
		const above = normalCdf((cell + 0.5 - perMille) / u);
		values[cell]! += (1 - gross) * (above - below);
		below = above;
	}
	return values;
}

/**
 * A bell as a distribution over the cells that sums to one; what falls outside 0 to 1000 stands in the outermost cells.
 * formula: area of the bell over each cell.
 * rounding: none.
 * source: common practice, no source.
 */
export function bellPrior(mean: number, sd: number, cells = CELLS): Vector {
	const values = new Float64Array(cells);
	const first = Math.min(cells - 1, Math.max(0, Math.floor(mean - REACH * sd)));
	const last = Math.min(cells - 1, Math.max(first, Math.ceil(mean + REACH * sd)));
	let below = 0;
	for (let cell = first; cell <= last; cell += 1) {
		const above = cell === last ? 1 : normalCdf((cell + 0.5 - mean) / sd);
		values[cell] = above - below;
		below = above;
	}
	return values;
}

/** Scaled so that it sums to one. */
export function normalised(values: Vector): Vector {
	let total = 0;
	for (const value of values) total += value;
	assert(total > 0 && Number.isFinite(total), 'a distribution needs a positive sum');
	return values.map((value) => value / total);
}

/**
 * The value below which a share of a distribution lies, between the cell's edges in proportion.
 * formula: the first cell whose running sum reaches the share; its low edge + the rest of the share / the cell's chance x its width.
 * rounding: none.
 * source: common practice, no source.
 */
export function quantileOf(chances: Vector, share: number): number {
	let below = 0;
	for (let cell = 0; cell < chances.length; cell += 1) {
		const chance = chances[cell]!;
		if (chance > 0 && below + chance >= share) {
			const low = cellLow(cell);
			return low + Math.max(0, (share - below) / chance) * (cellHigh(cell, chances.length) - low);
		}
		below += chance;
	}
	return chances.length - 1;
}

/** Mean and standard deviation of a distribution over the cells. */
export function momentsOf(chances: Vector): { readonly mean: number; readonly sd: number } {
	let mean = 0;
	for (let cell = 0; cell < chances.length; cell += 1) mean += chances[cell]! * cell;
	let variance = 0;
	for (let cell = 0; cell < chances.length; cell += 1) variance += chances[cell]! * (cell - mean) ** 2;
	return { mean, sd: Math.sqrt(variance) };
}
