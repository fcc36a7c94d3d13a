import fc from 'fast-check';
import type { Assay, Core, Finding, Fluorescence, Magnet, Touch, Water } from '../../../src/trade/evidence/finding.ts';
import type { Subject } from '../../../src/trade/evidence/subject.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';

/** A piece stamped 14 kt of today's United States, soldered: the law lets it fall 7 ‰ under 14/24. */
export const stamped14: Subject = { metal: 'Au', claimed: 1750 / 3, legal: 1750 / 3 - 7, origin: 'us-modern', build: 'solid', coin: null };
export const chain14: Subject = { ...stamped14, build: 'hollow' };
export const bar999: Subject = { metal: 'Au', claimed: 999, legal: 999, origin: 'stranger-bar', build: 'solid', coin: null };
export const sterling: Subject = { metal: 'Ag', claimed: 925, legal: 921, origin: 'us-modern', build: 'solid', coin: null };
export const unmarked: Subject = { metal: 'Au', claimed: null, legal: null, origin: 'unmarked', build: 'solid', coin: null };

let named = 0;
const found = () => {
	named += 1;
	return { id: `f${named}`, at: 1_796_000_000_000 };
};
export const karat = (k: number) => ({ perMille: ratio(decimal(String(k * 125)), decimal('3')) });

export function touch(parts: Partial<Touch> = {}): Touch {
	return { ...found(), kind: 'touch', how: 'rub', holds: karat(14), attackedBy: karat(18), tester: 'acids', u: 15, bias: 5, gross: 0.02, ...parts };
}
export function reading(perMille: number, parts: Partial<Fluorescence> = {}, metal: MetalId = 'Au'): Fluorescence {
	const reads = [{ metal, perMille: decimal(String(perMille)) }];
	return { ...found(), kind: 'fluorescence', reads, tester: 'x', u: 16, bias: 3, gross: 0.03, ...parts };
}
export function core(perMille: number, parts: Partial<Core> = {}): Core {
	return { ...found(), kind: 'core', perMille: decimal(String(perMille)), tester: 'x', u: 16, bias: 3, gross: 0.005, ...parts };
}
export function assay(perMille: number, parts: Partial<Assay> = {}): Assay {
	return { ...found(), kind: 'assay', perMille: decimal(String(perMille)), tester: null, u: 0.5, bias: 0, gross: 0.002, sampleU: 1, by: 'an office', ...parts };
}
export function magnet(pull: Magnet['pull']): Magnet {
	return { ...found(), kind: 'magnet', pull };
}
/** The readings that a piece of this density would give, hung in water of 20 °C (0.998207 g/cm³) in air of 0.0012. */
export function water(density: number, grams = 20, parts: Partial<Water> = {}): Water {
	const lift = (grams * (0.998207 - 0.0012)) / (density - 0.0012);
	return {
		...found(), kind: 'water', method: 'suspended', air: decimal(grams.toFixed(3)), water: decimal((grams - lift).toFixed(3)),
		division: decimal('0.01'), temperature: decimal('20'), ...parts
	};
}

/** Any finding that a buyer could type. */
export const anyFinding: fc.Arbitrary<Finding> = fc.oneof(
	fc.record({ how: fc.constantFrom('rub' as const, 'notch' as const), k: fc.integer({ min: 8, max: 18 }) }).map(({ how, k }) =>
		touch({ how, holds: karat(k), attackedBy: karat(k + 4) })
	),
	fc.record({ at: fc.integer({ min: 0, max: 1000 }), u: fc.integer({ min: 1, max: 20 }) }).map(({ at, u }) => reading(at, { u })),
	fc.record({ at: fc.integer({ min: 0, max: 1000 }), u: fc.integer({ min: 1, max: 20 }) }).map(({ at, u }) => core(at, { u })),
	fc.integer({ min: 0, max: 1000 }).map((at) => assay(at)),
	fc.integer({ min: 70, max: 200 }).map((tenths) => water(tenths / 10)),
	fc.constantFrom('none' as const, 'weak' as const, 'strong' as const).map(magnet)
);

/** Numbers from 0 to 1 that are the same in every run. */
export function seeded(seed: number): () => number {
	let state = seed >>> 0;
	return () => {
		state = (state + 0x6d2b79f5) >>> 0;
		let t = Math.imul(state ^ (state >>> 15), 1 | state);
		t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
		return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
	};
}
