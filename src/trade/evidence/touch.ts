import { perMilleNumber } from '../metal/fineness.ts';
import { normalCdf } from '../uncertainty/normal.ts';
import type { Touch } from './finding.ts';
import { CELLS } from './grid.ts';
import type { Observation } from './observation.ts';

/**
 * A streak beside two acids, or one.
 * formula: the eye places the streak at fineness ± edge; an acid is made so that its own standard just withstands it, so it attacks below its
 * fineness − edge: chance to lie between the acid that was withstood and the one that attacked = Φ((attacking − edge − fineness) / edge) −
 * Φ((withstood − edge − fineness) / edge); with one acid alone the half that it leaves; (1 − gross) of it + gross
 * shared evenly by the outcomes there are (three with two acids, two with one). Parts per thousand.
 * rounding: none.
 * source: the touchstone resolves 10 to 20 parts per thousand (encyclopaedia article on the touchstone); edge and gross are working defaults.
 */
export function touchObservation(finding: Pick<Touch, 'how' | 'holds' | 'attackedBy' | 'u' | 'gross'>): Observation {
	const { how, u, gross } = finding;
	const holds = finding.holds === null ? null : perMilleNumber(finding.holds) - u;
	const attackedBy = finding.attackedBy === null ? null : perMilleNumber(finding.attackedBy) - u;
	const misread = gross / (holds === null || attackedBy === null ? 2 : 3);
	// so far out the bell adds nothing to one, nor to the chance of a misreading
	const deep = misread > 0.001 ? -9 : -Infinity;
	const share = (z: number) => (z > 9 ? 1 : z < deep ? 0 : normalCdf(z));
	const values = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) {
		const over = attackedBy === null ? 1 : share((attackedBy - cell) / u);
		const under = holds === null ? 0 : share((holds - cell) / u);
		values[cell] = (1 - gross) * Math.max(0, over - under) + misread;
	}
	return { streak: { how, values } };
}
