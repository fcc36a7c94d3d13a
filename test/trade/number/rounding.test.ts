import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, minus, ratio } from '../../../src/trade/number/exact.ts';
import { round, type Direction } from '../../../src/trade/number/rounding.ts';

const directions: Direction[] = ['down', 'up', 'floor', 'ceiling', 'half-up', 'half-even'];

describe('rounding', () => {
	it.each<[string, Record<Direction, string>]>([
		['2.5', { down: '2', up: '3', floor: '2', ceiling: '3', 'half-up': '3', 'half-even': '2' }],
		['3.5', { down: '3', up: '4', floor: '3', ceiling: '4', 'half-up': '4', 'half-even': '4' }],
		['-2.5', { down: '-2', up: '-3', floor: '-3', ceiling: '-2', 'half-up': '-3', 'half-even': '-2' }],
		['2.4999', { down: '2', up: '3', floor: '2', ceiling: '3', 'half-up': '2', 'half-even': '2' }],
		['7', { down: '7', up: '7', floor: '7', ceiling: '7', 'half-up': '7', 'half-even': '7' }]
	])('%s goes where each direction says', (text, wanted) => {
		for (const direction of directions) expect(round(decimal(text), decimal('1'), direction).toString()).toBe(wanted[direction]);
	});

	it('rounds to steps that are no power of ten', () => {
		expect(round(decimal('401.149'), decimal('0.025'), 'down').toString()).toBe('401.125');
		expect(round(decimal('10.03'), decimal('0.05'), 'half-up').toString()).toBe('10.05');
		expect(round(decimal('1000037.03'), decimal('0.05'), 'half-up').toString()).toBe('1000037.05');
	});

	it('sees the tie that a quotient of 40 digits would hide', () => {
		// one third of 0.03 is exactly one cent; one third of 0.015 is exactly half a cent
		expect(round(ratio(decimal('0.015'), 3n), decimal('0.01'), 'half-up').toString()).toBe('0.01');
		expect(round(ratio(decimal('0.015'), 3n), decimal('0.01'), 'half-even').toString()).toBe('0');
	});

	it('never moves by a whole step, and by no more than half in the half directions', () => {
		fc.assert(
			fc.property(fc.bigInt({ min: -(10n ** 15n), max: 10n ** 15n }), fc.bigInt({ min: 1n, max: 10n ** 6n }), fc.constantFrom(...directions), (n, d, direction) => {
				const value = { n, d };
				const step = decimal('0.01');
				const moved = minus(exact(round(value, step, direction)), value);
				const size = moved.n < 0n ? { n: -moved.n, d: moved.d } : moved;
				expect(compareExact(size, ratio(decimal(direction.startsWith('half') ? '0.005' : '0.01'), 1n))).toBeLessThanOrEqual(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('refuses a step that is not positive', () => {
		expect(() => round(decimal('1'), decimal('0'), 'down')).toThrow(/step must be positive/);
	});
});
