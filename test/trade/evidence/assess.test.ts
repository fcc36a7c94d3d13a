import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { assess, prudentFineness, type Assessment } from '../../../src/trade/evidence/assess.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import type { Finding } from '../../../src/trade/evidence/finding.ts';
import { defaultPriors } from '../../../src/trade/evidence/priors.ts';
import type { Subject } from '../../../src/trade/evidence/subject.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { anyFinding, assay, bar999, chain14, core, karat, magnet, reading, stamped14, sterling, touch, unmarked, water } from './some-findings.ts';

const of = (subject: Subject, ...findings: Finding[]): Assessment => assess(startOf(subject), findings);
const subjects = [stamped14, chain14, bar999, sterling, unmarked];

describe('what is believed of a piece', () => {
	// An untested 14 kt piece: nine in ten lie within the 7 ‰ that the law gives a soldered article, some run under, a few are something else.
	it('puts an untested 14 kt piece a little under its mark, with a tail below', () => {
		const { mean, low, median, high, odds } = of(stamped14);
		expect(mean).toBeGreaterThan(565);
		expect(mean).toBeLessThan(580);
		expect(median).toBeGreaterThan(578);
		expect(low).toBeGreaterThan(550);
		expect(low).toBeLessThan(572);
		expect(high).toBeGreaterThan(583);
		expect(high).toBeLessThan(588);
		expect(odds.layered).toBeCloseTo(0.01, 12);
	});

	// A rub between 14 and 18 kt and a reading of 588 agree: other karats are gone; a layer is only as much less likely as the rub goes through one.
	it('brings acid and fluorescence that agree to 14 kt, the layer left at what they cannot see', () => {
		const { median, odds } = of(stamped14, touch(), reading(588));
		expect(median).toBeGreaterThan(579);
		expect(median).toBeLessThan(584);
		expect(odds.other).toBeLessThan(0.002);
		expect(odds.layered).toBeGreaterThan(0.001);
		expect(odds.layered).toBeLessThan(0.01);
		// a notch goes through most layers
		const notched = of(stamped14, touch({ how: 'notch' }), reading(588)).odds.layered;
		expect(notched).toBeGreaterThan(0.0005);
		expect(notched).toBeLessThan(odds.layered / 3);
	});

	// 8.75 g/cm³ is brass or copper; a solid ring has one chance in two hundred to hold air, and then not a third of its volume.
	it('takes a solid piece of 8.75 g/cm³ for layered, whatever its surface says', () => {
		const { odds, low } = of(stamped14, touch(), reading(588), water(8.75));
		expect(odds.layered).toBeGreaterThan(0.9);
		expect(low).toBeLessThan(10);
	});

	// The same water on a hollow chain is mostly trapped air: one in four weighs too light. Neither cleared nor condemned: cut it.
	it('leaves a hollow chain with the same readings between 10 and 30 %', () => {
		const { odds } = of(chain14, touch(), reading(588), water(8.75));
		expect(odds.layered).toBeGreaterThan(0.1);
		expect(odds.layered).toBeLessThan(0.3);
		const cut = of(chain14, touch(), reading(588), water(8.75), core(580));
		expect(cut.odds.layered).toBeLessThan(0.001);
		const filled = of(chain14, touch(), reading(588), water(8.75), core(12));
		expect(filled.odds.layered).toBeGreaterThan(0.995);
		expect(filled.mean).toBeLessThan(30);
	});

	it('clears a solid piece whose water agrees too', () => {
		expect(of(stamped14, touch(), reading(588), water(13.2)).odds.layered).toBeLessThan(0.0005);
	});

	// Tungsten has the density of gold, and a forger trims it to match: surface and water leave its odds where they were.
	it.each([[998, 19.28], [999, 19.3], [996, 19.25], [1000, 19.2], [997, 19.35]])(
		'leaves tungsten under a 24 kt surface at its prior: reading %d, water %d',
		(read, density) => {
			const before = of(bar999);
			const after = of(bar999, reading(read, { u: 1 }), water(density, 100));
			const ratio = (each: Assessment) => each.cores.find((one) => one.core === 'tungsten')!.odds / each.odds.honest;
			expect(ratio(after) / ratio(before)).toBeCloseTo(1, 9);
			expect(after.odds.layered).toBeGreaterThan(0.014);
			expect(after.odds.layered).toBeLessThan(0.021);
			// what else could lie under it, water has found
			expect(after.cores.find((one) => one.core === 'lead')!.against).toBeLessThan(0.05);
			// and drilling finds tungsten
			expect(of(bar999, reading(998, { u: 1 }), core(998, { u: 2 })).odds.layered).toBeLessThan(0.002);
		}
	);

	it('never lets a surface that agrees with the mark lower the odds of a layer', () => {
		fc.assert(
			fc.property(fc.array(fc.integer({ min: 560, max: 610 }), { minLength: 1, maxLength: 6 }), (reads) => {
				const odds = of(stamped14, ...reads.map((read) => reading(read))).odds;
				// fluorescence tells an honest surface from an imitated one not at all
				const prior = defaultPriors['us-modern'];
				expect(odds.layered / odds.honest / (prior.layered / prior.honest)).toBeGreaterThan(0.999);
				expect(odds.layered / odds.honest / (prior.layered / prior.honest)).toBeLessThan(1.001);
			}),
			{ numRuns: 200 }
		);
	});

	it('lets any number of agreeing streaks lower the odds of a layer by no more than the layers they can go through', () => {
		const prior = defaultPriors['us-modern'];
		const ratio = (...findings: Finding[]) => {
			const { odds } = of(stamped14, ...findings);
			return odds.layered / odds.honest / (prior.layered / prior.honest);
		};
		// each by other acids: streaks of one set say the same again
		const rubs = [1, 2, 5, 20].map((count) => ratio(...Array.from({ length: count }, (_, at) => touch({ tester: `acids ${at}` }))));
		// 0.4 of layers are thin enough for a rub: 0.6 is left, however often it is repeated
		for (const each of rubs) expect(each).toBeGreaterThan(0.55);
		expect(rubs[3]).toBeLessThan(0.65);
		// acids far from the piece on both sides, so that the streak itself is in no doubt
		const notches = ratio(...Array.from({ length: 20 }, (_, at) => touch({ tester: `acids ${at}`, how: 'notch', holds: karat(10) })), touch({ holds: karat(10) }));
		expect(notches).toBeGreaterThan(0.09);
		expect(notches).toBeLessThan(0.12);
	});

	it('does not depend on the order of the findings', () => {
		fc.assert(
			fc.property(
				fc.constantFrom(...subjects),
				fc.array(anyFinding, { minLength: 2, maxLength: 6 }).chain((findings) =>
					fc.tuple(fc.constant(findings), fc.shuffledSubarray(findings, { minLength: findings.length }))
				),
				(subject, [findings, shuffled]) => {
					const [a, b] = [of(subject, ...findings), of(subject, ...shuffled)];
					expect(Math.abs(a.mean - b.mean)).toBeLessThan(1e-7);
					expect(Math.abs(a.low - b.low)).toBeLessThan(1e-6);
					expect(Math.abs(a.logEvidence - b.logEvidence)).toBeLessThan(1e-8);
					for (const id of ['honest', 'under', 'other', 'layered'] as const) expect(Math.abs(a.odds[id] - b.odds[id])).toBeLessThan(1e-9);
				}
			),
			{ numRuns: 1_000 }
		);
	}, 120_000);

	it('stays a distribution whatever is typed, two hundred times over', () => {
		fc.assert(
			fc.property(fc.constantFrom(...subjects), fc.array(anyFinding, { maxLength: 200, size: 'max' }), (subject, findings) => {
				const found = of(subject, ...findings);
				expect(found.bulk.reduce((sum, value) => sum + value, 0)).toBeCloseTo(1, 9);
				expect(found.low).toBeLessThanOrEqual(found.median);
				expect(found.median).toBeLessThanOrEqual(found.high);
				expect(Object.values(found.odds).reduce((sum, value) => sum + value, 0)).toBeCloseTo(1, 9);
				expect(Number.isFinite(found.mean) && found.mean >= 0 && found.mean <= 1000).toBe(true);
			}),
			{ numRuns: 100 }
		);
	}, 120_000);

	it('does not grow surer when one tester says the same again', () => {
		const once = of(stamped14, touch(), reading(600, { u: 5 }), water(13.2));
		const often = of(stamped14, touch(), touch(), reading(600, { u: 5 }), reading(600, { u: 5 }), reading(600, { u: 5 }), water(13.2), water(13.2));
		expect(often.mean).toBeCloseTo(once.mean, 9);
		expect(often.odds.layered).toBeCloseTo(once.odds.layered, 12);
		// another tester's reading is news
		expect(of(stamped14, touch(), reading(600, { u: 5 }), reading(600, { u: 5, tester: 'y' }), water(13.2)).mean).toBeGreaterThan(once.mean);
	});

	it('does the same for silver: nickel silver and tin under a silver surface', () => {
		expect(of(sterling).median).toBeGreaterThan(920);
		const surface = reading(930, { u: 5 }, 'Ag');
		expect(of(sterling, surface).odds.layered).toBeGreaterThan(0.009);
		for (const density of [8.7, 8.5, 7.3]) expect(of(sterling, surface, water(density)).odds.layered).toBeGreaterThan(0.8);
		const found = of(sterling, surface, water(7.3));
		expect([...found.cores].sort((a, b) => b.odds - a.odds)[0]!.core).toBe('tin');
		expect(of(sterling, surface, water(10.36)).odds.layered).toBeLessThan(0.001);
	});

	it('does the same for platinum and palladium', () => {
		const platinum: Subject = { ...sterling, metal: 'Pt', claimed: 950, legal: 950, origin: 'hallmarked' };
		expect(of(platinum, reading(951, { u: 5 }, 'Pt'), water(20.6, 10, { division: decimal('0.001') })).odds.layered).toBeLessThan(0.001);
		expect(of(platinum, reading(951, { u: 5 }, 'Pt'), water(10.45, 10, { division: decimal('0.001') })).odds.layered).toBeGreaterThan(0.7);
		const palladium: Subject = { ...platinum, metal: 'Pd' };
		expect(of(palladium, water(11.8)).median).toBeGreaterThan(945);
		expect(of(palladium, magnet('strong')).odds.layered).toBeGreaterThan(of(palladium).odds.layered * 5);
	});

	it('takes a piece without a mark for whatever its tests say', () => {
		const before = of(unmarked);
		expect(before.odds).toMatchObject({ honest: 0, under: 0 });
		expect(before.high - before.low).toBeGreaterThan(500);
		const after = of(unmarked, touch({ how: 'notch' }), reading(590), core(588));
		expect(after.median).toBeGreaterThan(580);
		expect(after.median).toBeLessThan(592);
		expect(after.odds.layered).toBeLessThan(0.001);
	});

	it('believes a fire assay, as far as its sample is the piece', () => {
		const good = of(stamped14, assay(580));
		expect(good.mean).toBeCloseTo(580, 0);
		expect(good.high - good.low).toBeLessThan(5);
		const badlySampled = of(stamped14, assay(580, { sampleU: 10 }));
		expect(badlySampled.high - badlySampled.low).toBeGreaterThan(good.high - good.low);
	});

	it('gives the fineness that is reached with the chance asked for', () => {
		const found = of(stamped14, touch(), reading(588));
		const prudent = [0.5, 0.8, 0.95, 0.999].map((prudence) => prudentFineness(found, prudence));
		expect([...prudent].sort((a, b) => b - a)).toEqual(prudent);
		const below = found.bulk.reduce((sum, share, cell) => sum + (cell + 0.5 <= prudent[1]! ? share : 0), 0);
		expect(below).toBeLessThanOrEqual(0.2);
		expect(prudent[1]! > 575 && prudent[1]! < found.median).toBe(true);
	});

	it('bears odds of the buyer that rule something out', () => {
		const none = { honest: 1, under: 0, other: 0, layered: 0 };
		const certain = assess(startOf(stamped14, { 'us-modern': none }), [core(12), water(8.6)]);
		expect(certain.odds).toEqual(none);
		expect(certain.cores.every(({ odds, against }) => odds === 0 && against === 1)).toBe(true);
		const filled = assess(startOf(stamped14, { 'us-modern': { honest: 0, under: 0, other: 0, layered: 1 } }), [reading(588), core(580)]);
		expect(filled.odds.layered).toBe(1);
		expect(filled.mean).toBeLessThan(400);
		expect(Number.isFinite(filled.logEvidence)).toBe(true);
	});

	it('says what a finding says nothing of', () => {
		const { logEvidence, odds } = of(stamped14, water(8.75, 2));
		expect(logEvidence).toBe(of(stamped14).logEvidence);
		expect(odds).toEqual(of(stamped14).odds);
	});
});
