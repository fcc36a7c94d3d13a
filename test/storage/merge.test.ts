import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { StoredRecord } from '../../src/trade/record/record.ts';
import { hashOf } from '../../src/storage/hash.ts';
import { settlement } from '../../src/storage/settle.ts';
import type { Book } from '../../src/storage/book.ts';
import { contentOf, device, lotChange, opened, pieceChange, problem, purchaseChange, raw, saved, value, type Device } from './some-books.ts';

async function recordsOf(on: Device): Promise<StoredRecord[]> {
	const db = await raw(on);
	const records = await db.records.toArray();
	db.close();
	return records;
}

type Step = { readonly what: 'lot' | 'piece' | 'drop' | 'buy'; readonly which: number; readonly line: number };
const LINES = ['14k ring 3.2g', '925 fork 52.7g x3', '585 chain 8.15g', 'brass fitting 120g'];

/** Goes on with a book: each step makes, changes or removes one of a few things. */
async function goOn(book: Book, on: Device, steps: readonly Step[]): Promise<void> {
	for (const { what, which, line } of steps) {
		on.time += 1 + (line % 3);
		const subject = what === 'lot' || what === 'buy' ? `${what}-${which % 2}` : `p-${which}`;
		const replaces = await book.standing(subject);
		if (what === 'drop' && replaces === null) continue;
		const change =
			what === 'lot'
				? lotChange(subject, { name: `name ${line}` }, replaces)
				: what === 'buy'
					? purchaseChange(subject, 'lot-0', { means: `means ${line}` }, replaces)
					: what === 'drop'
						? ({ kind: 'piece', subject, body: null, replaces } as const)
						: pieceChange(subject, `lot-${which % 2}`, LINES[line]!, which + 1, replaces);
		await saved(book, [change]);
	}
}

const steps = fc.array(
	fc.record({ what: fc.constantFrom('lot', 'piece', 'piece', 'drop', 'buy'), which: fc.nat(3), line: fc.nat(3) }) as fc.Arbitrary<Step>,
	{ maxLength: 6 }
);

describe('merging books through the storage', () => {
	it('gives one state in any order, any number of times, with sums as from scratch', async () => {
		await fc.assert(
			fc.asyncProperty(steps, steps, steps, async (shared, ofA, ofB) => {
				const [onA, onB] = [device(), device()];
				const [a, b] = [await opened(onA), await opened(onB)];
				await goOn(a, onA, shared);
				value(await b.merge(await recordsOf(onA)));
				onB.time = onA.time;
				await goOn(a, onA, ofA);
				await goOn(b, onB, ofB);
				const [fromA, fromB] = [await recordsOf(onA), await recordsOf(onB)];
				value(await a.merge(fromB));
				value(await b.merge(fromA));
				const content = await contentOf(onA);
				expect(await contentOf(onB)).toBe(content);
				value(await a.merge(fromA));
				value(await a.merge(fromB));
				expect(await contentOf(onA)).toBe(content);
				const onC = device();
				const c = await opened(onC);
				for (const record of [...fromB, ...fromA].reverse()) value(await c.merge([record]));
				expect(await contentOf(onC)).toBe(content);
				for (const book of [a, b, c]) {
					const findings = await book.check();
					expect(findings.filter(({ kind }) => kind !== 'check-number-twice')).toEqual([]);
				}
			}),
			{ numRuns: 40 }
		);
	}, 180_000);
});

