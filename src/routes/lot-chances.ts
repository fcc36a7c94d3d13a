import { fineMixture } from '$trade/lot/fine-mixture.ts';
import { estimateOf } from '$trade/lot/sums.ts';
import { mainMetals } from '$trade/evidence/subject.ts';
import type { OpenLot } from './open-lot.svelte.ts';
import type { Shop } from './shop.svelte.ts';
import { COVERAGE } from './why.ts';

/** Between what and what the fine metal of a lot lies when some pieces may not be what they are taken for: a sentence for each metal. */
export function lotChances({ format, settings, scales }: Shop, lot: OpenLot): readonly string[] {
	const held = lot.all();
	if (held === null) {
		return [
			'This lot is too long to count, piece by piece, the chance that some are not what they are taken for: ' +
				'its intervals take each piece for what it says.'
		];
	}
	const entries = held.flatMap(({ subject, body }) => {
		if (body === null) return [];
		const scale = scales.find(({ id }) => id === body.piece.weighing.scale);
		return [{ piece: body.piece, key: subject, scale }];
	});
	const { priors: own, spreads } = settings;
	return mainMetals.flatMap((metal) => {
		const found = fineMixture(entries, metal, { estimate: estimateOf(lot.sums, metal), own, spreads, coverage: COVERAGE });
		if (found === null) return [];
		const between = format.interval(found.low, found.high, `g\u00a0${metal}`);
		const middle = `${format.estimate(found.mean, 4)}\u00a0g`;
		return [`Counting the chance that a piece is not what it is taken for: nine times in ten ${between}, ${middle} on average.`];
	});
}
