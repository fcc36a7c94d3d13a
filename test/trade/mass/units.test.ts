import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { convert, inUnit, massUnits, parseUnit, toMass, type MassUnitId } from '../../../src/trade/mass/units.ts';
import { decimal, Decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, exactToText, toNumber } from '../../../src/trade/number/exact.ts';

const ids = Object.keys(massUnits) as MassUnitId[];
const read = (text: string) => {
	const result = parseUnit(text);
	return result.ok ? result.value : result.problem.kind;
};

describe('the units', () => {
	it('are seventeen, each under its own name and symbol', () => {
		expect(ids).toHaveLength(17);
		for (const id of ids) expect(massUnits[id].id).toBe(id);
		expect(new Set(ids.map((id) => massUnits[id].name)).size).toBe(17);
		expect(new Set(ids.map((id) => massUnits[id].symbol)).size).toBe(17);
		for (const id of ids) expect(massUnits[id].source.length).toBeGreaterThan(10);
	});

	it('are never just an ounce, a tael or a baht', () => {
		for (const id of ids) expect(['oz', 'ounce', 'tael', 'baht']).not.toContain(massUnits[id].symbol);
	});

	it('take an amount to grams exactly', () => {
		expect(toMass(decimal('8'), 'dwt').grams.toString()).toBe('12.44139072');
		expect(toMass(decimal('0.001'), 'ozt').grams.toString()).toBe('0.0311034768');
		expect(toMass(decimal('2.5'), 'kg').grams.toString()).toBe('2500');
	});

	it('count a mass in a unit as a fraction', () => {
		expect(exactToText(inUnit(toMass(decimal('10'), 'tola'), 'ozt'))).toBe('15/4');
		expect(exactToText(inUnit(toMass(decimal('1'), 'ct'), 'g'))).toBe('1/5');
		expect(exactToText(convert(exact(1n), 'lb-av', 'gr'))).toBe('7000');
	});

	it('go there and back for every pair of units, exactly (every pair, 4 amounts each and 3 000 more)', () => {
		const back = (amount: Decimal, from: MassUnitId, to: MassUnitId) => {
			const there = inUnit(toMass(amount, from), to);
			expect(compareExact(convert(there, to, from), exact(amount))).toBe(0);
			expect(compareExact(convert(convert(exact(amount), from, to), to, from), exact(amount))).toBe(0);
		};
		const amounts = ['1', '0.01', '12.345', '999999999.999999'];
		for (const from of ids) for (const to of ids) for (const amount of amounts) back(decimal(amount), from, to);
		const unit = fc.constantFrom(...ids);
		const typed = fc.tuple(fc.bigInt({ min: 1n, max: 999_999_999_999_999n }), fc.integer({ min: 0, max: 9 }));
		fc.assert(
			fc.property(typed, unit, unit, ([digits, places], from, to) => {
				back(new Decimal(digits.toString()).div(new Decimal(10).pow(places)), from, to);
			}),
			{ numRuns: 3_000 }
		);
	});

	it('convert through a third unit to the same amount (1 000 cases)', () => {
		const unit = fc.constantFrom(...ids);
		fc.assert(
			fc.property(fc.bigInt({ min: 1n, max: 10n ** 12n }), unit, unit, unit, (n, a, b, c) => {
				expect(compareExact(convert(convert(exact(n), a, b), b, c), convert(exact(n), a, c))).toBe(0);
				expect(toNumber(convert(exact(n), a, b))).toBeGreaterThan(0);
			}),
			{ numRuns: 1_000 }
		);
	});

	it('stop where an amount would no longer be exact', () => {
		expect(() => toMass(decimal('1234567890123456789012345678901234567'), 'ozt')).toThrow(/too many digits/);
	});
});

describe('a unit as people write it', () => {
	it.each<[string, string]>([
		['g', 'g'], ['G', 'g'], [' gm ', 'g'], ['gms', 'g'], ['Grams', 'g'], ['g.', 'g'], ['kg', 'kg'], ['KG', 'kg'], ['mg', 'mg'],
		['ozt', 'ozt'], ['oz t', 'ozt'], ['oz. t.', 'ozt'], ['OZT', 'ozt'],
		['troy oz', 'ozt'], ['Troy Ounces', 'ozt'], ['oz troy', 'ozt'], ['t.oz', 'ozt'],
		['dwt', 'dwt'], ['DWT', 'dwt'], ['pwt', 'dwt'], ['pennyweight', 'dwt'], ['gr', 'gr'], ['grain', 'gr'], ['grains', 'gr'],
		['oz av', 'oz-av'], ['oz-av', 'oz-av'], ['lb', 'lb-av'],
		['lbs', 'lb-av'], ['ct', 'ct'], ['carats', 'ct'], ['tola', 'tola'], ['momme', 'momme'],
		['tael (HK)', 'tael-hk'], ['baht bar', 'baht-bar'], ['tael-tw', 'tael-tw']
	])('"%s" is %s', (text, id) => {
		expect(read(text)).toBe(id);
	});

	it('is read back from the id and the symbol of every unit', () => {
		for (const id of ids) {
			expect(read(id)).toBe(id);
			expect(read(massUnits[id].symbol)).toBe(id);
		}
	});

	it('is asked about where it means more than one', () => {
		for (const [text, choices] of [
			['oz', ['ozt', 'oz-av']],
			['Ounces', ['ozt', 'oz-av']],
			['tael', ['tael-hk', 'tael-hk-exchange', 'tael-tw']],
			['baht', ['baht-bar', 'baht-ornament']],
			['grs', ['g', 'gr']]
		] as const) {
			expect(parseUnit(text)).toEqual({ ok: false, problem: { kind: 'unit-ambiguous', text, choices } });
		}
	});

	it('is refused where it means none', () => {
		expect(read('')).toBe('unit-missing');
		expect(read('   ')).toBe('unit-missing');
		const strange = ['x', 'stone', '🪙', 'g g', 'kt', 'karat', '٣', 'constructor', '__proto__', '.', '-', 'g\u0000'];
		for (const text of strange) expect(read(text)).toBe('unit-unknown');
	});

	it('never throws, whatever is typed, and shows at most forty characters of it (2 000 cases)', () => {
		fc.assert(
			fc.property(fc.string({ maxLength: 200, unit: 'binary' }), (text) => {
				const result = parseUnit(text);
				if (result.ok) expect(ids).toContain(result.value);
				else if (result.problem.kind !== 'unit-missing') expect(result.problem.text.length).toBeLessThanOrEqual(40);
			}),
			{ numRuns: 2_000 }
		);
	});
});
