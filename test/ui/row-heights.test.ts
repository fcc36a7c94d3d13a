import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { RowHeights } from '$ui/row-heights.ts';

const heightsOf = fc.array(fc.option(fc.integer({ min: 10, max: 400 }), { nil: null }), { minLength: 1, maxLength: 80 });

describe('where rows begin', () => {
	it('agrees with adding every height from the top', () => {
		fc.assert(
			fc.property(heightsOf, fc.integer({ min: -50, max: 40_000 }), (measured, place) => {
				const rows = new RowHeights(measured.length, 60);
				measured.forEach((height, index) => height !== null && rows.set(index, height));
				const begins: number[] = [0];
				for (const height of measured) begins.push(begins.at(-1)! + (height ?? 60));
				begins.forEach((begin, index) => expect(rows.offset(index)).toBeCloseTo(begin, 6));
				expect(rows.total()).toBeCloseTo(begins.at(-1)!, 6);
				const last = Math.max(0, begins.slice(0, -1).findLastIndex((begin) => begin <= place));
				expect(rows.indexAt(place)).toBe(last);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('takes the last measure of a row, and says whether rows below it moved', () => {
		const rows = new RowHeights(3, 50);
		expect(rows.set(1, 80)).toBe(true);
		expect(rows.set(1, 80.2)).toBe(false);
		expect(rows.set(1, 50)).toBe(true);
		expect(rows.total()).toBe(150);
	});
	it('ignores rows that are not there and heights of nothing', () => {
		const rows = new RowHeights(2, 50);
		expect([rows.set(2, 90), rows.set(-1, 90), rows.set(0, 0), rows.set(0, Number.NaN)]).toEqual([false, false, false, false]);
		expect(rows.total()).toBe(100);
		expect(new RowHeights(0, 50).indexAt(10)).toBe(0);
	});
});
