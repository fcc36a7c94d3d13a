import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { builds, type Evidence } from '../../../../src/trade/evidence/belief.ts';
import type {
	Assay, CoinWeight, Core, Finding, Fluorescence, Magnet, Touch, Water
} from '../../../../src/trade/evidence/finding.ts';
import type { MetalId } from '../../../../src/trade/metal/metals.ts';
import { decimal } from '../../../../src/trade/number/decimal.ts';
import { ratio } from '../../../../src/trade/number/exact.ts';
import { canonicalJson, type Json } from '../../../../src/trade/record/json.ts';
import { evidence } from '../../../../src/trade/record/kinds/evidence.ts';
import { readAs } from '../../../../src/trade/record/shape.ts';

const holding = (findings: readonly Json[], belief: Json = null) => readAs(evidence, { build: null, findings, belief, taking: null });
const magnet = (at: number): Json => ({ kind: 'magnet', id: `m${at}`, at, pull: 'none' });
const readBy = { id: 'f1', at: 1, tester: null, u: 6, bias: 2, gross: 0.03 };
const core = (perMille: Json, more: { readonly [key: string]: Json } = {}): Json => ({ ...readBy, kind: 'core', perMille, ...more });

const figure = fc.integer({ min: 0, max: 1_000_000 }).map((n) => decimal(String(n)).div(1000));
const above = fc.integer({ min: 1, max: 1_000_000 }).map((n) => decimal(String(n)).div(1000));
const acid = fc.option(fc.integer({ min: 0, max: 24 }).map((n) => ({ perMille: ratio(decimal(String(n * 1000)), decimal('24')) })));
const chance = fc.double({ min: 0, max: 1, noNaN: true });
const read = {
	at: fc.integer({ min: 0, max: 8_000_000_000_000 }),
	tester: fc.option(fc.string({ minLength: 1 })),
	u: fc.double({ min: 0.001, max: 1000, noNaN: true }),
	bias: fc.double({ min: 0, max: 1000, noNaN: true }),
	gross: chance
};
const { at } = read;
const metal = fc.constantFrom<MetalId>('Au', 'Ag', 'Pd', 'Rh');

/** Any finding, but for its name. */
const anyFinding: fc.Arbitrary<Finding> = fc.oneof(
	fc
		.record<Omit<Touch, 'id'>>({ ...read, kind: fc.constant('touch'), how: fc.constantFrom('rub', 'notch'), holds: acid, attackedBy: acid })
		.filter(({ holds, attackedBy }) => holds !== null || attackedBy !== null)
		.map((each) => ({ ...each, id: '' })),
	fc.record<Fluorescence>({
		...read,
		id: fc.constant(''),
		kind: fc.constant('fluorescence'),
		reads: fc.uniqueArray(fc.record({ metal, perMille: figure }), { minLength: 1, selector: (each) => each.metal })
	}),
	fc.record<Water>({
		at, id: fc.constant(''), kind: fc.constant('water'), method: fc.constantFrom('suspended', 'beaker'), air: above, water: figure, division: above, temperature: figure
	}),
	fc.record<Magnet>({ at, id: fc.constant(''), kind: fc.constant('magnet'), pull: fc.constantFrom('none', 'weak', 'strong') }),
	fc.record<Core>({ ...read, id: fc.constant(''), kind: fc.constant('core'), perMille: figure }),
	fc.record<Assay>({ ...read, id: fc.constant(''), kind: fc.constant('assay'), perMille: figure, sampleU: fc.double({ min: 0, max: 50, noNaN: true }), by: fc.string() }),
	fc.record<CoinWeight>({ at, id: fc.constant(''), kind: fc.constant('coin'), coin: fc.constant('sovereign'), grams: above, division: above, diameter: fc.option(above) })
);

