import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { weighing } from '$trade/mass/weighing.ts';
import { fromKarat, fromPerMille } from '$trade/metal/fineness.ts';
import { decimal } from '$trade/number/decimal.ts';
import { exact, ratio } from '$trade/number/exact.ts';
import { money } from '$trade/price/money.ts';
import { Format, formatFor } from '$ui/format.ts';

const en = new Format('en');
const de = new Format('de');
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

function weighed(typed: string, unit: 'g' | 'dwt' = 'g', mark: 'dot' | 'comma' = 'dot') {
	const result = weighing(typed, unit, { mark });
	if (!result.ok) throw new Error(result.problem.kind);
	return result.value;
}

describe('exact values', () => {
	it('keeps every digit of a decimal, far beyond a float', () => {
		expect(en.number(decimal('12345678901234567890.123456789'))).toBe('12,345,678,901,234,567,890.123456789');
		expect(de.number(decimal('9007199254740993.01'))).toBe('9.007.199.254.740.993,01');
	});
	it('rounds a fraction once, half-even, to the places shown', () => {
		expect(en.number(ratio(1n, 8n), 2)).toBe('0.12');
		expect(en.number(ratio(3n, 8n), 2)).toBe('0.38');
		expect(en.number(ratio(1n, 3n))).toBe('0.333333');
		expect(en.number(ratio(-1n, 3n), 1)).toBe('−0.3');
	});
	it('prints any decimal so that its digits can be read back', () => {
		fc.assert(
			fc.property(fc.bigInt({ min: -(10n ** 24n), max: 10n ** 24n }), fc.integer({ min: 0, max: 9 }), (n, places) => {
				const value = decimal(n.toString()).div(decimal(`1${'0'.repeat(places)}`));
				const read = en.number(value).replaceAll(',', '').replace('−', '-');
				expect(decimal(read).equals(value)).toBe(true);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('never prints a negative nought', () => {
		expect(en.number(decimal('-0.004'), 2)).toBe('0.00');
	});
});

describe('masses', () => {
	it('writes the unit, and the digits that were typed', () => {
		expect(plain(en.weighing(weighed('12.30')))).toBe('12.30 g');
		expect(plain(de.weighing(weighed('12,30', 'g', 'comma')))).toBe('12,30 g');
		expect(plain(en.weighing(weighed('8', 'dwt')))).toBe('8 dwt');
		expect(plain(en.weighing(weighed('1,234.50')))).toBe('1,234.50 g');
		expect(plain(en.weighing(weighed('1 234')))).toBe('1,234 g');
	});
	it('writes fine metal with its symbol', () => {
		expect(plain(en.fine('Au', ratio(36n, 10n)))).toBe('3.60 g Au');
		expect(plain(en.mass(decimal('0.35')))).toBe('0.35 g');
		expect(plain(en.mass(ratio(1n, 3n), 'ozt', 3))).toBe('0.333 ozt');
	});
});

describe('fineness and shares', () => {
	it('keeps karat and parts per thousand apart', () => {
		expect(plain(en.fineness(fromPerMille(decimal('585'))))).toBe('585 ‰');
		expect(plain(en.fineness(fromKarat(decimal('14'))))).toBe('583.3 ‰');
		expect(plain(en.karats(fromKarat(decimal('14'))))).toBe('14 kt');
		expect(plain(en.fineness(fromPerMille(decimal('999.9'))))).toBe('999.9 ‰');
	});
	it('writes a share as percent', () => {
		expect(plain(en.share(decimal('0.85')))).toBe('85 %');
		expect(plain(de.share(decimal('0.8525')))).toBe('85,25 %');
		expect(plain(en.share(exact(1n)))).toBe('100 %');
	});
});

describe('money', () => {
	it('has all minor units of its currency', () => {
		expect(en.money(money(decimal('1124'), 'EUR'))).toBe('€1,124.00');
		expect(plain(de.money(money(decimal('1124.5'), 'EUR')))).toBe('1.124,50 €');
		expect(en.money(money(decimal('1124'), 'JPY'))).toBe('¥1,124');
		expect(plain(en.money(money(decimal('3.125'), 'KWD')))).toBe('KWD 3.125');
		expect(en.amount(money(decimal('-2496.04'), 'USD'))).toBe('−2,496.04');
	});
	it('shows a price with every digit typed', () => {
		expect(en.price(decimal('52.315'), 'USD')).toBe('52.315');
		expect(en.price(decimal('4186.2'), 'USD')).toBe('4,186.20');
	});
	it('shows an unrounded worth to the minor unit, by its exact value and not by a float', () => {
		// 0.285 is below its half in binary, exactly half in decimal
		expect(en.worth(ratio(285n, 1000n), 'EUR')).toBe('€0.28');
		expect(en.worth(ratio(275n, 1000n), 'EUR')).toBe('€0.28');
		expect(en.worth(ratio(2_851n, 10_000n), 'EUR')).toBe('€0.29');
	});
});

describe('estimates', () => {
	it('never calls the likely certain', () => {
		expect(plain(en.chance(0.026))).toBe('2.6 %');
		expect(plain(en.chance(0.0001))).toBe('under 0.1 %');
		expect(plain(en.chance(0.9999))).toBe('over 99.9 %');
		expect(plain(en.chance(0))).toBe('0 %');
	});
	it('says when there is no figure', () => {
		expect(en.estimate(Number.NaN)).toBe('unknown');
		expect(en.chance(Number.NaN)).toBe('unknown');
		expect(en.interval(Number.NEGATIVE_INFINITY, 1)).toBe('unknown');
	});
	it('writes an interval with one unit', () => {
		expect(plain(en.interval(0, 12.912, 'g Au', 1))).toBe('0.0–12.9 g Au');
		expect(en.estimate(259.4)).toBe('259');
	});
});

describe('time', () => {
	const now = new Date(2026, 4, 3, 14, 5).getTime();
	const minute = 60_000;
	it.each([
		[0, 'just now'],
		[-2 * minute, 'just now'],
		[-20 * minute, 'ahead of this clock'],
		[14 * minute, '14 min ago'],
		[3 * 60 * minute, '3 h ago'],
		[30 * 60 * minute, 'yesterday'],
		[5 * 24 * 60 * minute, '5 days ago']
	])('%d ms ago is "%s"', (ago, words) => {
		expect(plain(en.age(now - ago, now))).toBe(words);
	});
	it('names the day of what is long ago', () => {
		expect(new Format('en-GB').age(new Date(2025, 4, 3).getTime(), now)).toBe('3 May 2025');
		expect(new Format('en-GB').moment(now)).toBe('3 May 2026, 14:05');
	});
});

describe('the language of numbers', () => {
	it('writes digits that every scale shows, whatever the language', () => {
		expect(new Format('ar-EG').number(decimal('12.5'))).toMatch(/^12[.,]5$/);
		expect(new Format('hi').number(decimal('1234567'))).toBe('12,34,567');
	});
	it('falls back to English where the tag is unknown', () => {
		expect(new Format('not a tag').language).toBe('en');
		expect(new Format('xx-qq').number(decimal('1234.5'))).toBe('1,234.5');
	});
	it('is made once for a language', () => {
		expect(formatFor('de')).toBe(formatFor('de'));
	});
});
