import { defaultLosses, expected } from '$trade/melt/losses.ts';
import { yieldFromSums } from '$trade/melt/of-sums.ts';
import { estimateOf, type LotSums } from '$trade/lot/sums.ts';
import { metals, type MetalId } from '$trade/metal/metals.ts';
import { toNumber, type Exact } from '$trade/number/exact.ts';
import { volatilityOf, widen, ageOf } from '$trade/price/age.ts';
import { printedValue, uncertainValue, type Value } from '$trade/price/value.ts';
import type { Offer } from '$trade/price/offer.ts';
import { budget, type BudgetRow } from '$trade/uncertainty/budget.ts';
import { interval } from '$trade/uncertainty/coverage.ts';
import type { Uncertain } from '$trade/uncertainty/uncertain.ts';
import { metalName } from '$ui/metal-name.ts';
import { className } from '$ui/class-words.ts';
import { cashRounding } from './cash-rounding.ts';
import type { Shop } from './shop.svelte.ts';

/** What the "why?" sheet shows of one figure. */
export type Why = {
	readonly title: string;
	readonly figure: string;
	readonly uncertainty: string;
	readonly inputs: readonly { name: string; value: string; how?: string }[];
	readonly formula: string;
	readonly budget: readonly { source: string; u: string; share: number }[];
	readonly source: string;
	readonly note: string;
};

/** Nine times in ten. */
export const COVERAGE = 0.9;

const ESTIMATE = 'An estimate is not an assay. Only an assay of the melted and sampled metal decides.';

/** The source of an uncertainty, in words a buyer knows. */
export function sourceWords(source: string, shop: Shop): string {
	const [kind = '', ...rest] = source.split(':');
	const about = rest.join(':');
	switch (kind) {
		case 'class':
			return `how far this class runs from its mark: ${className(about)}`;
		case 'scale':
			return `the scale ${shop.scales.find(({ id }) => id === about)?.name ?? ''}, shared by everything weighed on it`;
		case 'tester':
			return `the own error of ${shop.testers.find(({ id }) => id === about)?.name ?? 'a tester that is gone'}, shared by all that it read`;
		case 'pieces':
			return 'each piece by itself: reading, deductions, its own fineness';
		case 'price':
			return `the age of the ${metals[about as MetalId].name} price`;
		case 'loss':
		case 'nonmetal':
			return `what melts away from “${about}” metal`;
		case 'retention':
			return `fine metal left in slag and crucible from “${about}” metal`;
		default:
			return source;
	}
}

function shares(of: Uncertain, unit: string, shop: Shop): Why['budget'] {
	return inWords(budget(of), (source) => sourceWords(source, shop)).map(({ source, u, share }) => ({
		source,
		u: `${shop.format.estimate(u)}${unit === '' ? '' : `\u00a0${unit}`}`,
		share
	}));
}

/** A budget under the words of its sources; sources that have the same words, each independent, as one row. */
export function inWords(rows: readonly BudgetRow[], words: (source: string) => string): BudgetRow[] {
	const all = new Map<string, BudgetRow>();
	for (const { source, u, share } of rows) {
		const said = words(source);
		const known = all.get(said);
		all.set(said, { source: said, u: Math.hypot(u, known?.u ?? 0), share: share + (known?.share ?? 0) });
	}
	return [...all.values()].sort((a, b) => b.share - a.share);
}

const range = ({ low, high }: { low: number; high: number }, unit: string, shop: Shop, places = 2): string =>
	`90 % between ${shop.format.interval(Math.max(0, low), high, unit, places)}`;

