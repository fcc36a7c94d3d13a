import { assess } from '$trade/evidence/assess.ts';
import type { Evidence } from '$trade/evidence/belief.ts';
import type { Finding } from '$trade/evidence/finding.ts';
import type { Stake } from '$trade/evidence/next-test.ts';
import type { OwnOdds } from '$trade/evidence/odds.ts';
import { casesOf } from '$trade/evidence/stake.ts';
import { startOf } from '$trade/evidence/start.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import type { BagPiece } from '$trade/lot/bag.ts';
import type { Json } from '$trade/record/json.ts';
import { evidence as evidenceShape } from '$trade/record/kinds/evidence.ts';
import { readAs } from '$trade/record/shape.ts';

/** A piece as it goes to the worker: nothing but plain values, because a decimal does not survive the way. */
export type Sent = { readonly key: string; readonly subject: Subject; readonly evidence: Json | null; readonly stake: Stake };
export type Job = { readonly pieces: readonly Sent[]; readonly own: OwnOdds };

/** What comes back: how far it is, or all pieces weighed and the mean of their odds before any test. */
export type Answer = { readonly done: number } | { readonly pieces: readonly BagPiece[]; readonly before: number };

/** How often the worker says how far it is. */
const STEP = 250;

export const writeEvidence = (evidence: Evidence | undefined): Json | null => (evidence === undefined ? null : evidenceShape.write(evidence));

function readFindings(evidence: Json): readonly Finding[] {
	const read = readAs(evidenceShape, evidence);
	return read.ok ? read.value.findings : [];
}

/** The joint estimate of every piece of a bag; what was not tested and claims the same is estimated once. */
export function weighBag({ pieces, own }: Job, ondone: (done: number) => void): Extract<Answer, { before: number }> {
	const known = new Map<string, ReturnType<typeof assess>>();
	const weighed: BagPiece[] = [];
	let before = 0;
	for (const { key, subject, evidence, stake } of pieces) {
		const findings = evidence === null ? [] : readFindings(evidence);
		const start = startOf(subject, own);
		const alike = findings.length === 0 ? JSON.stringify(subject) : '';
		const found = known.get(alike) ?? assess(start, findings);
		if (alike !== '') known.set(alike, found);
		before += start.prior.odds.layered;
		weighed.push({
			key,
			odds: found.odds.layered,
			cases: casesOf(found.bulk, found.odds.layered, start.prior.bulk.layered, stake),
			stake,
			opened: findings.some(({ kind }) => kind === 'core' || kind === 'assay')
		});
		if (weighed.length % STEP === 0) ondone(weighed.length);
	}
	return { pieces: weighed, before: pieces.length === 0 ? 0 : before / pieces.length };
}
