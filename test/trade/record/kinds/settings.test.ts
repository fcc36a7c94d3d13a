import { describe, expect, it } from 'vitest';
import type { Json } from '../../../../src/trade/record/json.ts';
import { decodeBody, encodeBody } from '../../../../src/trade/record/kind.ts';
import { defaultSettings } from '../../../../src/trade/record/kinds/settings.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody, upgradedBody } from './frozen.ts';

describe('settings', () => {
	it('read version 1 as it was written', () => {
		const { cashStep, tiers, losses, ...rest } = upgradedBody('settings');
		expect(rest).toEqual({
			currency: 'EUR',
			mark: 'comma',
			massUnit: 'dwt',
			scale: 'scale-1',
			volatility: { Au: 0.16, Ag: 0.3 },
			days: 21,
			spreads: { hallmarked: { shared: 0.002, own: 0.004 } },
			prudence: 0.8,
			testCosts: {},
			priors: {},
			language: 'de-AT'
		});
		expect(cashStep?.toFixed()).toBe('0.05');
		expect(tiers.map(({ from, share }) => [from.toFixed(), share.toFixed()])).toEqual([
			['0', '0.8'],
			['1000', '0.85']
		]);
		expect(Object.keys(losses)).toEqual(['worn']);
		expect(losses.worn?.metalLoss?.high.toFixed()).toBe('0.012');
		expect(losses.worn?.retention).toBeUndefined();
	});
	it('read version 2, with what was set about evidence, as it was written', () => {
		const { prudence, testCosts, priors } = frozenBody('settings', 2);
		expect(prudence).toBe(0.9);
		expect(testCosts.core?.toFixed()).toBe('15');
		expect(testCosts.water).toBeUndefined();
		expect(priors).toEqual({ hallmarked: { honest: 0.98, under: 0.01, other: 0.005, layered: 0.005 } });
	});
	it('are checked field by field', () => {
		expectEveryFieldChecked('settings');
		expectEveryFieldChecked('settings', 2);
	});
	it.each([
		['odds that do not sum to one', ['priors', 'hallmarked', 'honest'], 0.9],
		['a prudence that is no better than a guess', ['prudence'], 0.4],
		['a prudence that is certainty', ['prudence'], 1],
		['a test that pays for itself', ['testCosts', 'core'], '-1'],
		['a cost of what is no test', ['testCosts', 'dowsing'], '1'],
		['odds of what is no origin', ['priors', 'found'], { honest: 1, under: 0, other: 0, layered: 0 }]
	])('do not take %s', (_, place, value) => {
		const read = decodeBody('settings', 2, changedAt(frozen('settings', 2).body, place, value));
		expect(read).toMatchObject({ ok: false, problem: { kind: 'record-body' } });
	});
	it('of version 1 hold nothing that version 2 added', () => {
		const { body } = frozen('settings');
		for (const field of ['prudence', 'testCosts', 'priors'] as const) {
			const added = changedAt(body, [field], (frozen('settings', 2).body as { readonly [key: string]: Json })[field]);
			expect(decodeBody('settings', 1, added)).toMatchObject({ ok: false, problem: { at: field, expected: 'no such field' } });
			expect(decodeBody('settings', 2, changedAt(frozen('settings', 2).body, [field], undefined)).ok).toBe(false);
		}
	});
	it('have defaults that can be kept', () => {
		const kept = encodeBody('settings', defaultSettings());
		expect(decodeBody('settings', 2, kept)).toEqual({ ok: true, value: defaultSettings() });
	});
	it.each([[[]], [[{ from: '5', share: '0.8' }]], [[{ from: '0', share: '1.2' }]], [[{ from: '0', share: '0' }]]])(
		'do not take the tiers %j',
		(tiers) => {
			const read = decodeBody('settings', 1, changedAt(frozen('settings').body, ['tiers'], tiers));
			expect(read).toMatchObject({ ok: false, problem: { at: 'tiers' } });
		}
	);
});
