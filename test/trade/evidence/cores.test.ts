import { describe, expect, it } from 'vitest';
import { coresOf, isFineGold, strata } from '../../../src/trade/evidence/cores.ts';
import { mainMetals } from '../../../src/trade/evidence/subject.ts';

describe('what may lie under a layer', () => {
	it('has chances that sum to one', () => {
		for (const metal of mainMetals) {
			for (const claimed of [null, 585, 999]) {
				expect(coresOf({ metal, claimed }).reduce((sum, { chance }) => sum + chance, 0)).toBeCloseTo(1, 12);
			}
		}
		expect(strata.reduce((sum, { chance }) => sum + chance, 0)).toBeCloseTo(1, 12);
	});
	it('is tungsten before anything else under fine gold, brass under 14 kt, nickel silver under silver', () => {
		const first = (metal: 'Au' | 'Ag', claimed: number) => [...coresOf({ metal, claimed })].sort((a, b) => b.chance - a.chance)[0]!.core;
		expect([first('Au', 999), first('Au', 585), first('Ag', 925)]).toEqual(['tungsten', 'brass', 'nickel-silver']);
		expect([isFineGold({ metal: 'Au', claimed: 985 }), isFineGold({ metal: 'Ag', claimed: 999 }), isFineGold({ metal: 'Au', claimed: null })]).toEqual([true, false, false]);
	});
});
