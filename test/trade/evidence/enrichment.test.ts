import { describe, expect, it } from 'vitest';
import { enrichmentOf } from '../../../src/trade/evidence/enrichment.ts';

const mean = (of: ReturnType<typeof enrichmentOf>) => of.chances.reduce((sum, chance, step) => sum + chance * (of.first + step), 0);

describe('the surface against the bulk', () => {
	it('is richer by a little in 14 kt, by more in sterling, by nothing in fine gold', () => {
		expect(mean(enrichmentOf({ metal: 'Au', claimed: 585 }))).toBeCloseTo(2, 1);
		expect(mean(enrichmentOf({ metal: 'Ag', claimed: 925 }))).toBeCloseTo(10, 1);
		expect(mean(enrichmentOf({ metal: 'Au', claimed: 999 }))).toBeCloseTo(0, 1);
		expect(mean(enrichmentOf({ metal: 'Au', claimed: null }))).toBeCloseTo(2, 1);
	});
	it('has chances that sum to one', () => {
		for (const metal of ['Au', 'Ag', 'Pt', 'Pd'] as const) {
			expect(enrichmentOf({ metal, claimed: 375 }).chances.reduce((sum, chance) => sum + chance, 0)).toBeCloseTo(1, 12);
		}
	});
});
