import { describe, expect, it } from 'vitest';
import { addPieces, emptySums } from '$trade/lot/sums.ts';
import { compareExact, exact, times } from '$trade/number/exact.ts';
import { valueOf } from '$trade/price/value.ts';
import { encodeBody } from '$trade/record/kind.ts';
import type { Change } from '$storage/append.ts';
import { demoChanges } from '../../src/routes/demo.ts';
import { isDemoSubject } from '../../src/routes/demo-subject.ts';

const NOW = Date.UTC(2026, 2, 30, 0, 40);

function ofKind<K extends Change['kind']>(changes: readonly Change[], kind: K) {
	return changes.filter((change): change is Extract<Change, { kind: K }> => change.kind === kind);
}

const plain = (changes: readonly Change[]) =>
	changes.map((change) => JSON.stringify([change.kind, change.subject, change.body === null ? null : encodeBody(change.kind, change.body)]));

describe('the demo book', () => {
	const changes = demoChanges(NOW);
	const purchases = ofKind(changes, 'purchase');
	const pieces = ofKind(changes, 'piece');

	it('is the same whenever it is made at the same moment', () => {
		expect(plain(demoChanges(NOW))).toEqual(plain(changes));
		expect(plain(demoChanges(NOW + 86_400_000))).not.toEqual(plain(changes));
	});
	it('tells of the past only, oldest first, at any hour of the day', () => {
		for (let hour = 0; hour < 24; hour += 1) {
			const now = NOW + hour * 3_600_000;
			const made = demoChanges(now);
			const sheets = ofKind(made, 'prices').map(({ body }) => body!.at);
			const bought = ofKind(made, 'purchase').map(({ body }) => body!.boughtAt);
			for (const times of [sheets, bought]) {
				expect(times).toEqual([...times].sort((a, b) => a - b));
				expect(times.at(-1)!).toBeLessThan(now);
			}
		}
	});
	it('has eleven bought lots, one on the counter, and metals of every sort', () => {
		expect(purchases.length).toBe(11);
		const lots = ofKind(changes, 'lot');
		expect(lots.filter(({ body }) => body!.state === 'open').map(({ subject }) => subject)).toEqual(['demo-lot-open']);
		const metals = new Set(pieces.flatMap(({ body }) => body!.piece.contents.map(({ metal }) => metal)));
		expect([...metals].sort()).toEqual(['Ag', 'Au', 'Cu', 'Pd', 'Pt', 'Zn']);
		expect(changes.map(({ subject }) => subject).filter((subject) => subject !== 'settings' && !isDemoSubject(subject))).toEqual([]);
	});
	it('has one piece on the counter that its tests disagree about, for whoever looks to cut', () => {
		const [only, ...others] = pieces.filter(({ body }) => body!.piece.evidence !== undefined);
		expect(others).toEqual([]);
		const { findings, belief, taking } = only!.body!.piece.evidence!;
		expect(findings.map(({ kind }) => kind)).toEqual(['touch', 'fluorescence', 'water']);
		expect(findings.every(({ at }) => at < NOW)).toBe(true);
		expect(belief!.odds.layered).toBeGreaterThan(0.1);
		expect(belief!.odds.layered).toBeLessThan(0.4);
		expect(taking).toBeNull();
		const testers = ofKind(changes, 'tester').map(({ subject }) => subject);
		expect(findings.flatMap((finding) => ('tester' in finding ? [finding.tester] : [])).sort()).toEqual([...testers].sort());
	});
	it('keeps in each purchase what its pieces add up to, and pays no less than the offer and no more than the value', () => {
		for (const { body } of purchases) {
			const own = pieces.filter((piece) => piece.body!.lot === body!.lot);
			const sums = addPieces(emptySums(), own.map((piece) => ({ piece: piece.body!.piece, key: piece.subject })));
			expect([body!.entries, body!.pieces]).toEqual([sums.entries, sums.pieces]);
			expect(body!.totals.gross.equals(sums.gross) && body!.totals.net.equals(sums.net)).toBe(true);
			expect(Object.keys(body!.totals.fine).sort()).toEqual(Object.keys(sums.fine).sort());
			expect(compareExact(body!.totals.value, valueOf(sums.fine, body!.prices).total)).toBe(0);
			const offered = times(body!.totals.value, exact(body!.share));
			expect(compareExact(exact(body!.offer.amount), offered)).toBeLessThanOrEqual(0);
			expect(body!.paid.amount.gte(body!.offer.amount)).toBe(true);
			expect(compareExact(exact(body!.paid.amount), body!.totals.value)).toBe(-1);
		}
	});
});
