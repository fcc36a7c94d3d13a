import fc from 'fast-check';
import { expect, it } from 'vitest';
import { joinSums } from '../../../src/trade/lot/join-sums.ts';
import { parseLine } from '../../../src/trade/lot/line.ts';
import { addPieces, emptySums, type Entry, type LotSums } from '../../../src/trade/lot/sums.ts';
import { encodeSums } from '../../../src/trade/lot/sums-stored.ts';

const lines = ['14k chain 12.4g x3', '925 8 dwt', '18k ring 5.20 g - 0.35 g stones', 'brass fitting 120 g', 'dental Au 625 Pd 180 Ag 120 4.12 g', '14k chain 3.1 g'];

const text = (sums: LotSums) => JSON.stringify(encodeSums(sums), (_, value: unknown) => {
	if (typeof value === 'bigint') return `${value}`;
	return value !== null && typeof value === 'object' && !Array.isArray(value)
		? Object.fromEntries(Object.entries(value).filter(([, each]) => each !== 0n).sort(([a], [b]) => (a < b ? -1 : 1)))
		: value;
});

it('gives the sums of all pieces together, however they are spread over lots', () => {
	const spread = fc.array(fc.tuple(fc.constantFrom(...lines), fc.nat(2)), { maxLength: 12 });
	fc.assert(
		fc.property(spread, (chosen) => {
			const lots: Entry[][] = [[], [], []];
			chosen.forEach(([line, lot], index) => {
				const piece = parseLine(line);
				if (!piece.ok) throw new Error(line);
				lots[lot]!.push({ piece: piece.value, key: `p${index}` });
			});
			const joined = joinSums(lots.map((entries) => addPieces(emptySums(), entries)));
			expect(text(joined)).toBe(text(addPieces(emptySums(), lots.flat())));
		}),
		{ numRuns: 1_000 }
	);
});

it('is empty of nothing', () => {
	expect(joinSums([])).toEqual(emptySums());
});
