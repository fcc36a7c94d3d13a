import { CELLS, type Vector } from '../../../src/trade/evidence/grid.ts';
import type { Alike, OnTop } from '../../../src/trade/lot/mixture.ts';
import { seeded } from './lot.ts';

type Aliases = { readonly keep: Float64Array; readonly other: Int32Array };

/** Walker's tables: one cell of a distribution for one random number, however many cells there are. */
function aliases(bulk: Vector): Aliases {
	const keep = bulk.map((share) => share * CELLS);
	const other = new Int32Array(CELLS);
	const [small, large]: [number[], number[]] = [[], []];
	keep.forEach((share, cell) => (share < 1 ? small : large).push(cell));
	while (small.length > 0 && large.length > 0) {
		const less = small.pop()!;
		const more = large.at(-1)!;
		other[less] = more;
		keep[more]! -= 1 - keep[less]!;
		if (keep[more]! < 1) small.push(large.pop()!);
	}
	// what is left is one but for its last digit
	for (const cell of [...small, ...large]) keep[cell] = 1;
	return { keep, other };
}

export type Drawn = { readonly low: number; readonly high: number; readonly shareBelow: (grams: number) => number };

/** The plain way to the interval of a lot: draw every piece many times over, sort the sums, read off the ends. */
export function drawnInterval(pieces: readonly Alike[], { value, u }: OnTop, draws: number, seed: number): Drawn {
	const random = seeded(seed);
	const made = new Map<Vector, Aliases>();
	const each = pieces.map(({ grams, bulk }) => {
		const found = made.get(bulk) ?? aliases(bulk);
		made.set(bulk, found);
		return { perMille: grams / 1000, ...found };
	});
	const sums = new Float64Array(draws);
	for (let i = 0; i < draws; i += 1) {
		let sum = value + u * Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
		for (const { perMille, keep, other } of each) {
			const at = random() * CELLS;
			const cell = Math.floor(at);
			const within = at - cell;
			// evenly within the cell: what decided the cell is even within its own share of it
			const share = keep[cell]!;
			sum += perMille * (within < share ? cell + within / share - 0.5 : other[cell]! + (within - share) / (1 - share) - 0.5);
		}
		sums[i] = sum;
	}
	sums.sort();
	return {
		low: sums[Math.floor(0.05 * draws)]!,
		high: sums[Math.floor(0.95 * draws)]!,
		shareBelow: (grams) => sums.reduce((count, sum) => count + (sum < grams ? 1 : 0), 0) / draws
	};
}
