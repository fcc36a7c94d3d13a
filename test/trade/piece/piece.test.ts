import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exact, exactToText, plus, EXACT_ZERO } from '../../../src/trade/number/exact.ts';
import type { Scale } from '../../../src/trade/mass/scale.ts';
import { massOf } from '../../../src/trade/mass/weighing.ts';
import { fromPerMille } from '../../../src/trade/metal/fineness.ts';
import { checkPiece, estimate, fineOf, netMass, netOf } from '../../../src/trade/piece/piece.ts';
import { anyPiece, pieceOf } from './some-pieces.ts';

const scale: Scale = {
	id: 'counter', name: 'Counter', unit: 'g', division: decimal('0.01'), verification: decimal('0.1'), accuracyClass: 'II', checkedOn: null
};

describe('a piece', () => {
	it('net mass is gross less every deduction, and metal in is never more than net', () => {
		fc.assert(
			fc.property(anyPiece, (piece) => {
				let off = EXACT_ZERO;
				for (const { mass } of piece.deductions) off = plus(off, exact(mass.grams));
				const net = netOf(piece).grams;
				expect(exactToText(plus(exact(net), off))).toBe(exactToText(exact(massOf(piece.weighing).grams)));
				let fine = EXACT_ZERO;
				for (const { grams } of fineOf(piece)) fine = plus(fine, grams);
				expect(fine.n * exact(net).d <= exact(net).n * fine.d).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('several metals at once', () => {
		const fine = fineOf(pieceOf('dental Au 625 Pd 180 Ag 120 4.12 g')).map(({ metal, grams }) => [metal, exactToText(grams)]);
		expect(fine).toEqual([['Au', '103/40'], ['Pd', '927/1250'], ['Ag', '309/625']]);
	});

	it('refuses what cannot be', () => {
		const piece = pieceOf('14k ring 5.20 g -0.35 g stones');
		const kind = (change: Partial<typeof piece>) => {
			const result = checkPiece({ ...piece, ...change });
			return result.ok ? 'taken' : result.problem.kind;
		};
		expect(kind({})).toBe('taken');
		expect([0, -1, 1.5, NaN, Infinity, 2_000_000].map((count) => kind({ count }))).toEqual(Array(6).fill('piece-count-not-whole'));
		expect(kind({ weighing: { ...piece.weighing, tare: decimal('5.20') } })).toBe('piece-no-mass');
		expect(kind({ weighing: { ...piece.weighing, reading: decimal('0.1234567890123456') } })).toBe('piece-mass-too-many-digits');
		expect(kind({ deductions: [{ what: 'dirt', mass: { grams: decimal('5.21') }, u: 0, how: '' }] })).toBe('piece-deductions-over-gross');
		expect(kind({ deductions: [{ what: 'dirt', mass: { grams: decimal('5.20') }, u: 0, how: '' }] })).toBe('taken');
		const gold = { metal: 'Au', taken: fromPerMille(decimal('585')) } as const;
		expect(kind({ contents: [gold, { metal: 'Ag', taken: fromPerMille(decimal('415.01')) }] })).toBe('piece-contents-over-1000');
		expect(kind({ contents: [gold, { metal: 'Ag', taken: fromPerMille(decimal('415')) }] })).toBe('taken');
		expect(kind({ contents: [gold, gold] })).toBe('piece-metal-twice');
	});

	it('an unchecked piece is our own mistake', () => {
		expect(() => netOf({ ...pieceOf('14k ring 5 g'), count: 0 })).toThrow('piece-count-not-whole');
		expect(netMass(pieceOf('14k ring 5 g')).ok).toBe(true);
	});
});

describe('the estimate of a piece', () => {
	it('has every source, each of the size its formula says', () => {
		const typed = pieceOf('14k chain 24.00 g x4 -2 g stones');
		const piece = { ...typed, weighing: { ...typed.weighing, scale: scale.id } };
		const { net, fine } = estimate(piece, 'k', scale);
		const share = 14 / 24;
		expect(net.value).toBe(22);
		expect(fine.Au?.value).toBeCloseTo(22 * share, 12);
		// division 0.01 g over root 12; class II, e 0.1 g: 0.05 g over root 3; 10 % of 2 g; 0.6 % and 1.1 %/√4 of the fine mass
		const expected = {
			'reading:k': (0.01 / Math.sqrt(12)) * share,
			'scale:counter': (0.05 / Math.sqrt(3)) * share,
			'deduction:k': -0.2 * share,
			'class:14 kt|chain|us-modern': 22 * share * 0.006,
			'piece:k': (22 * share * 0.011) / 2
		};
		expect(Object.keys(fine.Au!.contributions).sort()).toEqual(Object.keys(expected).sort());
		for (const [source, u] of Object.entries(expected)) expect(fine.Au!.contributions[source]).toBeCloseTo(u, 12);
	});

	it('uses a scale only for what was weighed on it', () => {
		const { net } = estimate(pieceOf('14k chain 24.00 g'), 'k', scale);
		expect(Object.keys(net.contributions)).not.toContain('scale:counter');
	});

	it('follows the belief where findings made one', () => {
		const typed = pieceOf('14k chain 24.00 g');
		const belief = {
			metal: 'Au' as const, mean: 500, low: 4, median: 580, high: 585, odds: { honest: 0.8, under: 0, other: 0, layered: 0.2 },
			shared: { reader: -3 }, own: 200
		};
		const { fine } = estimate({ ...typed, evidence: { build: null, findings: [], belief, taking: null } }, 'k');
		expect(fine.Au?.value).toBeCloseTo(12, 12);
		const expected = { 'reading:k': (0.01 / Math.sqrt(12)) * 0.5, 'tester:reader': -0.072, 'piece:k': 4.8 };
		expect(Object.keys(fine.Au!.contributions).sort()).toEqual([...Object.keys(expected), 'deduction:k'].sort());
		for (const [source, u] of Object.entries(expected)) expect(fine.Au!.contributions[source]).toBeCloseTo(u, 12);
	});

	it('takes the buyer\'s own spreads', () => {
		const own = { 'us-modern': { shared: 0, own: 0.02 } };
		const { fine } = estimate(pieceOf('14k chain 24.00 g'), 'k', undefined, own);
		expect(fine.Au?.contributions['piece:k']).toBeCloseTo(24 * (14 / 24) * 0.02, 12);
		expect(fine.Au?.contributions['class:14 kt|chain|us-modern']).toBe(0);
	});
});
