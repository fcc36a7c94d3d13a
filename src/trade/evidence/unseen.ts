import type { Assessment } from './assess.ts';
import type { LookAlikeId } from '../metal/look-alikes.ts';

/** Findings that leave a material at least so likely against the honest piece have not seen it. */
const SEEN = 1 / 3;
/** Less than one in so many thousand is not worth a word. */
const WORTH_A_WORD = 0.0002;

/**
 * What may lie under the surface and no test done so far can see, the most likely first.
 * formula: materials whose odds against the honest piece the findings have not brought under a third of what they were, and whose own odds are
 * at least 1 in 5000.
 * rounding: none.
 * source: common practice, no source (the limits are ours).
 */
export function unseenCores(assessment: Pick<Assessment, 'cores'>): LookAlikeId[] {
	return assessment.cores
		.filter(({ against, odds }) => against >= SEEN && odds >= WORTH_A_WORD)
		.sort((a, b) => b.odds - a.odds)
		.map(({ core }) => core);
}
