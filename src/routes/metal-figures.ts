import { estimateOf, type LotSums } from '$trade/lot/sums.ts';
import { yieldFromSums } from '$trade/melt/of-sums.ts';
import { metalIds, type MetalId } from '$trade/metal/metals.ts';
import { printedValue, valueOf, type FineGrams, type Value } from '$trade/price/value.ts';
import { interval } from '$trade/uncertainty/coverage.ts';
import type { Uncertain } from '$trade/uncertainty/uncertain.ts';
import { metalName } from '$ui/metal-name.ts';
import type { Shop } from './shop.svelte.ts';
import { COVERAGE } from './why.ts';

/** The metals that are there, gold first, always in the same order. */
export function metalsIn(fine: FineGrams): readonly MetalId[] {
	return metalIds.filter((metal) => fine[metal] !== undefined);
}

/** Fine metal and remelt yield of a lot or of the whole stock, as LotMetals shows them. */
export function metalFigures({ format, sheet, settings }: Shop, sums: LotSums, value: Value | null) {
	const span = (of: Uncertain): string => {
		const { low, high } = interval(of, COVERAGE);
		return format.interval(Math.max(0, low), high, 'g');
	};
	const currency = sheet?.body.currency ?? settings.currency;
	const printed = value === null ? null : printedValue(value, currency);
	const melt = yieldFromSums(sums, settings.losses);
	const retained: FineGrams = {};
	const rows = metalsIn(sums.fine).map((metal) => {
		const part = printed?.byMetal[metal];
		const kept = melt.ok ? melt.value.metals[metal] : undefined;
		if (kept !== undefined) retained[metal] = kept.retained;
		return {
			metal,
			name: metalName(metal),
			fine: format.mass(sums.fine[metal]!, 'g', 2),
			between: span(estimateOf(sums, metal)),
			worth: part === undefined ? 'no price' : format.amount({ amount: part, currency }),
			kept: kept === undefined ? '' : format.mass(kept.retained, 'g', 2),
			keptBetween: kept === undefined ? '' : span(kept.grams),
			fineness: kept === undefined ? '' : format.fineness({ perMille: kept.perMille })
		};
	});
	if (!melt.ok) return { rows, bar: null };
	return {
		rows,
		bar: {
			mass: format.mass(melt.value.bar, 'g', 2),
			between: span(melt.value.barMass),
			worth: sheet === null ? '' : format.worth(valueOf(retained, sheet.body).total, currency)
		}
	};
}
