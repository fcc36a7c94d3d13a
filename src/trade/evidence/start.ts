import { coresOf, type CoreChance } from './cores.ts';
import { enrichmentOf, type Enrichment } from './enrichment.ts';
import { CELLS, type Vector } from './grid.ts';
import type { OwnOdds } from './odds.ts';
import { priorOf, type Prior } from './priors.ts';
import type { Subject } from './subject.ts';

/** A piece before any test, made ready for its findings. */
export type Start = {
	readonly subject: Subject;
	readonly prior: Prior;
	readonly cores: readonly CoreChance[];
	/** What the surface of a layered piece is made to look like: that of the honest piece, or of any standard where there is no mark. */
	readonly imitated: Vector;
	readonly enrichment: Enrichment;
};

export function startOf(subject: Subject, own: OwnOdds = {}): Start {
	const prior = priorOf(subject, own);
	const enrichment = enrichmentOf(subject);
	const shown = prior.bulk[subject.claimed === null ? 'other' : 'honest'];
	return { subject, prior, cores: coresOf(subject), imitated: surfaceOf(shown, enrichment), enrichment };
}

/** The surface of a solid piece: its bulk, each part moved by the enrichment. */
function surfaceOf(bulk: Vector, { first, chances }: Enrichment): Vector {
	const surface = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) {
		const share = bulk[cell]!;
		// what weighs less than this by all its cells together is lost in the last digit
		if (share < 1e-18) continue;
		for (let step = 0; step < chances.length; step += 1) {
			surface[Math.min(CELLS - 1, Math.max(0, cell + first + step))]! += share * chances[step]!;
		}
	}
	return surface;
}
