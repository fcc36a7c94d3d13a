import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Tester } from '$trade/evidence/tester.ts';
import { testerDefaults } from '$trade/evidence/tester-figures.ts';
import { formatFor } from '$ui/format.ts';
import { figureRows, testerLine, whoseFigures } from '$ui/settings/tester-words.ts';
import { newTester, ofKind, readTester, typedTester, whoseTyped, withAlloy, type TypedTester } from '../../src/routes/book/settings/tester-form.ts';

const reader: Tester = { id: 't1', name: 'Pocket reader', kind: 'fluorescence', ...testerDefaults.fluorescence, checkedOn: '2026-09-01' };
const typed: TypedTester = { ...newTester('fluorescence', 'dot'), name: 'Mine' };
const problem = (of: TypedTester) => {
	const read = readTester('t1', of, 'dot');
	if (read.ok) throw new Error('nothing is wrong');
	const { field, row, problem: found } = read.problem;
	return [field, row, found.kind];
};

describe('a tester in its form', () => {
	it('comes back as it was, whatever the mark (1 000 cases)', () => {
		const figure = fc.integer({ min: 1, max: 3_000_000 }).map((n) => n / 10_000);
		const row = fc.record({
			metal: fc.constantFrom('Au' as const, 'Pd' as const),
			colour: fc.constantFrom('any' as const, 'white' as const),
			perMille: fc.integer({ min: 0, max: 1000 }),
			u: figure
		});
		const tester = fc
			.record({
				kind: fc.constantFrom('fluorescence' as const, 'acids' as const),
				rows: fc.array(row, { minLength: 1, maxLength: 6 }),
				gross: fc.integer({ min: 0, max: 500_000 }).map((n) => n / 1_000_000),
				checkedOn: fc.constantFrom(null, '2026-05-03')
			})
			.map((made): Tester => ({ ...made, id: 't1', name: 'Mine', bias: Math.min(...made.rows.map(({ u }) => u)) }));
		fc.assert(
			fc.property(tester, fc.constantFrom('dot' as const, 'comma' as const), (held, mark) => {
				expect(readTester('t1', typedTester(held, mark), mark)).toEqual({ ok: true, value: held });
			}),
			{ numRuns: 1_000 }
		);
	});
	it('begins with the working defaults of its kind, and says so of each', () => {
		for (const kind of ['fluorescence', 'acids'] as const) {
			const begun = newTester(kind, 'comma');
			expect(readTester('t1', { ...begun, name: 'Mine' }, 'comma')).toEqual({
				ok: true,
				value: { id: 't1', name: 'Mine', kind, ...testerDefaults[kind], checkedOn: null }
			});
			const { rows, bias, gross } = whoseTyped(begun, 'comma');
			expect(new Set([...rows, bias, gross])).toEqual(new Set(['working default']));
		}
		const own = whoseTyped({ ...typed, bias: '0.5', rows: typed.rows.map((row, at) => (at === 1 ? { ...row, u: '12' } : row)) }, 'dot');
		expect([own.rows[0], own.rows[1], own.bias, own.gross]).toEqual(['working default', '', '', 'working default']);
	});
	it('takes the figures of another kind only while none is its own', () => {
		expect(ofKind(typed, 'acids', 'dot')).toEqual({ ...newTester('acids', 'dot'), name: 'Mine' });
		const own = { ...typed, bias: '0.5' };
		expect(ofKind(own, 'acids', 'dot')).toEqual({ ...own, kind: 'acids' });
	});
	it('names the field and the row that is wrong', () => {
		const rows = (u: string) => typed.rows.map((row, at) => (at === 2 ? { ...row, u } : row));
		expect(problem({ ...typed, name: ' ' })).toEqual(['name', null, 'tester-no-name']);
		expect(problem({ ...typed, rows: [] })).toEqual(['rows', null, 'tester-no-rows']);
		expect(problem({ ...typed, rows: rows('') })).toEqual(['rows', 2, 'number-missing']);
		expect(problem({ ...typed, rows: rows('six') })).toEqual(['rows', 2, 'number-unreadable']);
		expect(problem({ ...typed, rows: rows('0') })).toEqual(['rows', 2, 'number-not-positive']);
		expect(problem({ ...typed, rows: rows('301') })).toEqual(['rows', 2, 'tester-u-not-possible']);
		expect(problem({ ...typed, bias: '1.5' })).toEqual(['bias', null, 'tester-bias-over-u']);
		expect(problem({ ...typed, bias: '' })).toEqual(['bias', null, 'number-missing']);
		expect(problem({ ...typed, gross: '51' })).toEqual(['gross', null, 'tester-gross-too-often']);
		expect(problem({ ...typed, gross: 'x' })).toEqual(['gross', null, 'number-unreadable']);
	});
	it('takes a further alloy in its place, once', () => {
		const adding = (perMille: string, metal: 'Au' | 'Rh' = 'Au', colour: 'any' | 'white' = 'any') => withAlloy({ ...typed, adding: { metal, colour, perMille } }, 'comma');
		const places = (of: ReturnType<typeof withAlloy>) => (of.ok ? of.value.rows.map(({ metal, perMille, colour }) => `${metal} ${perMille} ${colour}`) : []);
		expect(places(adding('916,7'))[4]).toBe('Au 916.7 any');
		expect(places(adding('1000')).indexOf('Au 1000 any')).toBe(6);
		expect(places(adding('333')).indexOf('Au 333 any')).toBe(0);
		expect(places(adding('950', 'Rh')).at(-1)).toBe('Rh 950 any');
		expect(places(adding('585', 'Au', 'white'))).toHaveLength(typed.rows.length + 1);
		expect(places(adding('585'))).toHaveLength(typed.rows.length);
		for (const wrong of ['', '0', '1001', 'x']) expect(adding(wrong).ok, wrong).toBe(false);
		const added = adding('916,7');
		if (!added.ok) throw new Error('not added');
		expect(added.value.adding.perMille).toBe('');
		// what was added has no figure yet
		expect(problem(added.value)).toEqual(['rows', 4, 'number-missing']);
	});
});

describe('a tester in words', () => {
	const format = formatFor('en');
	it('says what it is and whose its figures are', () => {
		expect(testerLine(reader, format)).toMatch(/^reads by fluorescence, error of its own ±1\s‰, wrong in 3\s%, checked /);
		expect(testerLine({ ...reader, checkedOn: null }, format)).toMatch(/never checked$/);
		expect(whoseFigures(reader)).toBe('every figure: working default, yours to change');
		expect(whoseFigures({ ...reader, bias: 0.5 })).toBe('1 of 14 figures are yours, the others are working defaults');
		expect(whoseFigures({ ...reader, rows: [{ metal: 'Au', colour: 'any', perMille: 585, u: 12 }], bias: 0.5, gross: 0.01 })).toBe('every figure is yours');
	});
	it('shows each figure in a row', () => {
		const rows = figureRows({ ...reader, gross: 0.01 }, format);
		expect(rows).toHaveLength(14);
		expect(rows[3]).toEqual({ what: 'Gold 750\u00a0‰, white', figure: '±13\u00a0‰', whose: 'working default' });
		expect(rows.at(-1)).toEqual({ what: 'Reading of something else', figure: '1\u00a0%', whose: 'yours' });
	});
});
