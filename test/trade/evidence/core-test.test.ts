import { describe, expect, it } from 'vitest';
import { coreObservation } from '../../../src/trade/evidence/core-test.ts';
import { readingLikelihood } from '../../../src/trade/evidence/grid.ts';
import { core } from './some-findings.ts';

describe('a core test', () => {
	it('is of the bulk, and of nothing else', () => {
		const seen = coreObservation(core(580, { u: 8 }));
		expect(seen.bulk).toEqual(readingLikelihood(580, 8, 0.005));
		expect(seen.surface ?? seen.solid ?? seen.core ?? seen.streak).toBeUndefined();
	});
});
