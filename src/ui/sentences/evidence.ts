import type { WaterProblem } from '$trade/evidence/water-weighing.ts';
import type { Format } from '../format.ts';

/** What is wrong with what was read off in a test. */
export type OfEvidence = WaterProblem;

export function evidenceSentence(problem: OfEvidence, format: Format): string {
	const figure = (value: number): string => format.estimate(value, 3);
	switch (problem.kind) {
		case 'water-temperature':
			return `Water of ${figure(problem.celsius)}\u00a0°C is not in the table: it goes from ${figure(problem.least)} to ${figure(problem.most)}\u00a0°C.`;
		case 'water-mass-not-positive':
			return 'Type what the scale showed in air and in water, each above nothing, and the step of its display.';
		case 'water-no-loss':
			return (
				'In water it weighs no less than in air. Perhaps the two readings are exchanged, or the gain of a beaker was typed for a piece that hung: ' +
				'choose the way it was weighed.'
			);
		case 'water-density-unlikely':
			return (
				`That would be ${figure(problem.density)}\u00a0g/cm³, and nothing that is bought lies outside ${figure(problem.least)} to ` +
				`${figure(problem.most)}. Look at both readings and at how it was weighed.`
			);
	}
}