/** Any evidence that may be kept. */
const anyEvidence: fc.Arbitrary<Evidence> = fc
	.record({
		build: fc.option(fc.constantFrom(...builds)),
		findings: fc.array(anyFinding, { minLength: 1, maxLength: 8 }).map((list) => list.map((each, n): Finding => ({ ...each, id: `f${n}` }))),
		belief: fc.option(
			fc.record({
				metal,
				mean: fc.double({ min: 0, max: 1000, noNaN: true }),
				low: fc.double({ min: 0, max: 1000, noNaN: true }),
				median: fc.double({ min: 0, max: 1000, noNaN: true }),
				high: fc.double({ min: 0, max: 1000, noNaN: true }),
				odds: fc.record({ honest: chance, under: chance, other: chance, layered: chance }),
				shared: fc.dictionary(fc.string({ minLength: 1 }), fc.double({ min: -50, max: 50, noNaN: true })),
				own: fc.double({ min: 0, max: 500, noNaN: true })
			})
		),
		taking: fc.option(
			fc.record({
				metal,
				taken: acid.filter((each) => each !== null),
				rests: fc.array(fc.string({ minLength: 1 }), { maxLength: 5 }),
				prudence: chance
			})
		)
	});

describe('the shape of evidence', () => {
	it('reads back what was kept, whatever was found (1 000 cases)', () => {
		fc.assert(
			fc.property(anyEvidence, (held) => {
				const kept = canonicalJson(evidence.write(held));
				const found = readAs(evidence, JSON.parse(kept) as Json);
				if (!found.ok) throw new Error(JSON.stringify(found.problem));
				expect(canonicalJson(evidence.write(found.value))).toBe(kept);
				expect(found.value.findings.map(({ kind }) => kind)).toEqual(held.findings.map(({ kind }) => kind));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('takes evidence of nothing tested yet, and no more findings than anybody makes', () => {
		const many = Array.from({ length: 201 }, (_, at) => magnet(at));
		expect([holding([]).ok, holding(many.slice(0, 200)).ok, holding(many).ok]).toEqual([true, true, false]);
	});
	it('takes every finding once', () => {
		expect(holding([magnet(1), magnet(1)])).toMatchObject({ problem: { at: 'findings', expected: 'findings, each with a name of its own' } });
		expect(holding([{ ...(magnet(1) as object), id: '' }])).toMatchObject({ problem: { at: 'findings[0].id' } });
	});
	it.each<[string, string, Json]>([
		['a core above the whole', 'findings[0].perMille', core('1000.01')],
		['a core below nothing', 'findings[0].perMille', core('-0.1')],
		['a core as a number', 'findings[0].perMille', core(585)],
		['a reading without doubt', 'findings[0].u', core('585', { u: 0 })],
		['a bias below nothing', 'findings[0].bias', core('585', { bias: -1 })],
		['more slips than readings', 'findings[0].gross', core('585', { gross: 1.01 })],
		['another test than its name says', 'findings[0].kind', core('585', { kind: 'corer' })],
		['an inherited name for a test', 'findings[0].kind', core('585', { kind: 'constructor' })],
		['no kind at all', 'findings[0].kind', { id: 'f1', at: 1, pull: 'none' }],
		['what belongs to another test', 'findings[0].pull', core('585', { pull: 'none' })],
		['a reading of nothing', 'findings[0].reads', { ...readBy, kind: 'fluorescence', reads: [] }],
		['one metal read twice', 'findings[0].reads', { ...readBy, kind: 'fluorescence', reads: [{ metal: 'Au', perMille: '1' }, { metal: 'Au', perMille: '2' }] }],
		['a streak that met no acid', 'findings[0]', { ...readBy, kind: 'touch', how: 'rub', holds: null, attackedBy: null }]
	])('does not take %s', (_, at, finding) => {
		expect(holding([finding])).toMatchObject({ ok: false, problem: { at } });
	});
	it('keeps the parts of a doubt under whatever a tester is called', () => {
		const odds = { honest: 1, under: 0, other: 0, layered: 0 };
		const belief = JSON.parse('{"metal":"Au","mean":585,"low":580,"median":585,"high":590,"shared":{"__proto__":-1.5,"t":2},"own":3}') as { [key: string]: Json };
		const kept = holding([magnet(1)], { ...belief, odds });
		if (!kept.ok) throw new Error(JSON.stringify(kept.problem));
		expect(Object.entries(kept.value.belief?.shared ?? {})).toEqual([['__proto__', -1.5], ['t', 2]]);
		expect(JSON.stringify(evidence.write(kept.value))).toContain('"__proto__":-1.5');
	});
});
