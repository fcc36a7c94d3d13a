import type { Decimal } from '../number/decimal.ts';
import { toNumber, type Exact } from '../number/exact.ts';
import { certain, minusUncertain, sumUncertain, timesUncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import { metals, type MetalId } from '../metal/metals.ts';
import type { LossClassId } from '../piece/loss-class.ts';
import { MOST_BASE_LOST, type Balance } from './balance.ts';
import { complement, product, quotient } from './combine.ts';
import { uncertainRange, type Losses } from './losses.ts';

/** Metal of one loss class that goes into the crucible. Doubts are in grams; left out, the figure counts as certain. */
export type MeltParcel = {
	readonly lossClass: LossClassId;
	/** Mass without the deductions, grams. */
	readonly net: Decimal;
	/** Fine grams by metal. */
	readonly fine: Partial<Record<MetalId, Exact>>;
	readonly netDoubt?: Uncertain;
	readonly fineDoubt?: Partial<Record<MetalId, Uncertain>>;
};

/** The bar, the gross loss and the retained fine metal of one parcel: grams, with their sources. */
export type Spread = { readonly bar: Uncertain; readonly grossLoss: Uncertain; readonly retained: Partial<Record<MetalId, Uncertain>> };

/**
 * The balance of one parcel again, in numbers that carry their sources: readings, scale, class of the stamp, and the losses of the
 * class: `non-metal:`, `loss:` and `retention:` + loss class, shared by everything of that class in the melt.
 * formula: as balance; each source's part by first-order propagation (grams)
 * rounding: none, an estimate.
 * source: delta method, JCGM 100:2008 (GUM) 5.2.2; from memory.
 */
export function spread(parcel: MeltParcel, losses: Losses, limit: Balance['limit']): Spread {
	const { lossClass } = parcel;
	const net = parcel.netDoubt ?? certain(parcel.net.toNumber());
	const keep = complement(uncertainRange(losses.nonMetal, `non-metal:${lossClass}`));
	const loss = uncertainRange(losses.metalLoss, `loss:${lossClass}`);
	const retention = uncertainRange(losses.retention, `retention:${lossClass}`);
	const metal = product(net, keep);
	const there = new Map<MetalId, Uncertain>();
	for (const [id, grams] of Object.entries(parcel.fine) as [MetalId, Exact][]) {
		there.set(id, product(parcel.fineDoubt?.[id] ?? certain(toNumber(grams)), keep));
	}
	const precious = sumUncertain([...there].filter(([id]) => metals[id].precious).map(([, grams]) => grams));
	const base = minusUncertain(metal, precious);
	const preciousLost = product(precious, complement(retention));
	const baseLost =
		limit === 'least'
			? certain(0)
			: limit === 'most'
				? timesUncertain(base, toNumber(MOST_BASE_LOST))
				: minusUncertain(product(metal, loss), preciousLost);
	const bar = minusUncertain(minusUncertain(metal, preciousLost), baseLost);
	const baseKept = base.value > 0 ? complement(quotient(baseLost, base)) : certain(1);
	const retained: Partial<Record<MetalId, Uncertain>> = {};
	for (const [id, grams] of there) retained[id] = product(grams, metals[id].precious ? retention : baseKept);
	return { bar, grossLoss: minusUncertain(net, bar), retained };
}
