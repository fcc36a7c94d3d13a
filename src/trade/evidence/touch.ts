import { perMilleNumber } from '../metal/fineness.ts';
import { normalCdf } from '../uncertainty/normal.ts';
import type { Touch } from './finding.ts';
import { CELLS } from './grid.ts';
import type { Observation } from './observation.ts';

/**
 * A streak between two acids.
 * formula: chance to withstand the one acid Φ((fineness − its fineness) / edge) x chance to be attacked by the other
 * Φ((its fineness − fineness) / edge), edge = the uncertainty of the acids; (1 − gross) of it + gross / 4, the four outcomes of two
 * acids being equally likely when it was misread.
 * rounding: none.
 * source: the touchstone resolves 10 to 20 parts per thousand (Corti, Gold Technology, on assay of gold jewellery); edge editable.
 */
export function touchObservation(finding: Pick<Touch, 'how' | 'holds' | 'attackedBy' | 'u' | 'gross'>): Observation {
	const { how, u, gross } = finding;
	const holds = finding.holds === null ? null : perMilleNumber(finding.holds);
	const attackedBy = finding.attackedBy === null ? null : perMilleNumber(finding.attackedBy);
	const values = new Float64Array(CELLS);
	for (let cell = 0; cell < CELLS; cell += 1) {
		const withstands = holds === null ? 1 : normalCdf((cell - holds) / u);
		const attacked = attackedBy === null ? 1 : normalCdf((attackedBy - cell) / u);
		values[cell] = (1 - gross) * withstands * attacked + gross / 4;
	}
	return { streak: { how, values } };
}
