import { describe, expect, it } from 'vitest';
import { decodeBody, encodeBody } from '../../../../src/trade/record/kind.ts';
import { defaultSettings } from '../../../../src/trade/record/kinds/settings.ts';
import { changedAt, expectEveryFieldChecked, frozen, frozenBody } from './frozen.ts';

describe('settings', () => {
	it('read version 1 as it was written', () => {
		const { cashStep, tiers, losses, ...rest } = frozenBody('settings');
		expect(rest).toEqual({
			currency: 'EUR',
			mark: 'comma',
			massUnit: 'dwt',
			scale: 'scale-1',
			volatility: { Au: 0.16, Ag: 0.3 },
			days: 21,
			spreads: { hallmarked: { shared: 0.002, own: 0.004 } },
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
	it('are checked field by field', () => expectEveryFieldChecked('settings'));
	it('have defaults that can be kept', () => {
		const kept = encodeBody('settings', defaultSettings());
		expect(decodeBody('settings', 1, kept)).toEqual({ ok: true, value: defaultSettings() });
	});
	it.each([[[]], [[{ from: '5', share: '0.8' }]], [[{ from: '0', share: '1.2' }]], [[{ from: '0', share: '0' }]]])(
		'do not take the tiers %j',
		(tiers) => {
			const read = decodeBody('settings', 1, changedAt(frozen('settings').body, ['tiers'], tiers));
			expect(read).toMatchObject({ ok: false, problem: { at: 'tiers' } });
		}
	);
});
