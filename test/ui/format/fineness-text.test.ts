import fc from 'fast-check';
import { expect, it } from 'vitest';
import { compareFineness, fromKarat, fromPerMille, parseFineness } from '$trade/metal/fineness.ts';
import { decimal } from '$trade/number/decimal.ts';
import { finenessText } from '$ui/format/fineness-text.ts';

it('writes parts per thousand where they come out even, else karats', () => {
	expect(finenessText(fromPerMille(decimal('585')))).toBe('585');
	expect(finenessText(fromPerMille(decimal('999.95')))).toBe('999.95');
	expect(finenessText(fromKarat(decimal('18')))).toBe('750');
	expect(finenessText(fromKarat(decimal('14')))).toBe('14 kt');
	expect(finenessText({ perMille: { n: 1000n, d: 7n } })).toBe('142.86');
});

it('reads back as the same fineness', () => {
	const fineness = fc.oneof(
		fc.integer({ min: 1000, max: 10_000 }).map((tenths) => fromPerMille(decimal(String(tenths)).div(10))),
		fc.integer({ min: 1, max: 240 }).map((tenths) => fromKarat(decimal(String(tenths)).div(10)))
	);
	fc.assert(
		fc.property(fineness, (value) => {
			const text = finenessText(value);
			const read = parseFineness(/kt$/.test(text) ? text : `${text} ‰`);
			expect(read.ok && compareFineness(read.value, value)).toBe(0);
		}),
		{ numRuns: 1_000 }
	);
});
