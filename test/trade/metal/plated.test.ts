import { describe, expect, it } from 'vitest';
import { mass } from '../../../src/trade/mass/mass.ts';
import { fromKarat, fromPerMille } from '../../../src/trade/metal/fineness.ts';
import { parseMark } from '../../../src/trade/metal/mark.ts';
import { fineMass } from '../../../src/trade/metal/fine-mass.ts';
import { coatingFineMass, coatingMinimum, layerFineMass } from '../../../src/trade/metal/plated.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { compareExact, exact, exactToText, ratio } from '../../../src/trade/number/exact.ts';
import { certain, standardUncertainty, uncertain } from '../../../src/trade/uncertainty/uncertain.ts';

describe('a filled layer', () => {
	it('is 14/480 of the whole for 1/20 14 kt, by the layer and by the mark', () => {
		const layer = layerFineMass(mass('9.60'), ratio(1n, 20n), 'Au', fromKarat(decimal('14')));
		expect(exactToText(layer.grams)).toBe('7/25');
		const mark = parseMark('1/20 14k gf');
		expect(mark.ok).toBe(true);
		if (!mark.ok) return;
		const [content] = mark.value.contents;
		expect(compareExact(fineMass(mass('9.60'), content!.metal, content!.fineness).grams, layer.grams)).toBe(0);
	});

	it('refuses a layer that is more than the whole', () => {
		expect(() => layerFineMass(mass('1'), exact(2n), 'Au', fromPerMille(decimal('585')))).toThrow(/share from 0 to 1/);
	});
});

describe('a coating', () => {
	it('weighs area times thickness times density: 20 cm² of 2.5 µm fine gold is 0.0965 g', () => {
		const gold = coatingFineMass(certain(20), certain(2.5), certain(19.3), fromPerMille(decimal('1000')));
		expect(gold.value).toBeCloseTo(0.0965, 12);
	});

	it('carries the relative doubts of its factors in quadrature', () => {
		const gold = coatingFineMass(uncertain(20, 'area', 2), uncertain(2.5, 'thickness', 0.5), certain(19.3), fromPerMille(decimal('750')));
		expect(standardUncertainty(gold) / gold.value).toBeCloseTo(Math.hypot(0.1, 0.2), 12);
	});

	it('promises the same least layer for vermeil and for heavy gold electroplate, and far less for electroplate', () => {
		expect(coatingMinimum.vermeil.equals(coatingMinimum['heavy-gold-electroplate'])).toBe(true);
		expect(coatingMinimum['gold-electroplate'].lt(coatingMinimum.vermeil)).toBe(true);
	});
});
