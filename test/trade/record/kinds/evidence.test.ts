import { describe, expect, it } from 'vitest';
import type { Json } from '../../../../src/trade/record/json.ts';
import { evidence } from '../../../../src/trade/record/kinds/evidence.ts';
import { readAs } from '../../../../src/trade/record/shape.ts';

const holding = (findings: readonly Json[], belief: Json = null) => readAs(evidence, { build: null, findings, belief, taking: null });
const magnet = (at: number): Json => ({ kind: 'magnet', id: `m${at}`, at, pull: 'none' });
const readBy = { id: 'f1', at: 1, tester: null, u: 6, bias: 2, gross: 0.03 };
const core = (perMille: Json, more: { readonly [key: string]: Json } = {}): Json => ({ ...readBy, kind: 'core', perMille, ...more });

describe('the shape of evidence', () => {
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
		const read = holding([magnet(1)], { ...belief, odds });
		if (!read.ok) throw new Error(JSON.stringify(read.problem));
		expect(Object.entries(read.value.belief?.shared ?? {})).toEqual([['__proto__', -1.5], ['t', 2]]);
		expect(JSON.stringify(evidence.write(read.value))).toContain('"__proto__":-1.5');
	});
});
