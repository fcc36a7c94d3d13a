import { ZERO, type Decimal } from '$trade/number/decimal.ts';
import type { Piece } from '$trade/piece/piece.ts';
import { subjectOf } from '$trade/piece/subject.ts';
import type { PriceSheet } from '$trade/price/price-sheet.ts';
import { evidence as evidenceShape } from '$trade/record/kinds/evidence.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import type { Sent } from './bag-weighed.ts';
import { stakeOf } from './piece-evidence.ts';

/** An entry made ready for the worker, at the share that is paid for the whole lot; null where no test speaks of it, or without a price. */
export function sentOf(key: string, piece: Piece, sheet: PriceSheet, settings: SettingsBody, share: Decimal): Sent | null {
	const subject = subjectOf(piece);
	if (typeof subject === 'string') return null;
	const all = stakeOf(piece, subject.metal, sheet, { ...settings, tiers: [{ from: ZERO, share }] });
	if (all === null) return null;
	const { count, evidence } = piece;
	return {
		key,
		count,
		subject,
		evidence: evidence === undefined ? null : evidenceShape.write(evidence),
		stake: { whole: all.whole / count, price: all.price / count }
	};
}
