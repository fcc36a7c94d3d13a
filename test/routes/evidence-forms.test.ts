import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findingKinds } from '$trade/evidence/finding.ts';
import { origins } from '$trade/evidence/origin.ts';
import { defaultPriors } from '$trade/evidence/priors.ts';
import { decimal } from '$trade/number/decimal.ts';
import {
	hypothesesOf, readCosts, readOdds, readPrudence, typedCosts, typedOdds
} from '../../src/routes/book/settings/evidence-forms.ts';

describe('what a test costs, as typed', () => {
	it('is the working defaults until something else is typed', () => {
		const typed = typedCosts({}, 'comma');
		expect([typed.magnet, typed.core]).toEqual(['0,20', '12,00']);
		expect(readCosts(typed, 'comma')).toEqual({ ok: true, value: {} });
		expect(readCosts({ ...typed, core: '12', water: ' ' }, 'comma')).toEqual({ ok: true, value: {} });
	});
	it('is kept where it differs, nothing too', () => {
		const read = readCosts({ ...typedCosts({}, 'dot'), core: '7.5', touch: '0' }, 'dot');
		expect(read.ok && Object.entries(read.value).map(([kind, cost]) => [kind, cost.toFixed()])).toEqual([['touch', '0'], ['core', '7.5']]);
		expect(typedCosts({ core: decimal('7.5') }, 'dot').core).toBe('7.50');
	});
	it.each(findingKinds)('names %s when its figure is wrong', (kind) => {
		expect(readCosts({ ...typedCosts({}, 'dot'), [kind]: '-1' }, 'dot')).toMatchObject({ ok: false, problem: { kind, problem: { kind: 'number-negative' } } });
	});
});

describe('prudence, as typed', () => {
	it('is a percentage from even to nearly sure', () => {
		expect(['50', '80', '92,5', '99'].map((text) => readPrudence(text, 'comma'))).toEqual([0.5, 0.8, 0.925, 0.99].map((value) => ({ ok: true, value })));
		expect(readPrudence('49.9', 'dot')).toMatchObject({ ok: false, problem: { kind: 'prudence-outside', prudence: 0.499 } });
		expect(readPrudence('100', 'dot')).toMatchObject({ ok: false, problem: { kind: 'prudence-outside' } });
		expect(readPrudence('', 'dot')).toMatchObject({ ok: false, problem: { kind: 'number-missing' } });
	});
});

describe('odds, as typed', () => {
	it.each(origins)('of %s are the working defaults until something else is typed', (origin) => {
		for (const mark of ['dot', 'comma'] as const) expect(readOdds(origin, typedOdds(defaultPriors[origin], mark), mark)).toEqual({ ok: true, value: null });
	});
	it('come back as they were (1 000 cases)', () => {
		const part = fc.integer({ min: 0, max: 333 });
		fc.assert(
			fc.property(part, part, part, fc.constantFrom('dot' as const, 'comma' as const), (a, b, c, mark) => {
				const odds = { honest: (1000 - a - b - c) / 1000, under: a / 1000, other: b / 1000, layered: c / 1000 };
				const read = readOdds('hallmarked', typedOdds(odds, mark), mark);
				expect(read).toEqual({ ok: true, value: JSON.stringify(odds) === JSON.stringify(defaultPriors.hallmarked) ? null : odds });
			}),
			{ numRuns: 1_000 }
		);
	});
	it('that are not the whole are wrong together, and one that is none by itself', () => {
		const typed = typedOdds(defaultPriors['us-modern'], 'dot');
		expect(readOdds('us-modern', { ...typed, honest: '89' }, 'dot')).toMatchObject({ problem: { hypothesis: null, problem: { kind: 'odds-not-whole' } } });
		expect(readOdds('us-modern', { ...typed, other: '-3' }, 'dot')).toMatchObject({ problem: { hypothesis: 'other', problem: { kind: 'number-negative' } } });
		expect(readOdds('us-modern', { ...typed, under: '' }, 'dot')).toMatchObject({ problem: { hypothesis: 'under', problem: { kind: 'number-missing' } } });
	});
	it('of a piece without a mark ask nothing about its mark', () => {
		expect(hypothesesOf('unmarked')).toEqual(['other', 'layered']);
		expect(readOdds('unmarked', { honest: '', under: 'x', other: '80', layered: '20' }, 'dot')).toEqual({
			ok: true,
			value: { honest: 0, under: 0, other: 0.8, layered: 0.2 }
		});
	});
});
