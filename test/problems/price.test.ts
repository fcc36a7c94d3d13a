import { describe, expect, it } from 'vitest';
import { decimal } from '../../src/trade/number/decimal.ts';
import type { Result } from '../../src/trade/number/result.ts';
import { parseAsked, type AskedProblem } from '../../src/trade/price/asked.ts';
import { sheetWarnings } from '../../src/trade/price/age.ts';
import { cashStep, parseCurrency, type CurrencyProblem } from '../../src/trade/price/currency.ts';
import { tiers, type OfferProblem, type Tier } from '../../src/trade/price/offer.ts';
import { parseQuote, priceSheet, type PriceProblem, type PriceSheet } from '../../src/trade/price/price-sheet.ts';
import { formatFor } from '../../src/ui/format.ts';
import { moneySentence, type MoneyProblem } from '../../src/ui/sentences/price.ts';

type Kind = CurrencyProblem['kind'] | PriceProblem['kind'] | OfferProblem['kind'] | AskedProblem['kind'];

function problemOf<P>(result: Result<unknown, P>): P {
	if (result.ok) throw new Error('no problem where one was wanted');
	return result.problem;
}

const typed = (text: string) => {
	const quote = parseQuote('Au', text, 'ozt');
	if (!quote.ok) throw new Error(quote.problem.kind);
	return quote.value;
};
const sheet: PriceSheet = { currency: 'EUR', quotes: [typed('3,650.40')], at: 1_760_000_000_000, source: 'board by the door' };
const tier = (from: string, share: string): Tier => ({ from: decimal(from), share: decimal(share) });
const DAY = 86_400_000;

function asked(text: string): AskedProblem {
	const problem = problemOf(parseAsked(text, 'EUR'));
	if (problem.kind !== 'asked-too-fine') throw new Error(problem.kind);
	return problem;
}

/** Each kind from what a person would really type, and a word that its sentence must hold. A kind without a row does not compile. */
const reproductions: Record<Kind, readonly [() => MoneyProblem, string]> = {
	'currency-unknown': [() => problemOf(parseCurrency('euros')), '“euros”'],
	'currency-cash-step': [() => problemOf(cashStep(decimal('0.025'), 'CHF')), '0.025'],
	'price-twice': [() => problemOf(priceSheet({ ...sheet, quotes: [typed('3650'), typed('3,651.00')] })), 'gold has two prices'],
	'price-sheet-empty': [() => problemOf(priceSheet({ ...sheet, quotes: [] })), 'no price'],
	'price-sheet-ahead': [() => sheetWarnings(sheet, sheet.at - 90 * 60_000, 1)[0]!, '90 minutes'],
	'price-sheet-old': [() => sheetWarnings(sheet, sheet.at + 3 * DAY, 1)[0]!, '3 days old'],
	'offer-no-tiers': [() => problemOf(tiers([])), 'at least one'],
	'offer-first-tier': [() => problemOf(tiers([tier('100', '0.8')])), 'begins at 100'],
	'offer-tier-twice': [() => problemOf(tiers([tier('0', '0.8'), tier('0', '0.9')])), 'Two shares begin at 0'],
	'offer-tier-from': [() => problemOf(tiers([tier('-5', '0.8'), tier('0', '0.9')])), '5'],
	'offer-share': [() => problemOf(tiers([tier('0', '85')])), '%'],
	'asked-too-fine': [() => asked('1250.505'), '“1250.505”']
};

describe('every problem with prices and offers can be produced, and says what was found', () => {
	it.each(Object.entries(reproductions))('%s', (kind, [make, word]) => {
		const problem = make();
		expect(problem.kind).toBe(kind);
		expect(moneySentence(problem, formatFor('en'))).toContain(word);
	});
});
