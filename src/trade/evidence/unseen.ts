import type { Assessment } from './assess.ts';
import type { LookAlikeId } from '../metal/look-alikes.ts';

/** Findings that move the odds of a material against the honest piece by less than this factor, up or down, have not seen it. */
const SEEN = 3;
/** Less than one in so many thousand is not worth a word. */
const WORTH_A_WORD = 0.0002;

/**
 * What may lie under the surface and no test done so far can see, the most likely first.
 * formula: materials whose odds against the honest piece the findings have moved by less than a factor of 3, and whose own odds are at least
 * 1 in 5000.
 * rounding: none.
 * source: common practice, no source (the limits are ours).
 */
export function unseenCores(assessment: Pick<Assessment, 'cores'>): LookAlikeId[] {
	return assessment.cores
		.filter(({ against, odds }) => against >= 1 / SEEN && against <= SEEN && odds >= WORTH_A_WORD)
		.sort((a, b) => b.odds - a.odds)
		.map(({ core }) => core);
}
