import type { Core } from './finding.ts';
import { readingLikelihood } from './grid.ts';
import type { Observation } from './observation.ts';

/**
 * A reading of the cut or drilled metal: nothing lies between it and the bulk.
 * formula: bell of the reading about the bulk's fineness, and a small flat part (readingLikelihood), in parts per thousand.
 * rounding: none.
 * source: common practice, no source.
 */
export function coreObservation(finding: Pick<Core, 'perMille' | 'u' | 'gross'>): Observation {
	return { bulk: readingLikelihood(finding.perMille.toNumber(), finding.u, finding.gross) };
}
