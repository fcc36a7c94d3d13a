import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chainBreaks } from '../../../src/trade/record/chain.ts';
import { record } from './some-records.ts';

const hash = (n: number) => n.toString(16).padStart(64, '0');
const line = (device: string, from: number, count: number) =>
	Array.from({ length: count }, (_, n) =>
		record({ id: `${device}-${n}`, device, previous: n === 0 ? null : hash(from + n - 1), hash: hash(from + n) })
	);

describe('the chain of a device', () => {
	it('holds for whole books of several devices, in any order', () => {
		fc.assert(
			fc.property(fc.shuffledSubarray([...line('a', 0, 20), ...line('b', 100, 20)], { minLength: 40 }), (records) => {
				expect(chainBreaks(records)).toEqual([]);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('names the record after each one that is missing', () => {
		fc.assert(
			fc.property(fc.integer({ min: 0, max: 18 }), (gone) => {
				const records = line('a', 0, 20).filter((_, n) => n !== gone);
				expect(chainBreaks(records)).toEqual([{ kind: 'chain-gap', device: 'a', record: `a-${gone + 1}`, missing: hash(gone) }]);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('does not take what stands elsewhere for missing', () => {
		const records = line('a', 0, 20).slice(10);
		expect(chainBreaks(records)).toHaveLength(1);
		expect(chainBreaks(records, (known) => known === hash(9))).toEqual([]);
	});
	it('does not take another device’s record for the one before', () => {
		const [first, second] = line('a', 0, 2);
		expect(chainBreaks([{ ...first!, device: 'b' }, second!])).toMatchObject([{ kind: 'chain-gap', record: 'a-1' }]);
	});
	it('names two that follow the same one', () => {
		const records = [...line('a', 0, 3), record({ id: 'a-copy', device: 'a', previous: hash(1), hash: hash(50) })];
		expect(chainBreaks(records)).toEqual([{ kind: 'chain-fork', device: 'a', record: 'a-copy', other: 'a-2' }]);
	});
	it('names two beginnings', () => {
		const records = [...line('a', 0, 1), record({ id: 'a-again', device: 'a', previous: null, hash: hash(50) })];
		expect(chainBreaks(records)).toMatchObject([{ kind: 'chain-fork', record: 'a-again' }]);
	});
});
