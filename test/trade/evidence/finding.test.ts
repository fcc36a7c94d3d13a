import { describe, expect, it } from 'vitest';
import { findingKinds } from '../../../src/trade/evidence/finding.ts';
import { defaultTestCosts } from '../../../src/trade/evidence/test-costs.ts';

describe('kinds of findings', () => {
	it('are a closed list, each with a cost', () => {
		expect([...findingKinds].sort()).toEqual(Object.keys(defaultTestCosts).sort());
	});
});
