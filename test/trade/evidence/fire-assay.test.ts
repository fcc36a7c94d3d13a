import { describe, expect, it } from 'vitest';
import { assayObservation } from '../../../src/trade/evidence/fire-assay.ts';
import { readingLikelihood } from '../../../src/trade/evidence/grid.ts';
import { assay } from './some-findings.ts';

describe('a fire assay', () => {
	it('is of the bulk, with the doubt of its sample', () => {
		expect(assayObservation(assay(580, { u: 3, sampleU: 4 })).bulk).toEqual(readingLikelihood(580, 5, 0.002));
	});
});
