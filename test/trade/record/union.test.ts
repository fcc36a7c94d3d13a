import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { StoredRecord } from '../../../src/trade/record/record.ts';
import { byTime, headsOf, statesOf, unionOf } from '../../../src/trade/record/union.ts';
import { record, threeBooks } from './some-records.ts';

/** A book as one text: every record, and where each subject stands. */
function text(records: Iterable<StoredRecord>): string {
	const all = [...records].sort((a, b) => (a.id < b.id ? -1 : 1));
	const states = [...statesOf(all)].sort(([a], [b]) => (a < b ? -1 : 1));
	return JSON.stringify([all, states.map(([subject, { winner, heads }]) => [subject, winner.id, heads.map(({ id }) => id)])]);
}

const join = (a: Iterable<StoredRecord>, b: Iterable<StoredRecord>) => unionOf(a, b).values();

describe('two books put together', () => {
	it('are the same either way round', () => {
		fc.assert(
			fc.property(threeBooks, ([a, b]) => {
				expect(text(join(a!, b!))).toBe(text(join(b!, a!)));
			}),
			{ numRuns: 2_000 }
		);
	});
	it('are the same however three are grouped', () => {
		fc.assert(
			fc.property(threeBooks, ([a, b, c]) => {
				expect(text(join(join(a!, b!), c!))).toBe(text(join(a!, join(b!, c!))));
			}),
			{ numRuns: 2_000 }
		);
	});
	it('are the same when it is done again', () => {
		fc.assert(
			fc.property(threeBooks, ([a, b]) => {
				const once = [...join(a!, b!)];
				expect(text(join(once, b!))).toBe(text(once));
				expect(text(join(once, once))).toBe(text(once));
			}),
			{ numRuns: 2_000 }
		);
	});
	it('lose no record', () => {
		fc.assert(
			fc.property(threeBooks, ([a, b]) => {
				const both = unionOf(a!, b!);
				for (const each of [...a!, ...b!]) expect(both.get(each.id)).toEqual(each);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('keep the same one of two that claim one id, on every device', () => {
		const one = record({ id: 'r1', hash: 'a'.repeat(64) });
		const other = record({ id: 'r1', hash: 'b'.repeat(64) });
		expect([...join([one], [other])]).toEqual([one]);
		expect([...join([other], [one])]).toEqual([one]);
	});
});

describe('what stands', () => {
	it('is the last of a line of corrections', () => {
		const line = [record({ id: 'r1', at: 9 }), record({ id: 'r2', replaces: 'r1', at: 5 })];
		expect(headsOf(line).map(({ id }) => id)).toEqual(['r2']);
	});
	it('is the later of two that replace the same one, and both are kept', () => {
		const first = record({ id: 'r1' });
		const one = record({ id: 'r2', replaces: 'r1', at: 7 });
		const other = record({ id: 'r3', replaces: 'r1', at: 6 });
		const { winner, heads } = statesOf([first, other, one]).get('lot-1')!;
		expect(winner).toBe(one);
		expect(heads).toEqual([one, other]);
	});
	it('is the larger id when both were made at one time', () => {
		expect([record({ id: 'r2' }), record({ id: 'r1' })].sort(byTime).map(({ id }) => id)).toEqual(['r1', 'r2']);
	});
	it('is one again once a record settles the other', () => {
		const records = [
			record({ id: 'r1' }),
			record({ id: 'r2', replaces: 'r1', at: 7 }),
			record({ id: 'r3', replaces: 'r1', at: 6 }),
			record({ id: 'r4', replaces: 'r2', settles: ['r3'], at: 8 })
		];
		expect(headsOf(records).map(({ id }) => id)).toEqual(['r4']);
	});
	it('is never nothing, even for records that replace one another in a circle', () => {
		const circle = [record({ id: 'r1', replaces: 'r2' }), record({ id: 'r2', replaces: 'r1' })];
		expect(headsOf(circle)).toHaveLength(2);
	});
});
