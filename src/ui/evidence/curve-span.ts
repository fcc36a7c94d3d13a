import type { Assessment } from '$trade/evidence/assess.ts';
import { quantileOf } from '$trade/evidence/grid.ts';

/** What part of 0 to 1000 ‰ a picture of the bulk shows: all that is likely at all, and the mark; everything, when that is most of it anyway. */
export function curveSpan(found: Pick<Assessment, 'bulk'>, claimed: number | null): { readonly low: number; readonly high: number } {
	const ends = [quantileOf(found.bulk, 0.004), quantileOf(found.bulk, 0.996), ...(claimed === null ? [] : [claimed])];
	const [least, most] = [Math.min(...ends), Math.max(...ends)];
	const room = Math.max(8, (most - least) * 0.15);
	const [low, high] = [Math.max(0, Math.floor(least - room)), Math.min(1000, Math.ceil(most + room))];
	return high - low > 450 ? { low: 0, high: 1000 } : { low, high };
}

type Line<T> = { readonly at: number; readonly label: string; readonly tone: T };
export type Placed<T> = Line<T> & { readonly x: number; readonly y: number; readonly anchor: 'start' | 'end' };

/** Labels over their lines, one under the other, each turned to the side that has room. */
export function placedLabels<T>(lines: readonly Line<T>[], x: (at: number) => number, width: number): Placed<T>[] {
	return [...lines]
		.sort((a, b) => a.at - b.at)
		.map((line, index): Placed<T> => {
			const left = x(line.at) > width / 2;
			return { ...line, x: x(line.at) + (left ? -4 : 4), y: 11 + 14 * index, anchor: left ? 'end' : 'start' };
		});
}
