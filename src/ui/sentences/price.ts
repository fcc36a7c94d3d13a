import type { LossPart, LossProblem } from '$trade/melt/losses.ts';
import type { MeltProblem } from '$trade/melt/yield.ts';
import { metals } from '$trade/metal/metals.ts';
import type { AskedProblem } from '$trade/price/asked.ts';
import type { CurrencyProblem } from '$trade/price/currency.ts';
import type { OfferProblem } from '$trade/price/offer.ts';
import type { PriceProblem } from '$trade/price/price-sheet.ts';
import type { Format } from '../format.ts';

/** What is wrong with a price, an offer's terms, an asked price or the losses of a melt. */
export type MoneyProblem = CurrencyProblem | PriceProblem | OfferProblem | AskedProblem | LossProblem | MeltProblem;

const parts: Readonly<Record<LossPart, string>> = {
	nonMetal: 'The share that is no metal',
	metalLoss: 'The metal loss',
	retention: 'The share of fine metal kept'
};

export function moneySentence(problem: MoneyProblem, format: Format): string {
	switch (problem.kind) {
		case 'currency-unknown':
			return `“${problem.text}” is not a currency we know. Write its three letters, such as EUR, USD or CHF.`;
		case 'currency-cash-step':
			return (
				`Cash in ${problem.currency} cannot go in steps of ${format.number(problem.step)}. ` +
				`Take ${format.number(problem.minorUnit)} or a whole number of them.`
			);
		case 'price-twice':
			return `${metals[problem.metal].name} has two prices on this sheet. Keep one of them.`;
		case 'price-sheet-empty':
			return 'This sheet has no price yet. Type at least one.';
		case 'price-sheet-ahead':
			return `These prices are dated ${format.count(problem.minutes)} minutes after the clock of this device. Check the clock, then the prices.`;
		case 'price-sheet-old':
			return `These prices are ${format.estimate(problem.days, 2)} days old; you wanted them no older than ${format.estimate(problem.most, 2)}. Type today’s.`;
		case 'offer-no-tiers':
			return 'There is no share to pay yet. Set at least one, from a value of 0.';
		case 'offer-first-tier':
			return `The lowest share begins at ${format.number(problem.from)}, so smaller lots have none. Let it begin at 0.`;
		case 'offer-tier-twice':
			return `Two shares begin at ${format.number(problem.from)}. Keep one of them.`;
		case 'offer-tier-from':
			return `A share cannot begin at ${format.number(problem.from)}; lots are worth nothing or more.`;
		case 'offer-share':
			return `A share of ${format.share(problem.share)} cannot be paid. It must be more than 0 % and at most 100 %.`;
		case 'asked-too-fine':
			return `“${problem.text}” is finer than ${problem.currency} goes. The smallest step is ${format.number(problem.minorUnit)}.`;
		case 'loss-range-reversed':
			return `The range runs from ${format.share(problem.low)} down to ${format.share(problem.high)}. Put the smaller figure first.`;
		case 'loss-range-outside':
			return (
				`${parts[problem.part]} cannot be ${format.share(problem.value)}. ` +
				`It lies between ${format.share(problem.least)} and ${format.share(problem.most)}.`
			);
		case 'melt-empty':
			return 'Nothing is left to melt: the net mass is zero. Add a piece or check the deductions.';
	}
}
