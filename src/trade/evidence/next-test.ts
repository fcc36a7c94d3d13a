import { normalCdf } from '../uncertainty/normal.ts';
import { assessObservations, type Assessment } from './assess.ts';
import { balanceIn, observeAll } from './observe.ts';
import type { Start } from './start.ts';
import { isFineGold } from './cores.ts';
import type { Finding, FindingKind, Pull } from './finding.ts';
import { CELLS, quantileOf, type Vector } from './grid.ts';
import { magnetObservation } from './magnet.ts';
import type { Observation } from './observation.ts';
import { touchObservation } from './touch.ts';
import { densityObservation } from './water-reading.ts';

/** A test that could be done now, with how well it would be read. */
export type Possible =
	| { readonly kind: 'touch'; readonly how: 'rub' | 'notch'; readonly u: number; readonly gross: number }
	| { readonly kind: 'fluorescence' | 'core' | 'assay'; readonly u: number; readonly gross: number }
	| { readonly kind: 'water'; readonly u: number }
	| { readonly kind: 'magnet' };

/** What the piece would bring if it were pure metal, and what is about to be paid for it, in one currency. */
export type Stake = { readonly whole: number; readonly price: number };

export type TestValue = {
	readonly test: Possible;
	/** What knowing the result before buying is worth on average, before its cost. */
	readonly gain: number;
	readonly cost: number;
	/** gain − cost. */
	readonly net: number;
};

/** One result that a test may have, and how likely it is before the test is done: its width when results are continuous. */
type Outcome = { readonly observation: Observation; readonly width: number };

/** Shares of what is believed at which the readings that can come are parted, and some fineness that a core or a lower karat would show. */
const SHARES = [0.01, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.95, 0.99];
const MARKS = [0, 50, 150, 300, 400, 500, 650, 800, 950, 1000];

/** The readings that can come, in bands: how likely each band is for every fineness. All bands together are certain. */
function bands(now: Pick<Assessment, 'bulk'>, { u, gross }: { readonly u: number; readonly gross: number }, breakEven: number): Vector[] {
	const edges = [...new Set([...MARKS, ...SHARES.map((share) => quantileOf(now.bulk, share)), Math.min(1000, Math.max(0, breakEven))])].sort((a, b) => a - b);
	return edges.slice(1).map((high, index) => {
		const low = edges[index]!;
		const values = new Float64Array(CELLS);
		for (let cell = 0; cell < CELLS; cell += 1) {
			const above = high === 1000 ? 1 : normalCdf((high - cell) / u);
			const below = low === 0 ? 0 : normalCdf((low - cell) / u);
			values[cell] = (1 - gross) * (above - below) + (gross * (high - low)) / 1000;
		}
		return values;
	});
}

const STEPS = 60;
const LEAST_DENSITY = 5;
const STEP = (23 - LEAST_DENSITY) / STEPS;
const DENSITIES = Array.from({ length: STEPS }, (_, step) => LEAST_DENSITY + (step + 0.5) * STEP);

function outcomesOf(start: Start, now: Assessment, test: Possible, findings: readonly Finding[], breakEven: number): Outcome[] {
	const { subject } = start;
	switch (test.kind) {
		case 'core':
		case 'assay':
			return bands(now, test, breakEven).map((bulk) => ({ observation: { bulk }, width: 1 }));
		case 'fluorescence':
			return bands(now, test, breakEven).map((surface) => ({ observation: { surface }, width: 1 }));
		case 'magnet':
			return (['none', 'weak', 'strong'] as const).map((pull: Pull) => ({ observation: magnetObservation(pull, subject.metal), width: 1 }));
		case 'water': {
			const balance = balanceIn(start, findings);
			const of = { metal: subject.metal, build: subject.build, matched: isFineGold(subject) };
			// wider than the reading's own doubt, so that no result falls between two of the grid
			const u = Math.max(test.u, STEP / 2);
			return DENSITIES.map((density) => ({ observation: densityObservation(density, u, of, balance), width: STEP }));
		}
		case 'touch': {
			// two acids about the mark: attacked by both, between them, withstands both
			const { how, u, gross } = test;
			const mark = subject.claimed ?? now.median;
			const [under, over] = [mark - 40, mark + 60].map((perMille) => ({ perMille: { n: BigInt(Math.max(1, Math.round(perMille))), d: 1n } }));
			const seen = [{ holds: null, attackedBy: under! }, { holds: under!, attackedBy: over! }, { holds: over!, attackedBy: null }];
			return seen.map((each) => ({ observation: touchObservation({ how, u, gross, ...each }), width: 1 }));
		}
	}
}

/**
 * What a test is worth before the piece is bought at the price on the table: on a bad result one leaves it.
 * formula: margin = whole x mean fineness / 1000 − price; bought as things stand (margin now above zero): gain = Σ over results of chance x
 * max(0, −margin after it), the losses one would leave; else Σ chance x max(0, margin after it); net = gain − cost. The chance of a
 * result = likelihood of the findings with it / of the findings. The same as expected best decision after − before.
 * rounding: none.
 * source: expected value of sample information (Raiffa and Schlaifer, Applied Statistical Decision Theory, 1961), from memory.
 */
export function testValue(
	start: Start,
	findings: readonly Finding[],
	test: Possible,
	stake: Stake,
	cost: number,
	known: readonly Observation[] = observeAll(start, findings),
	now: Assessment = assessObservations(start, known)
): TestValue {
	const margin = (mean: number) => (stake.whole * mean) / 1000 - stake.price;
	// bought as things stand, a test saves the losses it would show; left as things stand, it wins the bargains it would show
	const turn = margin(now.mean) > 0 ? -1 : 1;
	let chances = 0;
	let won = 0;
	for (const { observation, width } of outcomesOf(start, now, test, findings, (1000 * stake.price) / stake.whole)) {
		const result = assessObservations(start, [...known, observation]);
		const chance = width * Math.exp(result.logEvidence - now.logEvidence);
		chances += chance;
		won += chance * Math.max(0, turn * margin(result.mean));
	}
	const gain = won / chances;
	return { test, gain, cost, net: gain - cost };
}

/** Whether a test was done: made again by the same tester it says the same again. */
function done(test: Possible, findings: readonly Finding[]): boolean {
	return findings.some((finding) => finding.kind === test.kind && (finding.kind !== 'touch' || test.kind !== 'touch' || finding.how === test.how));
}

/** The tests that were not done yet, the one most worth doing first. */
export function nextTests(
	start: Start,
	findings: readonly Finding[],
	tests: readonly Possible[],
	stake: Stake,
	costs: Readonly<Record<FindingKind, number>>
): TestValue[] {
	const known = observeAll(start, findings);
	const now = assessObservations(start, known);
	return tests
		.filter((test) => !done(test, findings))
		.map((test) => testValue(start, findings, test, stake, costs[test.kind], known, now))
		.sort((a, b) => b.net - a.net);
}
