import type { LotBody } from '$trade/record/kinds/lot.ts';
import type { Format } from '$ui/format.ts';

/** A lot that has just been opened, named by its moment until the buyer names it. */
export function newLot(at: number, format: Format, sheet: string | null): LotBody {
	return { name: `Lot of ${format.moment(at)}`, note: '', state: 'open', purchase: null, sheet, openedAt: at, ask: null };
}
