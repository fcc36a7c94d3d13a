import FFT from 'fft.js';
import { CELLS, type Vector } from '../evidence/grid.ts';
import { assert } from '../number/decimal.ts';

/** So many pieces alike: each of the same net mass, each of its own fineness, of which the same is believed. */
export type Alike = {
	/** Net grams of one of them. */
	readonly grams: number;
	readonly count: number;
	/** The distribution of the bulk over parts per thousand; it sums to one. */
	readonly bulk: Vector;
};

/** What comes on top and is as good as normal: metal that is not in doubt, and errors that many pieces share. Grams. */
export type OnTop = { readonly value: number; readonly u: number };

export type Mixture = {
	readonly mean: number;
	readonly u: number;
	readonly low: number;
	readonly median: number;
	readonly high: number;
};

/** The window reaches so many standard deviations to either side, and as far again as the worst of one single piece. */
const REACH = 12;
/** What a window has to spare on either side, so that nothing at an edge is rounded around to the other end. */
const MARGIN = 1 / 64;
/** Points at first, so many of them from end to end of the interval at least, and the most that are tried. */
const POINTS = 4096;
const POINTS_IN_INTERVAL = 64;
const MOST_POINTS = 2 ** 18;
/** Less than this of a wave makes no difference to any share. */
const NOTHING = 1e-18;

/**
 * The fine mass of pieces of which some may be worth nothing, each with its own distribution.
 * formula: the convolution of all distributions: characteristic functions multiplied, those of pieces alike raised to their number, a bell of u on
 * top; low, median and high leave (1 − coverage) / 2, 1 / 2 and (1 + coverage) / 2 of it below. Within a cell the bulk lies evenly. Grams; null
 * without pieces.
 * rounding: none; the ends to about a thousandth of the width between them.
 * source: JCGM 101:2008, 5.2 (propagation of distributions); convolution theorem.
 */
export function mixture(pieces: readonly Alike[], onTop: OnTop, coverage = 0.9): Mixture | null {
	assert(coverage > 0 && coverage < 1, `a coverage must lie between 0 and 1, not ${coverage}`);
	const held = pieces.filter(({ grams, count }) => grams > 0 && count > 0);
	if (held.length === 0) return null;
	const window = windowOf(held, onTop);
	for (let points = POINTS; ; points *= 2) {
		const step = (window.to - window.from) / points;
		const at = quantiles(convolved(held, onTop.u, points, step), window.from - onTop.value, step);
		const [low, median, high] = [(1 - coverage) / 2, 0.5, (1 + coverage) / 2].map((share) => Math.max(0, at(share) + onTop.value)) as [number, number, number];
		if (high - low >= POINTS_IN_INTERVAL * step || points >= MOST_POINTS) return { mean: window.mean, u: window.u, low, median, high };
	}
}

/** Mean and standard deviation of the whole, and from where to where all of it lies that counts; what is left out would come in at the other end. */
function windowOf(pieces: readonly Alike[], { value, u }: OnTop) {
	let mean = value;
	let variance = u * u;
	const down = { all: 8 * u, one: 0 };
	const up = { all: 8 * u, one: 0 };
	for (const { grams, count, bulk } of pieces) {
		const perMille = grams / 1000;
		const of = spreadOf(bulk);
		mean += count * perMille * of.mean;
		variance += count * perMille * perMille * of.variance;
		for (const [side, reach] of [[down, of.mean - of.first + 0.5], [up, of.last + 0.5 - of.mean]] as const) {
			side.all += count * perMille * reach;
			side.one = Math.max(side.one, perMille * reach);
		}
	}
	const sd = Math.sqrt(variance);
	const below = Math.min(down.all, REACH * sd + down.one);
	const above = Math.min(up.all, REACH * sd + up.one);
	const margin = MARGIN * (below + above);
	return { mean, u: sd, from: mean - below - margin, to: mean + above + margin };
}

/** In parts per thousand; the evenness within a cell adds a twelfth to the variance. */
function spreadOf(bulk: Vector): { readonly mean: number; readonly variance: number; readonly first: number; readonly last: number } {
	let [sum, squares, first, last] = [0, 0, CELLS, 0];
	for (let cell = 0; cell < CELLS; cell += 1) {
		const share = bulk[cell]!;
		if (share < NOTHING) continue;
		sum += share * cell;
		squares += share * cell * cell;
		first = Math.min(first, cell);
		last = cell;
	}
	return { mean: sum, variance: Math.max(0, squares - sum * sum) + 1 / 12, first, last };
}

/** The chance of each multiple of the step, counted around a circle of so many points. */
function convolved(pieces: readonly Alike[], u: number, points: number, step: number): Float64Array {
	const fft = new FFT(points);
	const turn = (2 * Math.PI) / (points * step);
	const whole = new Float64Array(2 * points);
	// beyond this the bell on top has flattened every wave
	const waves = Math.min(points / 2, Math.floor(u === 0 ? Infinity : Math.sqrt(-2 * Math.log(NOTHING)) / (turn * u)));
	for (let k = 0; k <= waves; k += 1) whole[2 * k] = Math.exp(-((turn * k * u) ** 2) / 2);
	const placed = new Float64Array(points);
	const part = new Float64Array(2 * points);
	for (const { grams, count, bulk } of pieces) {
		placed.fill(0);
		place(placed, bulk, grams / 1000 / step);
		fft.realTransform(part, placed);
		for (let k = 0; k <= waves; k += 1) {
			const half = (turn * k * grams) / 2000;
			const even = half === 0 ? 1 : Math.sin(half) / half;
			timesPower(whole, 2 * k, part[2 * k]! * even, part[2 * k + 1]! * even, count);
		}
	}
	fft.completeSpectrum(whole);
	fft.inverseTransform(part, whole);
	return part;
}

/** Each cell on the three points next to it, so that its mean and its variance stay what they are. */
function place(on: Float64Array, bulk: Vector, cellSteps: number): void {
	const points = on.length;
	for (let cell = 0; cell < CELLS; cell += 1) {
		const share = bulk[cell]!;
		if (share < NOTHING) continue;
		const near = Math.round(cell * cellSteps);
		const off = cell * cellSteps - near;
		const at = near % points;
		on[at === 0 ? points - 1 : at - 1]! += (share * (off * off - off)) / 2;
		on[at]! += share * (1 - off * off);
		on[at === points - 1 ? 0 : at + 1]! += (share * (off * off + off)) / 2;
	}
}

/** One complex number of a spectrum times a power of another, by squaring. */
function timesPower(spectrum: Float64Array, at: number, re: number, im: number, power: number): void {
	let [x, y] = [spectrum[at]!, spectrum[at + 1]!];
	for (let left = power; left > 0; left = Math.floor(left / 2)) {
		if (left % 2 === 1) [x, y] = [x * re - y * im, x * im + y * re];
		[re, im] = [re * re - im * im, 2 * re * im];
	}
	spectrum[at] = x;
	spectrum[at + 1] = y;
}

/** Where a share of the chances lies below, read from a point of the circle onward; each chance lies evenly about its point. */
function quantiles(chances: Float64Array, from: number, step: number): (share: number) => number {
	const points = chances.length / 2;
	const first = Math.floor(from / step);
	const below = new Float64Array(points + 1);
	for (let i = 0; i < points; i += 1) {
		const at = (((first + i) % points) + points) % points;
		below[i + 1] = below[i]! + chances[2 * at]!;
	}
	return (share) => {
		let i = 0;
		while (i < points - 1 && below[i + 1]! < share) i += 1;
		return (first + i - 0.5 + (share - below[i]!) / (below[i + 1]! - below[i]!)) * step;
	};
}
