import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { CELLS, bellPrior, momentsOf, quantileOf, type Vector } from '../../../src/trade/evidence/grid.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { mixture, type Alike } from '../../../src/trade/lot/mixture.ts';
import { bar999, chain14, magnet, reading, seeded, stamped14, sterling } from '../evidence/some-findings.ts';

// a hundred thousand draws of three hundred pieces take a while on a busy machine
vi.setConfig({ testTimeout: 120_000 });

const NOTHING = { value: 0, u: 0 };

/** Cells with chances; the rest is impossible. */
function cells(...parts: readonly (readonly [cell: number, chance: number])[]): Vector {
	const values = new Float64Array(CELLS);
	for (const [cell, chance] of parts) values[cell] = chance;
	return values;
}

/** The second route: every piece drawn by itself, evenly within its cell, and the sums sorted. */
function drawn(pieces: readonly Alike[], { value, u }: { value: number; u: number }, draws: number, random: () => number): Float64Array {
	const running = pieces.map(({ bulk }) => {
		let sum = 0;
		return bulk.map((chance) => (sum += chance));
	});
	const sums = new Float64Array(draws);
	for (let i = 0; i < draws; i += 1) {
		let sum = value + u * Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
		for (const [index, { grams, count }] of pieces.entries()) {
			for (let each = 0; each < count; each += 1) sum += (grams * (cellAt(running[index]!, random()) + random() - 0.5)) / 1000;
		}
		sums[i] = sum;
	}
	return sums.sort();
}

function cellAt(running: Vector, share: number): number {
	let [low, high] = [0, CELLS - 1];
	while (low < high) {
		const middle = (low + high) >> 1;
		if (running[middle]! < share) low = middle + 1;
		else high = middle;
	}
	return low;
}

const at = (sorted: Float64Array, share: number) => sorted[Math.floor(share * sorted.length)]!;
const shareBelow = (sorted: Float64Array, value: number) => sorted.filter((each) => each < value).length / sorted.length;

const untested = assess(startOf(stamped14), []).bulk;
const someBulks = [
	untested,
	assess(startOf(bar999), []).bulk,
	assess(startOf(chain14), [reading(570), magnet('none')]).bulk,
	assess(startOf(sterling), []).bulk
];

