import { describe, expect, it } from 'vitest';
import { magnetObservation } from '../../../src/trade/evidence/magnet.ts';

const pulls = ['none', 'weak', 'strong'] as const;

describe('a magnet', () => {
	it('is drawn one way or another, whatever the piece is', () => {
		for (const metal of ['Au', 'Pt'] as const) {
			expect(pulls.reduce((sum, pull) => sum + magnetObservation(pull, metal).solid![0]!, 0)).toBeCloseTo(1, 12);
			for (const core of ['brass', 'steel', 'tungsten'] as const) {
				expect(pulls.reduce((sum, pull) => sum + Number(magnetObservation(pull, metal).core!(core)), 0)).toBeCloseTo(1, 12);
			}
		}
	});
	it('finds steel and says nothing of brass', () => {
		const strong = magnetObservation('strong', 'Au');
		expect(Number(strong.core!('steel')) / strong.solid![0]!).toBeGreaterThan(20);
		expect(strong.core!('brass')).toBe(strong.solid![0]);
	});
});
