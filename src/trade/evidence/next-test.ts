import { assessObservations, observeAll, type Assessment, type Start } from './assess.ts';
import { isFineGold } from './cores.ts';
import type { Finding, FindingKind, Pull } from './finding.ts';
import { balanceOf } from './fluorescence.ts';
import { readingLikelihood } from './grid.ts';
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

const between = (low: number, high: number, steps: number) =>
	Array.from({ length: steps }, (_, step) => low + ((step + 0.5) * (high - low)) / steps);

/** The readings that can come, close together where what is believed lies and coarse elsewhere; each with its width. */
function readings({ low, high }: Pick<Assessment, 'low' | 'high'>, u: number): { readonly at: number; readonly width: number }[] {
	const from = Math.max(0, low - 3 * u);
	const to = Math.min(1000, high + 3 * u);
	const spans = [[0, from, 12], [from, to, 36], [to, 1000, 8]] as const;
	return spans.flatMap(([a, b, steps]) => (b - a < 1e-9 ? [] : between(a, b, steps).map((at) => ({ at, width: (b - a) / steps }))));
}

const DENSITIES = between(5, 23, 90);

function outcomesOf(start: Start, now: Assessment, test: Possible, findings: readonly Finding[]): Outcome[] {
	const { subject } = start;
	switch (test.kind) {
		case 'core':
		case 'assay':
			return readings(now, test.u).map(({ at, width }) => ({ observation: { bulk: readingLikelihood(at, test.u, test.gross) }, width }));
		case 'fluorescence':
			return readings(now, test.u).map(({ at, width }) => ({ observation: { surface: readingLikelihood(at, test.u, test.gross) }, width }));
		case 'magnet':
			return (['none', 'weak', 'strong'] as const).map((pull: Pull) => ({ observation: magnetObservation(pull, subject.metal), width: 1 }));
		case 'water': {
			const balance = balanceOf(findings.filter((finding) => finding.kind === 'fluorescence'), subject.metal);
			const of = { metal: subject.metal, build: subject.build, matched: isFineGold(subject) };
			// wider than the reading's own doubt, so that no result falls between two of the grid
			const u = Math.max(test.u, 0.15);
			return DENSITIES.map((density) => ({ observation: densityObservation(density, u, of, balance), width: 18 / DENSITIES.length }));
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
	known: readonly (Observation | null)[] = observeAll(start, findings),
	now: Assessment = assessObservations(start, known)
): TestValue {
	const margin = (mean: number) => (stake.whole * mean) / 1000 - stake.price;
	// bought as things stand, a test saves the losses it would show; left as things stand, it wins the bargains it would show
	const turn = margin(now.mean) > 0 ? -1 : 1;
	let chances = 0;
	let won = 0;
	for (const { observation, width } of outcomesOf(start, now, test, findings)) {
		const result = assessObservations(start, [...known, observation]);
		const chance = width * Math.exp(result.logEvidence - now.logEvidence);
		chances += chance;
		won += chance * Math.max(0, turn * margin(result.mean));
	}
	const gain = won / chances;
	return { test, gain, cost, net: gain - cost };
}

/** The tests that could be done, the one most worth doing first; a core test comes before a fire assay that is worth as much. */
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
		.map((test) => testValue(start, findings, test, stake, costs[test.kind], known, now))
		.sort((a, b) => b.net - a.net);
}
