import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '$trade/number/decimal.ts';
import { parseNumber, type DecimalMark } from '$trade/number/field.ts';
import { numberChoices } from '$ui/number-choices.ts';

function problemOf(text: string, mark: DecimalMark) {
	const result = parseNumber(text, { mark });
	if (result.ok) throw new Error(`"${text}" was read`);
	return result.problem;
}

describe('a number that can be read two ways', () => {
	it('offers both, written as the buyer writes', () => {
		expect(numberChoices(problemOf('1,234', 'dot'), 'dot').map(({ label }) => label)).toEqual(['it is 1.234', 'it is 1,234, in thousands']);
		expect(numberChoices(problemOf('1.234', 'comma'), 'comma').map(({ label }) => label)).toEqual([
			'it is 1,234',
			'it is 1.234, in thousands'
		]);
	});
	it('is settled by either choice, never a thousandfold wrong', () => {
		fc.assert(
			fc.property(
				fc.integer({ min: 1, max: 999 }),
				fc.integer({ min: 0, max: 999 }),
				fc.constantFrom<[DecimalMark, string]>(['dot', ','], ['comma', ','], ['comma', '.']),
				(whole, rest, [mark, sign]) => {
					const digits = String(rest).padStart(3, '0');
					const [small, large] = numberChoices(problemOf(`${whole}${sign}${digits}`, mark), mark);
					const first = parseNumber(small!.text, { mark });
					const second = parseNumber(large!.text, { mark });
					expect(first.ok && first.value.equals(decimal(`${whole}.${digits}`))).toBe(true);
					expect(second.ok && second.value.equals(decimal(`${whole}${digits}`))).toBe(true);
				}
			),
			{ numRuns: 1_000 }
		);
	});
	it('offers nothing for other problems', () => {
		expect(numberChoices(problemOf('12x', 'dot'), 'dot')).toEqual([]);
	});
});
