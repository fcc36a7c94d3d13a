import { describe, expect, it } from 'vitest';
import { fromPerMille } from '$trade/metal/fineness.ts';
import { decimal } from '$trade/number/decimal.ts';
import { exactToText } from '$trade/number/exact.ts';
import type { Piece } from '$trade/piece/piece.ts';
import { defaultSettings } from '$trade/record/kinds/settings.ts';
import {
	markedFineness, possibleTests, refreshed, stakeOf, stillTaken, takenAt, testValues, viewOf, withEvidence, type View
} from '../../src/routes/piece-evidence.ts';
import { core, reading, touch, water } from '../trade/evidence/some-findings.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';

const settings = defaultSettings();
const chain = pieceOf('14k hollow chain 20.00 g');
const doubted = withEvidence(chain, { findings: [touch(), reading(588), water(8.75)] }, settings);
const sheet = { currency: 'USD' as const, quotes: [{ metal: 'Au' as const, amount: decimal('100'), per: 'g' as const }], at: 1, source: '' };

function seen(piece: Piece): View {
	const view = viewOf(piece, settings);
	if (typeof view === 'string') throw new Error(view);
	return view;
}

describe('evidence on the page of a piece', () => {
	it('keeps the belief that is shown', () => {
		const { found, clashes, tested } = seen(doubted);
		const belief = doubted.evidence!.belief!;
		expect([belief.mean, belief.odds.layered]).toEqual([found.mean, found.odds.layered]);
		expect(clashes.length).toBe(3);
		expect(tested).toBe(true);
		expect(seen(chain).tested).toBe(false);
		expect(viewOf(pieceOf('brass fitting 120 g'), settings)).toBe('no-precious-metal');
	});

	it('leaves nothing behind when the last finding is taken off', () => {
		expect(withEvidence(doubted, { findings: [] }, settings)).toEqual(chain);
		expect(withEvidence(chain, { build: 'solid' }, settings).evidence).toEqual({ build: 'solid', findings: [], belief: null, taking: null });
	});

	it('takes the piece at a fineness, with the findings that this rests on', () => {
		const taken = takenAt(doubted, 'Au', fromPerMille(decimal('470')), settings);
		expect(exactToText(taken.contents[0]!.taken.perMille)).toBe('470');
		expect(taken.evidence!.taking!.rests).toEqual(doubted.evidence!.findings.map(({ id }) => id));
		expect(stillTaken(taken)).toBe(true);
		expect(stillTaken(doubted)).toBe(false);
		// with one of them gone, the decision rests on something that is not there
		expect(withEvidence(taken, { findings: taken.evidence!.findings.slice(1) }, settings).evidence!.taking).toBeNull();
		// with one more, it still stands on what it stood on
		expect(withEvidence(taken, { findings: [...taken.evidence!.findings, core(12)] }, settings).evidence!.taking).not.toBeNull();
		expect(exactToText(markedFineness(taken, 'Au')!.perMille)).toBe('1750/3');
	});

	it('makes the belief again when the mark was changed by hand, and drops an overruled decision', () => {
		const taken = takenAt(doubted, 'Au', fromPerMille(decimal('470')), settings);
		const marked = pieceOf('18k hollow chain 20.00 g');
		const changed = refreshed({ ...taken, mark: marked.mark, contents: marked.contents }, settings);
		expect(changed.evidence!.taking).toBeNull();
		expect(changed.evidence!.belief!.mean).not.toBe(taken.evidence!.belief!.mean);
		expect(refreshed(chain, settings)).toBe(chain);
	});

	it('puts at stake the piece as pure metal, and the offer for what it is taken at', () => {
		// 20 g at 100 a gram; 14/24 of it at 85 %
		const stake = stakeOf(doubted, 'Au', sheet, settings)!;
		expect(stake.whole).toBeCloseTo(2_000, 9);
		expect(stake.price).toBeCloseTo(2_000 * (14 / 24) * 0.85, 9);
		expect(stakeOf(doubted, 'Au', null, settings)).toBeNull();
		expect(stakeOf(doubted, 'Ag', sheet, settings)).toBeNull();
	});

	it('offers the tests that can be made, water only where the scale can tell', () => {
		const kinds = (piece: Piece) => possibleTests(seen(piece), piece, []).map(({ kind }) => kind);
		expect(kinds(chain)).toEqual(['magnet', 'touch', 'touch', 'fluorescence', 'water', 'core', 'assay']);
		expect(kinds(pieceOf('14k ring 2.00 g'))).not.toContain('water');
		const rows = [{ metal: 'Au' as const, colour: 'any' as const, perMille: 585, u: 3 }];
		const own = { id: 'good', name: 'Bench reader', kind: 'fluorescence' as const, rows, bias: 1, gross: 0.01, checkedOn: null };
		expect(possibleTests(seen(chain), chain, [own]).find(({ kind }) => kind === 'fluorescence')).toMatchObject({ u: 3, gross: 0.01 });
	});

	it('says to cut the doubtful chain', () => {
		const [best] = testValues(seen(doubted), doubted, [], stakeOf(doubted, 'Au', sheet, settings)!, settings);
		expect(best!.test.kind).toBe('core');
		expect(best!.net).toBeGreaterThan(0);
	});
});
