import { lossRange, type LossOverrides, type LossPart, type Losses, type Range } from '../../melt/losses.ts';
import type { MassUnitId } from '../../mass/units.ts';
import { decimal, ZERO, type Decimal } from '../../number/decimal.ts';
import type { DecimalMark } from '../../number/field.ts';
import { defaultSpreads, type Spread, type SpreadId } from '../../piece/class-spread.ts';
import { lossClasses } from '../../piece/loss-class.ts';
import type { Volatility } from '../../price/age.ts';
import type { CurrencyCode } from '../../price/currency.ts';
import { tiers, type Tier } from '../../price/offer.ts';
import { byKey, decimalText, list, name, notNegative, nullable, object, oneOf, positiveText, refined, text, whole } from '../shape.ts';
import { currency, massUnit, metal } from './shared.ts';

/** The buyer's own settings, one subject per book ('settings'). What is not set here has its default in its own folder. */
export type SettingsBody = {
	readonly currency: CurrencyCode;
	readonly mark: DecimalMark;
	readonly massUnit: MassUnitId;
	/** The scale on the counter; null: the division is taken from the digits typed. */
	readonly scale: string | null;
	/** Cash is handed over in these steps; null: the minor unit. */
	readonly cashStep: Decimal | null;
	readonly tiers: readonly Tier[];
	readonly volatility: Volatility;
	/** Days from the purchase until the metal is sold, for the chance of loss. */
	readonly days: number;
	readonly spreads: Partial<Record<SpreadId, Spread>>;
	readonly losses: LossOverrides;
	/** Language of numbers and dates; null: the device's. */
	readonly language: string | null;
};

/**
 * What counts until the buyer has said otherwise. The share paid and the days until the sale are working defaults:
 * common practice, no source, editable and shown as such.
 */
export function defaultSettings(): SettingsBody {
	return {
		currency: 'USD',
		mark: 'dot',
		massUnit: 'g',
		scale: null,
		cashStep: null,
		tiers: [{ from: ZERO, share: decimal('0.85') }],
		volatility: {},
		days: 14,
		spreads: {},
		losses: {},
		language: null
	};
}

const range = (part: LossPart) =>
	refined(object<Range>({ low: decimalText, high: decimalText }), ({ low, high }) => {
		const checked = lossRange(part, low, high);
		return checked.ok ? null : `a range of losses (${checked.problem.kind})`;
	});

export const settingsShape = object<SettingsBody>({
	currency,
	mark: oneOf<DecimalMark>(['dot', 'comma']),
	massUnit,
	scale: nullable(name),
	cashStep: nullable(positiveText),
	tiers: refined(list(object<Tier>({ from: decimalText, share: decimalText })), (found) => {
		const read = tiers(found);
		return read.ok ? null : `tiers (${read.problem.kind})`;
	}),
	volatility: byKey(metal, notNegative),
	days: whole,
	spreads: byKey(
		oneOf(Object.keys(defaultSpreads) as SpreadId[]),
		object<Spread>({ shared: notNegative, own: notNegative })
	),
	losses: byKey(
		oneOf(lossClasses),
		object<Partial<Losses>>(
			{ nonMetal: range('nonMetal'), metalLoss: range('metalLoss'), retention: range('retention') },
			['nonMetal', 'metalLoss', 'retention']
		)
	),
	language: nullable(text)
});
