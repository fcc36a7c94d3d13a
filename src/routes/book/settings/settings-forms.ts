import { lossesOf, parseLossRange, type LossPart, type LossProblem, type Losses, type Range } from '$trade/melt/losses.ts';
import type { LossClassId } from '$trade/piece/loss-class.ts';
import { defaultSpreads, type Spread, type SpreadId } from '$trade/piece/class-spread.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import type { Decimal } from '$trade/number/decimal.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '$trade/number/field.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import { volatilityOf, type Volatility } from '$trade/price/age.ts';
import { tiers, type OfferProblem, type Tier } from '$trade/price/offer.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import { typedEstimate, typedNumber, typedPercent } from '$ui/format/typed-text.ts';

/** What is typed in the forms of the settings, and what it means. */

export type TypedTier = { readonly from: string; readonly share: string };

export function typedTiers(list: readonly Tier[], mark: DecimalMark): TypedTier[] {
	return list.map(({ from, share }) => ({ from: typedNumber(from, mark), share: typedPercent(share, mark) }));
}

export type TierProblem = { readonly row: number | null; readonly field: 'from' | 'share' | null; readonly problem: NumberProblem | OfferProblem };

/** The tiers as typed, or the first thing wrong with them and the row it is in. */
export function readTiers(rows: readonly TypedTier[], mark: DecimalMark): Result<readonly Tier[], TierProblem> {
	const list: Tier[] = [];
	for (const [row, typed] of rows.entries()) {
		const from = parseNumber(typed.from, { mark });
		if (!from.ok) return fail({ row, field: 'from', problem: from.problem });
		const share = parseNumber(typed.share, { mark });
		if (!share.ok) return fail({ row, field: 'share', problem: share.problem });
		list.push({ from: from.value, share: share.value.div(100) });
	}
	const checked = tiers(list);
	if (checked.ok) return checked;
	const { problem } = checked;
	if (problem.kind === 'offer-no-tiers') return fail({ row: null, field: null, problem });
	// of two that begin together, the later row is the one to change
	const row = list.findLastIndex(({ from }) => from.equals(problem.from));
	return fail({ row: row === -1 ? null : row, field: problem.kind === 'offer-share' ? 'share' : 'from', problem });
}

export type TypedSelling = { readonly days: string; readonly volatility: { readonly [metal: string]: string } };

/** No buyer holds scrap for longer than ten years. */
export const MOST_DAYS = '3650';

export function typedSelling({ days, volatility }: SettingsBody, shown: readonly MetalId[], mark: DecimalMark): TypedSelling {
	return {
		days: String(days),
		volatility: Object.fromEntries(shown.map((metal) => [metal, typedEstimate(volatilityOf(metal, volatility), mark)]))
	};
}

/** What is wrong, and the metal whose figure it is in; null: in the days. */
export type SellingProblem = { readonly metal: MetalId | null; readonly problem: NumberProblem };

/** Days and volatilities; a figure that is the default, or left empty, is not kept as the buyer's own. */
export function readSelling(
	typed: TypedSelling,
	shown: readonly MetalId[],
	mark: DecimalMark
): Result<{ readonly days: number; readonly volatility: Volatility }, SellingProblem> {
	const days = parseNumber(typed.days, { mark, whole: true, most: MOST_DAYS });
	if (!days.ok) return fail({ metal: null, problem: days.problem });
	const volatility: Volatility = {};
	for (const metal of shown) {
		const text = typed.volatility[metal] ?? '';
		if (text.trim() === '' || text === typedEstimate(volatilityOf(metal), mark)) continue;
		const read = parseNumber(text, { mark, most: '1000' });
		if (!read.ok) return fail({ metal, problem: read.problem });
		volatility[metal] = share(read.value);
	}
	return ok({ days: days.value.toNumber(), volatility });
}

/** An estimate as the share that its percentage says. */
function share(percent: Decimal): number {
	return percent.div(100).toNumber();
}

export const lossParts: readonly LossPart[] = ['nonMetal', 'metalLoss', 'retention'];

export type TypedRange = { readonly low: string; readonly high: string };
export type TypedLosses = { readonly [part in LossPart]: TypedRange };

export function typedLosses(losses: Losses, mark: DecimalMark): TypedLosses {
	const typed = ({ low, high }: Range): TypedRange => ({ low: typedPercent(low, mark), high: typedPercent(high, mark) });
	return { nonMetal: typed(losses.nonMetal), metalLoss: typed(losses.metalLoss), retention: typed(losses.retention) };
}

export type RangeProblem = { readonly part: LossPart; readonly end: 'low' | 'high'; readonly problem: NumberProblem | LossProblem };

/** The losses of a class as typed: only the parts that differ from the default are the buyer's own. */
export function readLosses(lossClass: LossClassId, typed: TypedLosses, mark: DecimalMark): Result<Partial<Losses>, RangeProblem> {
	const usual = lossesOf(lossClass);
	const own: { -readonly [part in LossPart]?: Range } = {};
	for (const part of lossParts) {
		const { low, high } = typed[part];
		const read = parseLossRange(part, low, high, mark);
		if (!read.ok) return fail({ part, end: endOf(read.problem, low, mark), problem: read.problem });
		if (!read.value.low.equals(usual[part].low) || !read.value.high.equals(usual[part].high)) own[part] = read.value;
	}
	return ok(own);
}

function endOf(problem: NumberProblem | LossProblem, low: string, mark: DecimalMark): 'low' | 'high' {
	const first = parseNumber(low, { mark, most: '100' });
	if (!first.ok) return 'low';
	return problem.kind === 'loss-range-outside' && problem.value.equals(first.value.div(100)) ? 'low' : 'high';
}

export type TypedSpread = { readonly shared: string; readonly own: string };

export function typedSpread({ shared, own }: Spread, mark: DecimalMark): TypedSpread {
	return { shared: typedEstimate(shared, mark), own: typedEstimate(own, mark) };
}

/** The spread of a class as typed; null when it is the default. */
export function readSpread(id: SpreadId, typed: TypedSpread, mark: DecimalMark): Result<Spread | null, NumberProblem> {
	const shared = parseNumber(typed.shared, { mark, most: '100' });
	if (!shared.ok) return shared;
	const own = parseNumber(typed.own, { mark, most: '100' });
	if (!own.ok) return own;
	const usual = defaultSpreads[id];
	const read = { shared: share(shared.value), own: share(own.value) };
	return ok(read.shared === usual.shared && read.own === usual.own ? null : read);
}
