import type { NumberProblem } from '$trade/number/field.ts';
import { formatFor, type Format } from './format.ts';
import { bookSentence, type BookProblem } from './sentences/book.ts';
import { evidenceSentence, type OfEvidence } from './sentences/evidence.ts';
import { lotSentence, type LotProblem } from './sentences/lot.ts';
import { massSentence, type MassProblem } from './sentences/mass.ts';
import { metalSentence, type MetalProblem } from './sentences/metal.ts';
import { numberSentence } from './sentences/number.ts';
import { pieceSentence, type OfPiece } from './sentences/piece.ts';
import { moneySentence, type MoneyProblem } from './sentences/price.ts';
import { testerSentence, type OfTester } from './sentences/tester.ts';

/** Everything that a person can cause. */
export type Problem = NumberProblem | MassProblem | MetalProblem | OfPiece | MoneyProblem | LotProblem | BookProblem | OfTester | OfEvidence;

/**
 * The one catalogue: what was found, where, and what to do. Every kind is listed here and sent to the page of the
 * catalogue that speaks of its trade, so a new problem without a sentence does not compile.
 */
export function sentence(problem: Problem, format: Format = formatFor('en')): string {
	switch (problem.kind) {
		case 'number-missing':
		case 'number-unreadable':
		case 'number-ambiguous':
		case 'number-negative':
		case 'number-not-positive':
		case 'number-not-whole':
		case 'number-too-large':
		case 'number-too-many-digits':
			return numberSentence(problem);
		case 'unit-missing':
		case 'unit-unknown':
		case 'unit-ambiguous':
		case 'mass-tare-not-less':
		case 'mass-changed':
		case 'load-under-minimum':
		case 'load-under-fifty-divisions':
		case 'reading-between-divisions':
		case 'scale-name-missing':
		case 'scale-verification-under-division':
			return massSentence(problem, format);
		case 'mark-missing':
		case 'mark-unknown':
		case 'mark-karat-unknown':
		case 'mark-karat-over-24':
		case 'mark-karat-not-gold':
		case 'mark-over-whole':
		case 'mark-figures-unknown':
		case 'mark-metal-ambiguous':
		case 'mark-fineness-missing':
		case 'mark-layer-share-missing':
		case 'mark-two-marks':
		case 'fineness-unit-missing':
		case 'fineness-over-whole':
		case 'alloy-empty':
		case 'alloy-share-negative':
		case 'alloy-metal-twice':
		case 'alloy-not-whole':
		case 'coin-unknown':
		case 'coin-ambiguous':
			return metalSentence(problem);
		case 'piece-count-not-whole':
		case 'piece-no-mass':
		case 'piece-mass-too-many-digits':
		case 'piece-division-not-positive':
		case 'piece-deduction-negative':
		case 'piece-deductions-over-gross':
		case 'piece-metal-twice':
		case 'piece-content-negative':
		case 'piece-contents-over-1000':
		case 'stone-count-not-whole':
		case 'stone-size-not-positive':
		case 'stone-size-too-large':
		case 'stone-gravity-unlikely':
		case 'stone-density-like-metal':
		case 'stone-water-impossible':
			return pieceSentence(problem, format);
		case 'currency-unknown':
		case 'currency-cash-step':
		case 'price-twice':
		case 'price-sheet-empty':
		case 'price-sheet-ahead':
		case 'price-sheet-old':
		case 'offer-no-tiers':
		case 'offer-first-tier':
		case 'offer-tier-twice':
		case 'offer-tier-from':
		case 'offer-share':
		case 'asked-too-fine':
		case 'loss-range-reversed':
		case 'loss-range-outside':
		case 'melt-empty':
			return moneySentence(problem, format);
		case 'line-empty':
		case 'line-too-long':
		case 'line-number':
		case 'line-unit':
		case 'line-mark':
		case 'line-coin':
		case 'line-coin-mass':
		case 'line-mass-missing':
		case 'line-mark-missing':
		case 'line-two-masses':
		case 'line-two-counts':
		case 'line-times-unclear':
		case 'line-each':
		case 'line-carat-unclear':
		case 'line-shares-unclear':
		case 'line-grouping-unclear':
		case 'line-unexplained':
		case 'line-piece':
		case 'table-quote-open':
		case 'table-cell':
		case 'table-cell-unknown':
		case 'table-cell-missing':
		case 'table-too-many-cells':
		case 'sample-impossible':
			return lotSentence(problem, format);
		case 'tester-no-name':
		case 'tester-no-rows':
		case 'tester-u-not-possible':
		case 'tester-bias-over-u':
		case 'tester-gross-too-often':
		case 'odds-outside':
		case 'odds-not-whole':
		case 'prudence-outside':
			return testerSentence(problem, format);
		case 'water-temperature':
		case 'water-mass-not-positive':
		case 'water-no-loss':
		case 'water-density-unlikely':
			return evidenceSentence(problem, format);
		case 'record-shape':
		case 'record-body':
		case 'record-newer':
		case 'chain-gap':
		case 'chain-fork':
		case 'storage-quota':
		case 'storage-failed':
		case 'storage-lost':
		case 'storage-unavailable':
		case 'storage-newer':
		case 'storage-superseded':
		case 'storage-blocked':
		case 'storage-busy':
		case 'storage-changed-since':
		case 'storage-already-saved':
		case 'storage-no-such-record':
		case 'storage-record-differs':
		case 'backup-differs':
		case 'backup-not-ours':
		case 'backup-cancelled':
		case 'backup-cut-short':
		case 'backup-damaged':
		case 'backup-newer':
		case 'backup-not-verified':
			return bookSentence(problem);
	}
}
