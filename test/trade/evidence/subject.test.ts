import { describe, expect, it } from 'vitest';
import { mainMetals } from '../../../src/trade/evidence/subject.ts';
import { familiesOf } from '../../../src/trade/metal/families.ts';

describe('the metals that a piece is bought for', () => {
	it('have families of alloys each', () => {
		for (const metal of mainMetals) expect(familiesOf(metal).length).toBeGreaterThan(0);
	});
});