describe('two phones that changed the same thing', () => {
	async function conflict() {
		const [onA, onB] = [device(), device()];
		const [a, b] = [await opened(onA), await opened(onB)];
		const first = await saved(a, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g')]);
		value(await b.merge(first));
		onA.time += 1_000;
		onB.time += 2_000;
		const [byA] = await saved(a, [pieceChange('p-1', 'lot-1', '14k ring 3.3g', 1, first[1]!.id)]);
		const [byB] = await saved(b, [pieceChange('p-1', 'lot-1', '14k ring 3.4g', 1, first[1]!.id)]);
		value(await a.merge([byB!]));
		return { onA, a, b, byA: byA!, byB: byB! };
	}
	it('are shown it, the later one counts and both are kept', async () => {
		const { a, byA, byB } = await conflict();
		expect(await a.conflicts()).toMatchObject([{ subject: 'p-1', kind: 'piece', winner: byB.id, standing: [{ id: byB.id }, { id: byA.id }] }]);
		expect((await a.lot('lot-1'))!.sums.gross.toFixed()).toBe('3.4');
		expect((await a.pieces(['p-1']))[0]).toMatchObject({ conflict: true, record: byB.id });
		expect((await a.counts()).conflicts).toBe(1);
	});
	it('settle it by a record that names the other, on both phones', async () => {
		const { a, b, byA } = await conflict();
		const [found] = await a.conflicts();
		expect(problem(settlement(found!, 'nothing'))).toEqual({ kind: 'storage-no-such-record', record: 'nothing' });
		const [settled] = await saved(a, [value(settlement(found!, byA.id))]);
		expect(await a.conflicts()).toEqual([]);
		expect((await a.lot('lot-1'))!.sums.gross.toFixed()).toBe('3.3');
		value(await b.merge([byA, settled!]));
		expect(await b.conflicts()).toEqual([]);
		expect((await b.lot('lot-1'))!.sums.gross.toFixed()).toBe('3.3');
		expect(await a.check()).toEqual([]);
	});
	it('may go on with the winner, and what they write then counts even when the other clock runs ahead', async () => {
		const { a, onA, byB } = await conflict();
		onA.time -= 50_000;
		const [mine] = await saved(a, [pieceChange('p-1', 'lot-1', '14k ring 3.5g', 1, byB.id)]);
		expect((await a.pieces(['p-1']))[0]?.record).toBe(mine!.id);
		expect(await a.conflicts()).toHaveLength(1);
		expect(await a.check()).toEqual([]);
	});
});

describe('devices after a merge', () => {
	it('number their purchases with letters of their own', async () => {
		const [onA, onB] = [device(), device()];
		const [a, b] = [await opened(onA), await opened(onB)];
		await saved(a, [purchaseChange('a-1')]);
		value(await b.merge(await recordsOf(onA)));
		await saved(b, [purchaseChange('b-1'), purchaseChange('b-2')]);
		await saved(a, [purchaseChange('a-2')]);
		const numbers = (await b.purchases(9)).map(({ body }) => body?.number).sort();
		expect(numbers).toEqual(['A-0001', 'B-0001', 'B-0002']);
		expect((await a.purchases(9)).map(({ body }) => body?.number).sort()).toEqual(['A-0001', 'A-0002']);
		value(await a.merge(await recordsOf(onB)));
		await saved(a, [purchaseChange('a-3')]);
		expect((await a.purchases(9)).map(({ body }) => body?.number).sort()).toEqual(['A-0001', 'A-0002', 'A-0003', 'B-0001', 'B-0002']);
		expect(await a.check()).toEqual([]);
	});
	it('take another name when a copy of them has gone on', async () => {
		const on = device();
		const book = await opened(on);
		const [first] = await saved(book, [lotChange('lot-1')]);
		// what a copy of this phone wrote after the same record
		const bare = { ...first!, id: `${first!.id}-copy`, subject: 'lot-2', previous: first!.hash };
		const copy = { ...bare, hash: await hashOf(bare) };
		value(await book.merge([copy]));
		const [next] = await saved(book, [lotChange('lot-3')]);
		expect(next!.device).not.toBe(first!.device);
		expect(next!.previous).toBeNull();
		expect(await book.check()).toEqual([]);
	});
	it('refuse another record under the same id', async () => {
		const book = await opened();
		const [first] = await saved(book, [lotChange('lot-1')]);
		const bare = { ...first!, at: first!.at + 1 };
		const result = await book.merge([{ ...bare, hash: await hashOf(bare) }]);
		expect(problem(result)).toEqual({ kind: 'storage-record-differs', record: first!.id });
	});
});