describe('the fine mass of pieces of which some may be worth nothing', () => {
	it.each([
		[3, 400_000],
		[30, 100_000],
		[300, 100_000]
	])('%i pieces: the ends are those of %i draws within 1 % of the width, and leave as many below', (many, draws) => {
		const random = seeded(many);
		const pieces = Array.from({ length: many }, (_, index): Alike => ({ grams: 2 + 10 * random(), count: 1, bulk: someBulks[index % someBulks.length]! }));
		const onTop = { value: 0, u: many * 0.01 };
		const found = mixture(pieces, onTop)!;
		const sums = drawn(pieces, onTop, draws, random);
		const [low, high] = [at(sums, 0.05), at(sums, 0.95)];
		expect(Math.abs(found.low - low)).toBeLessThan(0.01 * (high - low));
		expect(Math.abs(found.high - high)).toBeLessThan(0.01 * (high - low));
		// four standard deviations of a share of 5 % among so many draws
		const off = 4 * Math.sqrt((0.05 * 0.95) / draws);
		expect(Math.abs(shareBelow(sums, found.low) - 0.05)).toBeLessThan(off);
		expect(Math.abs(shareBelow(sums, found.high) - 0.95)).toBeLessThan(off);
		expect(Math.abs(shareBelow(sums, found.median) - 0.5)).toBeLessThan(4 * Math.sqrt(0.25 / draws));
	});

	it('where mean ± 1.645 u would be far off: thirty untested pieces', () => {
		const found = mixture([{ grams: 10, count: 30, bulk: untested }], NOTHING)!;
		const width = found.high - found.low;
		expect(found.mean + 1.645 * found.u - found.high).toBeGreaterThan(0.05 * width);
		expect(found.mean - 1.645 * found.u - found.low).toBeGreaterThan(0.05 * width);
	});

	it('two pieces of 10 g, each filled one time in ten, by hand', () => {
		// both filled .01, one .18, none .81; each honest one lies evenly between 5.995 and 6.005 g, each filled one between -.005 and .005
		const bulk = cells([0, 0.1], [600, 0.9]);
		const found = mixture([{ grams: 10, count: 2, bulk }], NOTHING, 0.9)!;
		expect(found.mean).toBeCloseTo(10.8, 12);
		expect(found.u).toBeCloseTo(Math.sqrt(2 * (0.09 * 36 + 1e-4 / 12)), 9);
		// the sum of two even ones is a triangle of half width .01: below 6 − .01 + x lies x² / .0002 of it
		const triangle = (share: number) => (share <= 0.5 ? Math.sqrt(share * 2e-4) : 0.02 - Math.sqrt((1 - share) * 2e-4)) - 0.01;
		expect(found.low).toBeCloseTo(6 + triangle(0.04 / 0.18), 2);
		expect(found.median).toBeCloseTo(12 + triangle(0.31 / 0.81), 2);
		expect(found.high).toBeCloseTo(12 + triangle(0.76 / 0.81), 2);
		// nearly all of it: also the two that are both filled, one time in a hundred
		const most = mixture([{ grams: 10, count: 2, bulk }], NOTHING, 0.986)!;
		expect(most.low).toBeCloseTo(0 + triangle(0.7), 2);
	});

	it('one piece alone has the quantiles of its own bulk', () => {
		for (const bulk of someBulks) {
			// fine gold fills the last cell, which is only half as wide
			if (bulk[CELLS - 1]! > 0.01) continue;
			const found = mixture([{ grams: 1000, count: 1, bulk }], NOTHING)!;
			const width = quantileOf(bulk, 0.95) - quantileOf(bulk, 0.05);
			expect(Math.abs(found.low - quantileOf(bulk, 0.05))).toBeLessThan(0.005 * width);
			expect(Math.abs(found.high - quantileOf(bulk, 0.95))).toBeLessThan(0.005 * width);
		}
	});

	it('a filled piece among many of chance one in two: the binomial, by hand', () => {
		// n = 4 of 10 g: 0, 6, 12, 18, 24 g with chances 1, 4, 6, 4, 1 in 16
		const one = { grams: 10, count: 4, bulk: cells([0, 0.5], [600, 0.5]) };
		for (const [coverage, low, high] of [[0.9, 0, 24], [0.7, 6, 18], [0.2, 12, 12]] as const) {
			const found = mixture([one], NOTHING, coverage)!;
			expect(Math.abs(found.low - low)).toBeLessThan(0.025);
			expect(Math.abs(found.high - high)).toBeLessThan(0.025);
		}
	});

	it('a thousand pieces that are certain are as good as normal', () => {
		const bulk = bellPrior(585, 5);
		const { mean, sd } = momentsOf(bulk);
		const found = mixture([{ grams: 5, count: 1000, bulk }], { value: 100, u: 1 })!;
		const u = Math.hypot(1, (Math.sqrt(1000) * 5 * Math.hypot(sd, Math.sqrt(1 / 12))) / 1000);
		expect(found.u).toBeCloseTo(u, 6);
		expect(found.mean).toBeCloseTo(100 + 5 * mean, 6);
		expect(Math.abs(found.low - (found.mean - 1.6448536 * u))).toBeLessThan(0.002 * u);
		expect(Math.abs(found.high - (found.mean + 1.6448536 * u))).toBeLessThan(0.002 * u);
	});

	it('a bar of a kilogram that is hardly ever filled, among small pieces', () => {
		const bar = { grams: 1000, count: 1, bulk: cells([0, 0.001], [999, 0.999]) };
		const small = { grams: 5, count: 20, bulk: bellPrior(585, 5) };
		const alone = mixture([small], { value: 999, u: 0 })!;
		const both = mixture([bar, small], NOTHING)!;
		expect(both.mean).toBeCloseTo(alone.mean - 0.999, 6);
		// a chance of one in a thousand moves the low end by little, and the bar's cell is a gram wide
		expect(Math.abs(both.low - alone.low)).toBeLessThan(0.6);
		expect(Math.abs(both.high - alone.high)).toBeLessThan(0.6);
	});

	it('has nothing to say of nothing', () => {
		expect(mixture([], { value: 5, u: 1 })).toBeNull();
		expect(mixture([{ grams: 0, count: 3, bulk: untested }], NOTHING)).toBeNull();
		expect(mixture([{ grams: 3, count: 0, bulk: untested }], NOTHING)).toBeNull();
	});

	const some = fc.array(
		fc.record({ grams: fc.double({ min: 0.05, max: 500, noNaN: true }), count: fc.integer({ min: 1, max: 4 }), bulk: fc.constantFrom(...someBulks) }),
		{ minLength: 1, maxLength: 3 }
	);
	const top = fc.record({ value: fc.double({ min: 0, max: 100, noNaN: true }), u: fc.double({ min: 0.01, max: 5, noNaN: true }) });

	it('the order of pieces changes nothing, and the mean is the sum of the means', () => {
		fc.assert(
			fc.property(some, top, (pieces, onTop) => {
				const found = mixture(pieces, onTop)!;
				const other = mixture([...pieces].reverse(), onTop)!;
				const close = (a: number, b: number) => expect(Math.abs(a - b)).toBeLessThan(1e-6 * found.u + 1e-9);
				close(found.low, other.low);
				close(found.median, other.median);
				close(found.high, other.high);
				close(found.mean, other.mean);
				close(found.mean, pieces.reduce((sum, { grams, count, bulk }) => sum + (grams * count * momentsOf(bulk).mean) / 1000, onTop.value));
				expect(found.low <= found.median && found.median <= found.high).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('pieces alike are the same as so many single ones', () => {
		fc.assert(
			fc.property(some, top, (pieces, onTop) => {
				const found = mixture(pieces, onTop)!;
				const single = mixture(pieces.flatMap(({ count, ...one }) => Array.from({ length: count }, () => ({ ...one, count: 1 }))), onTop)!;
				expect(Math.abs(found.low - single.low)).toBeLessThan(1e-6 * found.u + 1e-9);
				expect(Math.abs(found.high - single.high)).toBeLessThan(1e-6 * found.u + 1e-9);
			}),
			{ numRuns: 1_000 }
		);
	});
});
