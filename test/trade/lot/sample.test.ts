import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareExact, exact, exactToText, minus, ratio, sum, toNumber, type Exact } from '../../../src/trade/number/exact.ts';
import { chanceOf, chanceOfAtMost, chanceOfFinding, chanceOfMissing, testsNeeded, type SampleProblem } from '../../../src/trade/lot/sample.ts';
import type { Result } from '../../../src/trade/number/result.ts';

function value<T>(result: Result<T, SampleProblem>): T {
	if (!result.ok) throw new Error(result.problem.kind);
	return result.value;
}
const bag = fc.integer({ min: 1, max: 60 }).chain((pieces) =>
	fc.record({ pieces: fc.constant(pieces), bad: fc.integer({ min: 0, max: pieces }), tested: fc.integer({ min: 0, max: pieces }) })
);

describe('the sample of a bag', () => {
	it('misses both of two bad in ten with three tests seven times in fifteen', () => {
		expect(exactToText(value(chanceOfMissing(10, 2, 3)))).toBe('7/15');
		expect(exactToText(value(chanceOfFinding(10, 2, 3)))).toBe('8/15');
	});

	it('missing is the product of missing once after another', () => {
		fc.assert(
			fc.property(bag, ({ pieces, bad, tested }) => {
				let [n, d] = [1n, 1n];
				for (let i = 0; i < tested; i += 1) {
					n *= BigInt(Math.max(0, pieces - bad - i));
					d *= BigInt(pieces - i);
				}
				expect(compareExact(value(chanceOfMissing(pieces, bad, tested)), { n, d })).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('all chances together are one', () => {
		fc.assert(
			fc.property(bag, ({ pieces, bad, tested }) => {
				const all: Exact[] = [];
				for (let found = 0; found <= tested; found += 1) all.push(value(chanceOf(found, pieces, bad, tested)));
				expect(compareExact(sum(all), exact(1n))).toBe(0);
				expect(compareExact(value(chanceOfAtMost(tested, pieces, bad, tested)), exact(1n))).toBe(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('the tests needed are the fewest that bring the risk down', () => {
		fc.assert(
			fc.property(bag, fc.integer({ min: 0, max: 100 }), ({ pieces, bad }, percent) => {
				fc.pre(bad > 0);
				const risk = ratio(BigInt(percent), 100n);
				const needed = value(testsNeeded(pieces, bad, risk));
				expect(compareExact(value(chanceOfMissing(pieces, bad, needed)), risk) <= 0).toBe(true);
				if (needed > 0) expect(compareExact(value(chanceOfMissing(pieces, bad, needed - 1)), risk) > 0).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('is exact for a large bag', () => {
		const missing = value(chanceOfMissing(10_000, 100, 300));
		expect(toNumber(missing)).toBeCloseTo(0.0471, 3);
		expect(toNumber(minus(exact(1n), missing))).toBeCloseTo(1 - toNumber(missing), 12);
	});

	it.each([[10, 11, 3], [10, 2, 11], [10, -1, 3], [1.5, 1, 1], [NaN, 1, 1], [1e9, 1, 1]])('%d pieces, %d bad, %d tested: refused', (pieces, bad, tested) => {
		expect(chanceOfMissing(pieces, bad, tested)).toEqual({ ok: false, problem: { kind: 'sample-impossible', pieces, bad, tested } });
		expect(chanceOfAtMost(0, pieces, bad, tested).ok).toBe(false);
	});
	it('needs something bad to look for', () => expect(testsNeeded(10, 0, ratio(1n, 10n)).ok).toBe(false));
});
