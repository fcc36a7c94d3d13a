import type { Assay } from './finding.ts';
import { readingLikelihood } from './grid.ts';
import type { Observation } from './observation.ts';

/**
 * A fire assay of a sample: of the bulk, as far as the sample is the piece.
 * formula: bell about the bulk's fineness with u = √(u of the assay² + u of the sample²), and a small flat part, in parts per thousand.
 * rounding: none.
 * source: ISO 11426 (gold by cupellation) for the method; ISO 11596 (sampling) for why the sample has its own doubt; JCGM 100:2008, 5.1.2.
 */
export function assayObservation(finding: Pick<Assay, 'perMille' | 'u' | 'sampleU' | 'gross'>): Observation {
	return { bulk: readingLikelihood(finding.perMille.toNumber(), Math.hypot(finding.u, finding.sampleU), finding.gross) };
}
