import { assess, type Assessment } from './assess.ts';
import { startOf } from './start.ts';
import type { Belief } from './belief.ts';
import type { Finding, ReadBy } from './finding.ts';
import type { OwnOdds } from './odds.ts';
import type { Subject } from './subject.ts';
import { decimal } from '../number/decimal.ts';

/** Who read a finding, and how much of its doubt is that tester's own; null where no tester of the book did. */
function readerOf(finding: Finding): (ReadBy & { readonly tester: string }) | null {
	return 'tester' in finding && finding.tester !== null && finding.bias > 0 ? { ...finding, tester: finding.tester } : null;
}

/** The finding as it would have been typed if the tester read higher by so many parts per thousand. */
function moved(finding: Finding, by: number): Finding {
	const step = decimal(String(by));
	switch (finding.kind) {
		case 'fluorescence':
			return { ...finding, reads: finding.reads.map((read) => ({ ...read, perMille: read.perMille.plus(step) })) };
		case 'core':
		case 'assay':
			return { ...finding, perMille: finding.perMille.plus(step) };
		default:
			return finding;
	}
}

/**
 * What is believed of a piece, with the part of the doubt that its testers share with every other piece they read.
 * formula: contribution of a tester = half of (mean with its readings lowered by its bias − mean with them raised by it), in parts per thousand;
 * own = √(variance of the bulk − sum of squares of the contributions), at least a tenth of the standard deviation.
 * rounding: none.
 * source: JCGM 100:2008, 5.1.3 (sensitivity by moving an input) and F.1.2.3 (an error that several estimates have in common).
 */
export function beliefOf(subject: Subject, findings: readonly Finding[], own: OwnOdds = {}): Belief {
	const start = startOf(subject, own);
	const found = assess(start, findings);
	const shared: Record<string, number> = {};
	const testers = new Map(findings.flatMap((finding) => {
		const reader = readerOf(finding);
		return reader === null ? [] : [[reader.tester, reader.bias] as const];
	}));
	for (const [tester, bias] of testers) {
		const with_ = (by: number) =>
			assess(start, findings.map((finding) => (readerOf(finding)?.tester === tester ? moved(finding, by) : finding))).mean;
		const contribution = (with_(-bias) - with_(bias)) / 2;
		if (contribution !== 0) shared[tester] = contribution;
	}
	return summary(subject, found, shared);
}

function summary(subject: Subject, { mean, sd, low, median, high, odds }: Assessment, shared: Record<string, number>): Belief {
	const common = Object.values(shared).reduce((sum, u) => sum + u * u, 0);
	const own = Math.max(sd / 10, Math.sqrt(Math.max(0, sd * sd - common)));
	return { metal: subject.metal, mean, low, median, high, odds, shared, own };
}
