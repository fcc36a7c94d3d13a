import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import type { Json } from '../../../src/trade/record/json.ts';
import {
	byKey,
	decimalText,
	exactText,
	list,
	moment,
	nullable,
	object,
	oneOf,
	readAs,
	refined,
	text,
	upgraded,
	variants,
	whole,
	within,
	type Shape
} from '../../../src/trade/record/shape.ts';

type Thing = { readonly what: string; readonly size?: number };
const thing = object<Thing>({ what: text, size: whole }, ['size']);

function problem<T>(shape: Shape<T>, json: Json) {
	const read = readAs(shape, json);
	expect(read.ok).toBe(false);
	return read.ok ? null : read.problem;
}

describe('shapes', () => {
	it('write what they read', () => {
		const shape = object({ mass: decimalText, share: exactText, things: list(thing), none: nullable(text) });
		const value = { mass: decimal('12.30'), share: ratio(decimal('14'), decimal('24')), things: [{ what: 'ring' }, { what: 'bar', size: 2 }], none: null };
		const json = shape.write(value);
		expect(json).toEqual({ mass: '12.3', share: '7/12', things: [{ what: 'ring' }, { what: 'bar', size: 2 }], none: null });
		const read = readAs(shape, json);
		expect(read.ok && shape.write(read.value)).toEqual(json);
	});
	it('say where something is wrong, and what stands there', () => {
		expect(problem(list(thing), [{ what: 'ring' }, { what: 7 }])).toEqual({ kind: 'record-body', at: '[1].what', expected: 'text', found: '7' });
		expect(problem(thing, { what: 'ring', size: 1.5 })).toEqual({ kind: 'record-body', at: 'size', expected: 'a whole number of 0 or more', found: '1.5' });
		expect(problem(thing, { size: 1 })).toMatchObject({ at: 'what', found: 'nothing' });
	});
	it('refuse a field that they do not know, so that nothing is dropped in silence', () => {
		expect(problem(thing, { what: 'ring', colour: 'red' })).toMatchObject({ at: 'colour', expected: 'no such field', found: '"red"' });
	});
	it('do not take inherited names for fields', () => {
		expect(problem(object<{ toString: string }>({ toString: text }), {})).toMatchObject({ at: 'toString', found: 'nothing' });
	});
	it.each(['1e9', '', '.5', '5.', '-', ' 1', '+1', 'NaN', 'Infinity', '١٢'])('do not read %j as a decimal', (found) => {
		expect(problem(decimalText, found)).toMatchObject({ expected: 'a decimal as text' });
	});
	it('do not read a number as a decimal', () => {
		expect(problem(decimalText, 12.3)).toMatchObject({ found: '12.3' });
	});
	it.each(['1/0', '1/', '/2', '0.5', '1/-2'])('do not read %j as a fraction', (found) => {
		expect(problem(exactText, found)).toMatchObject({ expected: 'an exact fraction as text' });
	});
	it('take only words, times and keys of their lists', () => {
		expect(problem(oneOf(['open', 'bought']), 'sold')).toMatchObject({ expected: 'one of open, bought' });
		expect(problem(moment, 1e17)).toMatchObject({ expected: 'a time' });
		expect(problem(byKey(oneOf(['Au', 'Ag']), whole), { Au: 1, Xx: 2 })).toMatchObject({ found: '"Xx"' });
	});
	it('keep a further condition', () => {
		const even = refined(whole, (value) => (value % 2 === 0 ? null : 'an even number'));
		expect(readAs(even, 4)).toEqual({ ok: true, value: 4 });
		expect(problem(even, 3)).toMatchObject({ expected: 'an even number', found: '3' });
	});
	it('tell several kinds of thing apart by their kind', () => {
		type Round = { readonly kind: 'round'; readonly across: number };
		type Square = { readonly kind: 'square'; readonly side: number };
		const either = variants<Round | Square>({
			round: object<Round>({ kind: oneOf(['round']), across: whole }),
			square: object<Square>({ kind: oneOf(['square']), side: whole })
		});
		for (const value of [{ kind: 'round', across: 3 }, { kind: 'square', side: 4 }] as const) {
			expect(readAs(list(either), [value])).toEqual({ ok: true, value: [value] });
			expect(either.write(value)).toEqual(value);
		}
		expect(problem(list(either), [{ kind: 'round', side: 4 }])).toMatchObject({ at: '[0].across', found: 'nothing' });
		expect(problem(either, { kind: 'oval', across: 3 })).toMatchObject({ at: 'kind', expected: 'one of round, square', found: '"oval"' });
		expect(problem(either, { across: 3 })).toMatchObject({ at: 'kind', found: 'nothing' });
		for (const other of [null, 7, 'round', [], ['round']]) expect(problem(either, other)).toMatchObject({ expected: 'named fields' });
		expect(problem(either, { kind: 'toString' })).toMatchObject({ at: 'kind' });
	});
	it('read an older version as one of today', () => {
		const today = upgraded(thing, ({ what }) => ({ what, size: 0 }));
		expect(readAs(today, { what: 'ring' })).toEqual({ ok: true, value: { what: 'ring', size: 0 } });
		expect(readAs(today, { what: 7 })).toMatchObject({ ok: false, problem: { at: 'what' } });
	});
	it('keep numbers and lists within their limits', () => {
		expect(readAs(within(0, 1), 1).ok && readAs(within(0, 1), 0).ok).toBe(true);
		for (const found of [-0.001, 1.001, '0.5', null]) expect(problem(within(0, 1), found)).toMatchObject({ expected: 'a number from 0 to 1' });
		expect(readAs(list(whole, 2), [1, 2]).ok).toBe(true);
		expect(problem(list(whole, 2), [1, 2, 3])).toMatchObject({ at: '', expected: 'a list of at most 2' });
	});
	it('cut what they show', () => {
		expect(problem(whole, 'x'.repeat(500))?.found).toHaveLength(60);
	});
});
