import { describe, expect, it } from 'vitest';
import { assess } from '$trade/evidence/assess.ts';
import { swing, atOdds } from '$trade/evidence/stake.ts';
import { startOf } from '$trade/evidence/start.ts';
import { decimal } from '$trade/number/decimal.ts';
import type { Piece } from '$trade/piece/piece.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import { subjectOf } from '$trade/piece/subject.ts';
import { defaultSettings } from '$trade/record/kinds/settings.ts';
import { sentOf } from '../../src/routes/bag-sent.ts';
import { weighBag, type Job, type Sent } from '../../src/routes/bag-weighed.ts';
import { withEvidence } from '../../src/routes/piece-evidence.ts';
import { assay, core, magnet, reading, touch, water } from '../trade/evidence/some-findings.ts';
import { pieceOf } from '../trade/piece/some-pieces.ts';

const settings = defaultSettings();
const sheet = { currency: 'USD' as const, quotes: [{ metal: 'Au' as const, amount: decimal('100'), per: 'g' as const }], at: 1, source: '' };
const SHARE = decimal('0.8');
const chain = pieceOf('14k hollow chain 20.00 g');

function sent(key: string, piece: Piece): Sent {
	const ready = sentOf(key, piece, sheet, settings, SHARE);
	if (ready === null) throw new Error(`${key} is not sent`);
	return ready;
}
function subject(piece: Piece): Subject {
	const found = subjectOf(piece);
	if (typeof found === 'string') throw new Error(found);
	return found;
}
/** As the browser hands it to a worker: copied, with everything lost that is not a plain value. */
const across = (pieces: readonly Sent[]): Job => structuredClone({ pieces, own: settings.priors });

describe('a bag on its way to the worker and back', () => {
	it('costs the share of the whole lot, and pieces weighed together an equal part each', () => {
		// 20 g at 100 a gram; 14/24 taken, 80 % paid
		const one = sent('one', chain);
		expect(one.stake.whole).toBeCloseTo(2_000, 9);
		expect(one.stake.price).toBeCloseTo((2_000 * 14 * 0.8) / 24, 9);
		const four = sent('four', pieceOf('14k hollow chain 20.00 g x4'));
		expect([four.count, four.stake.whole, four.stake.price]).toEqual([4, expect.closeTo(500, 9), expect.closeTo(one.stake.price / 4, 9)]);
	});
	it('leaves apart what no test speaks of and what has no price', () => {
		for (const line of ['brass fitting 120 g', '1/20 12k GF chain 12.1 g', '925 spoon 30 g']) expect(sentOf('x', pieceOf(line), sheet, settings, SHARE)).toBeNull();
	});

	it('is estimated as on the page of each piece, its findings read back from plain values', () => {
		const sets = [[touch(), reading(588), water(8.75)], [magnet('weak')], [core(12)], [assay(583)]];
		const pieces = sets.map((findings) => withEvidence(chain, { findings }, settings));
		const { pieces: weighed, before } = weighBag(across(pieces.map((piece, at) => sent(`p${at}`, piece))), () => undefined);
		const start = startOf(subject(chain), settings.priors);
		expect(before).toBeCloseTo(start.prior.odds.layered, 12);
		for (const [at, findings] of sets.entries()) {
			const found = assess(start, findings);
			const { odds, cases, stake, opened } = weighed[at]!;
			expect(odds).toBe(found.odds.layered);
			expect(opened).toBe(at >= 2);
			// put together again, the parts are what the whole is, but for the layer's bulk that tests have narrowed
			const [together, whole] = [atOdds(cases, odds), swing(found.bulk, stake)];
			if (!opened) expect(Math.abs(together.lost / whole.lost - 1)).toBeLessThan(0.02);
		}
	});

	it('gives what was not tested and claims the same the same answer as each by itself', () => {
		const lines = ['585 chain 20 g', '585 chain 21 g', '14k ring 2.1 g', '585 chain 20 g x3', '18k ring 5 g'];
		const job = across(lines.map((line, at) => sent(`p${at}`, pieceOf(line))));
		const all = weighBag(job, () => undefined).pieces;
		for (const [at, piece] of job.pieces.entries()) expect(all[at]).toEqual(weighBag({ ...job, pieces: [piece] }, () => undefined).pieces[0]);
		expect(all[0]!.odds).toBe(all[1]!.odds);
		expect(all[1]!.cases.layered.lost).toBeGreaterThan(all[0]!.cases.layered.lost);
	});

	it('counts the rate before any test over pieces, not entries', () => {
		const [chains, ring] = [sent('chains', pieceOf('585 chain 60 g x3')), sent('ring', pieceOf('14k ring 2.1 g'))];
		const rate = (one: Sent) => startOf(one.subject, settings.priors).prior.odds.layered;
		expect(rate(chains)).not.toBe(rate(ring));
		expect(weighBag(across([chains, ring]), () => undefined).before).toBeCloseTo((3 * rate(chains) + rate(ring)) / 4, 12);
		expect(weighBag(across([]), () => undefined)).toEqual({ pieces: [], before: 0 });
	});

	it('says how far it is, and weighs ten thousand that nobody tested in a moment', () => {
		const kinds = ['585 chain 20 g', '14k ring 2.1 g', '18k ring 5 g'].map((line) => sent('', pieceOf(line)));
		const said: number[] = [];
		const job = across(Array.from({ length: 10_000 }, (_, at) => ({ ...kinds[at % 3]!, key: `p${at}` })));
		const began = performance.now();
		expect(weighBag(job, (done) => said.push(done)).pieces.length).toBe(10_000);
		expect(performance.now() - began).toBeLessThan(5_000);
		expect(said.length).toBe(40);
		expect(said.every((done, at) => done === 250 * (at + 1))).toBe(true);
	});
});
