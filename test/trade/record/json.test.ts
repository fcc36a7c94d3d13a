import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { asJson, canonicalJson, isJson, type Json } from '../../../src/trade/record/json.ts';

const json = fc.jsonValue({ maxDepth: 5 }) as fc.Arbitrary<Json>;

describe('canonical text', () => {
	it('reads back as the same value', () => {
		fc.assert(
			fc.property(json, (value) => {
				expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('does not depend on the order of keys', () => {
		fc.assert(
			fc.property(fc.dictionary(fc.string(), json), (value) => {
				const turned = Object.fromEntries(Object.entries(value).reverse());
				expect(canonicalJson(turned)).toBe(canonicalJson(value));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('sorts by code unit and writes no spaces', () => {
		expect(canonicalJson({ b: [1, 'x', null], a: { d: true, c: 0.1 } })).toBe('{"a":{"c":0.1,"d":true},"b":[1,"x",null]}');
	});
	it('refuses a number that JSON would turn into null', () => {
		expect(() => canonicalJson({ u: Number.NaN })).toThrow('a record cannot hold NaN');
	});
});

describe('plain values', () => {
	it('are told from everything else', () => {
		expect(isJson({ a: [1, 'b', { c: null }] })).toBe(true);
		for (const other of [undefined, Number.NaN, 1n, new Date(0), new Map(), decimal('1'), { a: undefined }, [Symbol.iterator], () => 1]) {
			expect(isJson(other)).toBe(false);
		}
	});
	it('are not nested without end', () => {
		let deep: Json = 1;
		for (let level = 0; level < 10_000; level += 1) deep = [deep];
		expect(isJson(deep)).toBe(false);
	});
});

describe('what cannot be read', () => {
	it('becomes JSON whatever it is, and JSON stays as it is', () => {
		fc.assert(
			fc.property(fc.anything({ withBigInt: true, withDate: true, withNullPrototype: true, withMap: true }), (value) => {
				const kept = asJson(value);
				expect(isJson(JSON.parse(JSON.stringify(kept)))).toBe(true);
				if (isJson(value)) expect(canonicalJson(kept)).toBe(canonicalJson(value));
			}),
			{ numRuns: 1_000 }
		);
	});
	it('keeps what it held', () => {
		const bytes = new Uint8Array([1, 255]).buffer;
		expect(asJson({ n: 7n, at: new Date(5), bytes, none: undefined, odd: Number.NaN, list: [1] })).toEqual({
			n: 'bigint 7',
			at: 'date 5',
			bytes: { bytes: [1, 255] },
			none: 'undefined',
			odd: 'number NaN',
			list: [1]
		});
	});
});
