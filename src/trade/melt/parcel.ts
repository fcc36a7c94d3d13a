import type { Decimal } from '../number/decimal.ts';
import type { Exact } from '../number/exact.ts';
import type { Uncertain } from '../uncertainty/uncertain.ts';
import type { MetalId } from '../metal/metals.ts';
import type { LossClassId } from '../piece/loss-class.ts';

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
