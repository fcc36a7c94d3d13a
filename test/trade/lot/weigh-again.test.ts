import { describe, expect, it } from 'vitest';
import { weighAgain } from '../../../src/trade/lot/weigh-again.ts';
import type { Scale } from '../../../src/trade/mass/scale.ts';
import { weighing, type Weighing, type WeighingOptions } from '../../../src/trade/mass/weighing.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';

const w = (typed: string, options: WeighingOptions = {}): Weighing => {
	const read = weighing(typed, 'g', options);
	if (!read.ok) throw new Error(typed);
	return read.value;
};
const scale: Scale = {
	id: 'counter', name: 'Counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null
};

describe('a lot weighed again at payment', () => {
	it('allows three standard uncertainties: ten readings and one more of 0.01 g, by hand', () => {
		// each reading d/√12; eleven independent ones: 3 × 0.01 × √(11/12) = 0.028723 g
		const entries = Array.from({ length: 10 }, () => w('5.00'));
		const near = weighAgain(entries, w('50.02'));
		expect(near.ok && near.value.allowed).toBeCloseTo(3 * 0.01 * Math.sqrt(11 / 12), 12);
		const far = weighAgain(entries, w('50.03'));
		expect(!far.ok && far.problem.kind).toBe('mass-changed');
		expect(!far.ok && far.problem.difference.grams.toString()).toBe('0.03');
	});

	it('names a piece that has gone', () => {
		const gone = weighAgain([w('12.40'), w('3.11')], w('12.40'));
		expect(!gone.ok && gone.problem).toMatchObject({ kind: 'mass-changed' });
		expect(!gone.ok && gone.problem.difference.grams.toString()).toBe('-3.11');
	});

	it('counts a verified scale that read everything as one error, which cancels where the loads agree', () => {
		const once = weighAgain([w('20.00', { scale })], w('20.00', { scale }), [scale]);
		const other = weighAgain([w('20.00')], w('20.00', { scale }), [scale]);
		expect(once.ok && other.ok && once.value.allowed < other.value.allowed).toBe(true);
	});
});
