import { describe, expect, it } from 'vitest';
import { momentsOf } from '../../../src/trade/evidence/grid.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { stamped14, unmarked } from './some-findings.ts';

describe('a piece before its findings', () => {
	it('has the surface of an honest piece imitated by a layered one', () => {
		const start = startOf(stamped14);
		const [bulk, surface] = [momentsOf(start.prior.bulk.honest), momentsOf(start.imitated)];
		expect(surface.mean - bulk.mean).toBeCloseTo(2, 1);
		expect(surface.sd).toBeCloseTo(Math.hypot(bulk.sd, 3), 1);
	});
	it('imitates any standard where there is no mark', () => {
		expect(momentsOf(startOf(unmarked).imitated).sd).toBeGreaterThan(100);
	});
});
