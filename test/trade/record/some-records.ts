import fc from 'fast-check';
import type { StoredRecord } from '../../../src/trade/record/record.ts';

/** A record with made-up hashes, for tests of what does not look at them. */
export function record(parts: Partial<StoredRecord> & { readonly id: string }): StoredRecord {
	return {
		kind: 'lot',
		version: 1,
		subject: 'lot-1',
		replaces: null,
		settles: [],
		at: 1,
		device: 'phone-a',
		body: { name: parts.id },
		previous: null,
		hash: parts.id.replace(/[^0-9a-f]/g, '').padStart(64, '0'),
		...parts
	};
}

/**
 * Three books that share a past and then went different ways: a pool of records, each made from earlier records of its
 * subject, and three subsets of it.
 */
export const threeBooks: fc.Arbitrary<readonly (readonly StoredRecord[])[]> = fc
	.array(
		fc.record({
			subject: fc.nat(4),
			from: fc.option(fc.nat(40), { freq: 3 }),
			settles: fc.array(fc.nat(40), { maxLength: 2 }),
			at: fc.nat(6),
			gone: fc.boolean(),
			books: fc.integer({ min: 1, max: 7 })
		}),
		{ minLength: 1, maxLength: 40 }
	)
	.map((plans) => {
		const made: { readonly record: StoredRecord; readonly books: number }[] = [];
		for (const [index, plan] of plans.entries()) {
			const subject = `lot-${plan.subject}`;
			const earlier = made.filter((each) => each.record.subject === subject).map((each) => each.record.id);
			const pick = (n: number | null) => (n === null || earlier.length === 0 ? null : earlier[n % earlier.length]!);
			const id = `r${index.toString(16).padStart(3, '0')}`;
			made.push({
				books: plan.books,
				record: record({
					id,
					subject,
					replaces: pick(plan.from),
					settles: [...new Set(plan.settles.map(pick).filter((each) => each !== null))],
					at: plan.at,
					body: plan.gone ? null : { name: id }
				})
			});
		}
		return [1, 2, 4].map((bit) => made.filter(({ books }) => (books & bit) !== 0).map((each) => each.record));
	});
