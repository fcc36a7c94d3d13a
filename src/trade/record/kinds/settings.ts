import { findingKinds } from '../../evidence/finding.ts';
import { checkOdds, type Odds, type OwnOdds } from '../../evidence/odds.ts';
import { origins } from '../../evidence/origin.ts';
import { checkPrudence, DEFAULT_PRUDENCE } from '../../evidence/prudence.ts';
import type { TestCosts } from '../../evidence/test-costs.ts';
import { lossRange, type LossOverrides, type LossPart, type Losses, type Range } from '../../melt/losses.ts';
import type { MassUnitId } from '../../mass/units.ts';
import { decimal, ZERO, type Decimal } from '../../number/decimal.ts';
import type { DecimalMark } from '../../number/field.ts';
import { defaultSpreads, type Spread, type SpreadId } from '../../piece/class-spread.ts';
import { lossClasses } from '../../piece/loss-class.ts';
import type { Volatility } from '../../price/age.ts';
import type { CurrencyCode } from '../../price/currency.ts';
import { tiers, type Tier } from '../../price/offer.ts';
import { byKey, decimalText, list, name, notNegative, nullable, number, object, oneOf, positiveText, refined, text, whole } from '../shape.ts';
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
	/** The chance that the bulk of a piece is at least what it is taken at after tests. */
	readonly prudence: number;
	/** What a test costs in time and damage, in the book's currency, where the buyer has said so. */
	readonly testCosts: TestCosts;
	/** The odds before any test, where the buyer has said so; each set sums to one. */
	readonly priors: OwnOdds;
	/** Language of numbers and dates; null: the device's. */
	readonly language: string | null;
};

/**
 * What counts until the buyer has said otherwise. The share paid, the days until the sale and the prudence are working defaults:
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
		prudence: DEFAULT_PRUDENCE,
		testCosts: {},
		priors: {},
		language: null
	};
}

const range = (part: LossPart) =>
	refined(object<Range>({ low: decimalText, high: decimalText }), ({ low, high }) => {
		const checked = lossRange(part, low, high);
		return checked.ok ? null : `a range of losses (${checked.problem.kind})`;
	});

const odds = refined(object<Odds>({ honest: number, under: number, other: number, layered: number }), (found) => {
	const checked = checkOdds(found);
	return checked.ok ? null : `odds (${checked.problem.kind})`;
});

/** What every version of the settings holds. */
const fields = {
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
};

export const settingsShape = object<SettingsBody>({
	...fields,
	prudence: refined(number, (found) => (checkPrudence(found).ok ? null : 'a prudence from 0.5 to 0.99')),
	testCosts: byKey(oneOf(findingKinds), refined(decimalText, (cost) => (cost.lt(0) ? 'a cost of 0 or more' : null))),
	priors: byKey(oneOf(origins), odds)
});

/** Version 1 knew no tests. */
export type Settings1 = Omit<SettingsBody, 'prudence' | 'testCosts' | 'priors'>;

export const settingsShape1 = object<Settings1>(fields);

export function settingsFrom1(found: Settings1): SettingsBody {
	const { prudence, testCosts, priors } = defaultSettings();
	return { ...found, prudence, testCosts, priors };
}
