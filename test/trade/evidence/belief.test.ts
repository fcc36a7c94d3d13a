import { describe, expect, it } from 'vitest';
import { builds, hypotheses } from '../../../src/trade/evidence/belief.ts';
import { defaultPriors } from '../../../src/trade/evidence/priors.ts';

describe('what a piece can be', () => {
	it('is one of a closed list, each with odds before any test', () => {
		expect([...hypotheses].sort()).toEqual(Object.keys(defaultPriors.hallmarked).sort());
		expect(new Set(builds).size).toBe(builds.length);
	});
});
