import { assess, type Assessment } from '$trade/evidence/assess.ts';
import type { Finding } from '$trade/evidence/finding.ts';
import type { Stake } from '$trade/evidence/next-test.ts';
import type { OwnOdds } from '$trade/evidence/odds.ts';
import { casesOf } from '$trade/evidence/stake.ts';
import { startOf, type Start } from '$trade/evidence/start.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import type { BagPiece } from '$trade/lot/bag.ts';
import { assert } from '$trade/number/decimal.ts';
import type { Json } from '$trade/record/json.ts';
import { evidence as evidenceShape } from '$trade/record/kinds/evidence.ts';
import { readAs } from '$trade/record/shape.ts';

/** An entry as it goes to the worker: nothing but plain values, because a decimal does not survive the way. The stake is of each of its pieces. */
export type Sent = {
	readonly key: string;
	readonly count: number;
	readonly subject: Subject;
	readonly evidence: Json | null;
	readonly stake: Stake;
};
export type Job = { readonly pieces: readonly Sent[]; readonly own: OwnOdds };

/** What comes back: how far it is, or all entries weighed and the mean odds of a piece before any test. */
export type Answer = { readonly done: number } | { readonly pieces: readonly BagPiece[]; readonly before: number };

/** How often the worker says how far it is. */
const STEP = 250;

function readFindings(evidence: Json): readonly Finding[] {
	const read = readAs(evidenceShape, evidence);
	assert(read.ok, 'evidence that was just written does not read back');
	return read.value.findings;
}

type Known = { readonly start: Start; readonly found: Assessment };

function estimate(subject: Subject, findings: readonly Finding[], own: OwnOdds): Known {
	const start = startOf(subject, own);
	return { start, found: assess(start, findings) };
}

/** The joint estimate of every entry of a bag; what was not tested and claims the same is estimated once. */
export function weighBag({ pieces, own }: Job, ondone: (done: number) => void): Extract<Answer, { before: number }> {
	const untested = new Map<string, Known>();
	const weighed: BagPiece[] = [];
	let before = 0;
	let all = 0;
	for (const { key, count, subject, evidence, stake } of pieces) {
		const findings = evidence === null ? [] : readFindings(evidence);
		const name = JSON.stringify(subject);
		const { start, found } = (findings.length === 0 ? untested.get(name) : undefined) ?? estimate(subject, findings, own);
		if (findings.length === 0) untested.set(name, { start, found });
		before += count * start.prior.odds.layered;
		all += count;
		weighed.push({
			key,
			count,
			odds: found.odds.layered,
			cases: casesOf(found.bulk, found.odds.layered, start.prior.bulk.layered, stake),
			stake,
			opened: findings.some(({ kind }) => kind === 'core' || kind === 'assay')
		});
		if (weighed.length % STEP === 0) ondone(weighed.length);
	}
	return { pieces: weighed, before: all === 0 ? 0 : before / all };
}