/** Why the melt value is what it is: fine mass and price of each metal, and what is not known of either. */
export function whyValue(shop: Shop, sums: LotSums, value: Value): Why | null {
	const { sheet, format, now, settings } = shop;
	if (sheet === null) return null;
	const { currency } = sheet.body;
	const printed = printedValue(value, currency);
	const doubts: Partial<Record<MetalId, Uncertain>> = {};
	for (const metal of Object.keys(value.byMetal) as MetalId[]) doubts[metal] = estimateOf(sums, metal);
	const doubt = uncertainValue(doubts, sheet.body, now, settings.volatility);
	const inputs = (Object.entries(sums.fine) as [MetalId, Exact][]).map(([metal, grams]) => {
		const quote = sheet.body.quotes.find((each) => each.metal === metal);
		const part = printed.byMetal[metal];
		return {
			name: metalName(metal),
			value: part === undefined ? 'no price: counts nothing' : format.money({ amount: part, currency }),
			how: quote === undefined ? format.fine(metal, grams, 4) : `${format.fine(metal, grams, 4)} × ${format.price(quote.amount, currency)} ${format.per(quote.per)}`
		};
	});
	const days = ageOf(sheet.body, now);
	const moved = (Object.keys(value.byMetal) as MetalId[]).map(
		(metal) => `${metal} ${format.chance(widen(volatilityOf(metal, settings.volatility), days))}`
	);
	return {
		title: 'Melt value',
		figure: format.money(printed.total),
		uncertainty: range(interval(doubt, COVERAGE), currency, shop),
		inputs,
		formula:
			'Sum over metals of fine grams × price per gram. Fine grams are net mass × the fineness taken ÷ 1000, kept as exact fractions; ' +
			'the sum is rounded once, to the minor unit, halves to even.',
		budget: shares(doubt, currency, shop),
		source: `Arithmetic. Prices: ${sheet.body.source === '' ? 'typed without a source' : sheet.body.source}, ${format.age(sheet.body.at, now)}${moved.length === 0 ? '' : `; since then they may have moved by ${moved.join(', ')}`}. Uncertainty: JCGM 100:2008 (GUM) 5.2.2.`,
		note: `Before losses in the melt and a refiner’s terms. ${ESTIMATE}`
	};
}

/** Why the offer is what it is: the tier, the share and the rounding. */
export function whyOffer(shop: Shop, value: Value, offer: Offer): Why | null {
	const { sheet, format, settings } = shop;
	if (sheet === null) return null;
	const { currency } = sheet.body;
	const { step } = cashRounding(settings, currency);
	return {
		title: 'Offer',
		figure: format.money(offer.offer),
		uncertainty: '',
		inputs: [
			{ name: 'Melt value', value: format.worth(value.total, currency) },
			{ name: 'Share of the tier', value: format.share(offer.share) },
			...settings.tiers.map(({ from, share }) => ({ name: `Tier from ${format.money({ amount: from, currency })}`, value: format.share(share) })),
			{
				name: 'Rounded down to',
				value: step === undefined ? 'the minor unit' : format.money({ amount: step, currency })
			}
		],
		formula: 'Melt value × the share of the highest tier it reaches, rounded down once.',
		budget: [],
		source: 'Common practice, no source. Shares and steps are your own: Book, Settings.',
		note: ''
	};
}

/** Why the remelted bar is expected to be what it is. */
export function whyYield(shop: Shop, sums: LotSums): Why | null {
	const { format, settings } = shop;
	const found = yieldFromSums(sums, settings.losses);
	if (!found.ok) return null;
	const bar = found.value;
	const classes = [...new Set(Object.values(sums.byClass).map(({ lossClass }) => lossClass))];
	const percent = (value: Exact): string => format.share(value);
	return {
		title: 'Remelt yield',
		figure: `${format.mass(bar.bar, 'g', 2)} bar`,
		uncertainty: range(interval(bar.barMass, COVERAGE), 'g', shop),
		inputs: [
			{ name: 'Net mass in', value: format.mass(bar.net, 'g', 2) },
			{ name: 'Dirt, stones, flux', value: `− ${format.mass(bar.nonMetal, 'g', 2)}` },
			{ name: 'Metal lost', value: `− ${format.mass(bar.metalLoss, 'g', 2)}` },
			...classes.map((lossClass) => {
				const { nonMetal, metalLoss, retention } = { ...defaultLosses[lossClass], ...settings.losses[lossClass] };
				return {
					name: `“${lossClass}” metal`,
					value: settings.losses[lossClass] === undefined ? 'working default' : 'your own figures',
					how: `not metal ${percent(expected(nonMetal))}, metal lost ${percent(expected(metalLoss))}, fine metal kept ${percent(expected(retention))}`
				};
			})
		],
		formula: 'Bar = sum over classes of net × (1 − not metal) × (1 − metal lost). Fine metal = kept share × net × (1 − not metal) × fineness.',
		budget: shares(bar.barMass, 'g', shop),
		source:
			'Conservation of mass; delta method, JCGM 100:2008 (GUM) 5.2.2. Losses by class are working defaults from the trade, no source, ' +
			'yours to change in Book, Settings.',
		note: `${toNumber(bar.net) < 5 ? 'So little metal is hard to melt without larger losses. ' : ''}${ESTIMATE}`
	};
}
