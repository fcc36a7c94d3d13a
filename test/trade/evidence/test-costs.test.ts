import { describe, expect, it } from 'vitest';
import { findingKinds } from '../../../src/trade/evidence/finding.ts';
import { defaultTestCosts, testCost } from '../../../src/trade/evidence/test-costs.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

describe('what a test costs', () => {
	it('is a working default for every test, the quick ones cheapest', () => {
		const costs = findingKinds.map((kind) => testCost(kind));
		expect(costs.every((cost) => cost.gt(0))).toBe(true);
		const quickest = [...findingKinds].sort((a, b) => defaultTestCosts[a].comparedTo(defaultTestCosts[b]));
		expect([quickest[0], quickest.at(-2), quickest.at(-1)]).toEqual(['magnet', 'core', 'assay']);
	});
	it('is what the buyer says, nothing too', () => {
		expect(testCost('core', { core: decimal('7.5') }).toFixed()).toBe('7.5');
		expect(testCost('touch', { touch: decimal('0') }).toFixed()).toBe('0');
		expect(testCost('water', { core: decimal('7.5') }).toFixed()).toBe('2');
	});
});
