import { assert, decimal, Decimal } from '../number/decimal.ts';
import { divide, exact, ratio, times, type Exact } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import type { Mass } from './mass.ts';

export type MassUnitId =
	| 'g'
	| 'kg'
	| 'mg'
	| 'ozt'
	| 'dwt'
	| 'gr'
	| 'oz-av'
	| 'lb-av'
	| 'ct'
	| 'tola'
	| 'tola-in'
	| 'baht-bar'
	| 'baht-ornament'
	| 'momme'
	| 'tael-hk'
	| 'tael-hk-exchange'
	| 'tael-tw';

export type MassUnit = {
	readonly id: MassUnitId;
	readonly name: string;
	readonly symbol: string;
	/** Grams in one of the unit, exactly. */
	readonly grams: Decimal;
	readonly source: string;
};

const SI = 'BIPM SI Brochure, 9th edition, 2.3.1 and 3';
const HB44 = 'NIST Handbook 44, appendix C';
const INDIA = 'India, Standards of Weights and Measures Act 1956, second schedule, from memory';
const HONG_KONG = 'Hong Kong, Weights and Measures Ordinance, Cap. 68, schedule 1, part V: 1/16 catty of 0.60478982 kg';
const BULLION = 'bullion trade of Hong Kong, common practice, no source';
const THAI = 'gold trade of Thailand, common practice, no source';

function unit(id: MassUnitId, symbol: string, name: string, grams: string, source: string): MassUnit {
	return { id, name, symbol, grams: decimal(grams), source };
}

/** Every unit in which a mass is typed or a price is quoted. None is called just "ounce", "tael" or "baht". */
export const massUnits: Readonly<Record<MassUnitId, MassUnit>> = {
	g: unit('g', 'g', 'gram', '1', SI),
	kg: unit('kg', 'kg', 'kilogram', '1000', SI),
	mg: unit('mg', 'mg', 'milligram', '0.001', SI),
	ozt: unit('ozt', 'ozt', 'troy ounce', '31.1034768', `${HB44}: 480 grains`),
	dwt: unit('dwt', 'dwt', 'pennyweight', '1.55517384', `${HB44}: 24 grains`),
	gr: unit('gr', 'gr', 'grain', '0.06479891', HB44),
	'oz-av': unit('oz-av', 'oz av', 'avoirdupois ounce', '28.349523125', `${HB44}: 1/16 pound`),
	'lb-av': unit('lb-av', 'lb', 'avoirdupois pound', '453.59237', `${HB44}: 7000 grains`),
	ct: unit('ct', 'ct', 'metric carat', '0.2', `${HB44}: 200 milligrams`),
	tola: unit('tola', 'tola', 'tola of 3/8 troy ounce', '11.6638038', "The Statesman's Year-Book 1899, p. 104: 180 grains"),
	'tola-in': unit('tola-in', 'tola (1956)', 'tola of the Indian Act', '11.6638', INDIA),
	'baht-bar': unit('baht-bar', 'baht (bar)', 'baht weight of bars', '15.244', THAI),
	'baht-ornament': unit('baht-ornament', 'baht (ornament)', 'baht weight of ornaments', '15.16', THAI),
	momme: unit('momme', 'momme', 'momme', '3.75', 'Japan, Measurement Act: 1/1000 kan of 3.75 kg, from memory'),
	'tael-hk': unit('tael-hk', 'tael (HK)', 'Hong Kong statutory tael', '37.79936375', HONG_KONG),
	'tael-hk-exchange': unit('tael-hk-exchange', 'tael (HK exchange)', 'Hong Kong bullion exchange tael', '37.429', BULLION),
	'tael-tw': unit('tael-tw', 'tael (TW)', 'Taiwan tael', '37.5', 'gold trade of Taiwan, common practice, no source: ten momme')
};

/**
 * What it is: an amount of a unit as a mass.
 * formula: grams = amount x grams in one of the unit.
 * rounding: none; an amount too long to stay exact is our own mistake.
 * source: the table above, unit by unit.
 */
export function toMass(amount: Decimal, id: MassUnitId): Mass {
	const { grams } = massUnits[id];
	assert(amount.precision() + grams.precision() <= Decimal.precision, `${amount.toString()} ${id} has too many digits`);
	return { grams: amount.times(grams) };
}

/**
 * What it is: a mass counted in a unit, undivided.
 * formula: amount = grams / grams in one of the unit.
 * rounding: none; the quotient stays a fraction.
 * source: the table above, unit by unit.
 */
export function inUnit(mass: Mass, id: MassUnitId): Exact {
	return ratio(mass.grams, massUnits[id].grams);
}

/**
 * What it is: an amount of one unit counted in another.
 * formula: amount x grams in one of the first / grams in one of the second.
 * rounding: none.
 * source: the table above, unit by unit.
 */
export function convert(amount: Exact, from: MassUnitId, to: MassUnitId): Exact {
	return divide(times(amount, exact(massUnits[from].grams)), exact(massUnits[to].grams));
}

export type UnitProblem =
	| { readonly kind: 'unit-missing' }
	| { readonly kind: 'unit-unknown'; readonly text: string }
	| { readonly kind: 'unit-ambiguous'; readonly text: string; readonly choices: readonly MassUnitId[] };

/** What people write, in lower case without dots, hyphens as spaces. */
const WRITTEN: Readonly<Record<MassUnitId, readonly string[]>> = {
	g: ['g', 'gm', 'gms', 'grm', 'grms', 'gram', 'grams', 'gramme', 'grammes', 'gramm'],
	kg: ['kg', 'kgs', 'kilo', 'kilos', 'kilogram', 'kilograms', 'kilogramme', 'kilogrammes', 'kilogramm'],
	mg: ['mg', 'mgs', 'milligram', 'milligrams', 'milligramme', 'milligrammes', 'milligramm'],
	ozt: [
		'ozt', 'oz t', 'ozs t', 't oz', 'toz', 'oz tr', 'oz troy', 'troy oz', 'troy ozs', 'troy ounce', 'troy ounces', 'ounce troy',
		'ounces troy'
	],
	dwt: ['dwt', 'dwts', 'pwt', 'pwts', 'pennyweight', 'pennyweights'],
	gr: ['gr', 'grain', 'grains'],
	'oz-av': ['oz av', 'oz avdp', 'oz avoirdupois', 'avoirdupois ounce', 'avoirdupois ounces', 'av oz', 'avdp oz'],
	'lb-av': ['lb', 'lbs', 'lb av', 'lb avdp', 'pound', 'pounds', 'avoirdupois pound', 'avoirdupois pounds'],
	ct: ['ct', 'cts', 'carat', 'carats', 'metric carat', 'metric carats'],
	tola: ['tola', 'tolas'],
	'tola-in': ['tola in', 'tola (1956)', 'tola 1956'],
	'baht-bar': ['baht bar', 'baht (bar)', 'bar baht'],
	'baht-ornament': ['baht ornament', 'baht (ornament)', 'ornament baht'],
	momme: ['momme', 'mommes'],
	'tael-hk': ['tael hk', 'tael (hk)', 'hk tael', 'hong kong tael'],
	'tael-hk-exchange': ['tael hk exchange', 'tael (hk exchange)', 'hk exchange tael'],
	'tael-tw': ['tael tw', 'tael (tw)', 'tw tael', 'taiwan tael']
};

const TAELS: readonly MassUnitId[] = ['tael-hk', 'tael-hk-exchange', 'tael-tw'];
const OUNCES: readonly MassUnitId[] = ['ozt', 'oz-av'];

/** Words that mean more than one unit: asked about, never guessed. "grs" is written for grams and for grains. */
const ASKED: ReadonlyMap<string, readonly MassUnitId[]> = new Map([
	...['oz', 'ozs', 'ounce', 'ounces'].map((word) => [word, OUNCES] as const),
	...['tael', 'taels', 'leung', 'liang'].map((word) => [word, TAELS] as const),
	['baht', ['baht-bar', 'baht-ornament']],
	['grs', ['g', 'gr']]
]);

const READ: ReadonlyMap<string, MassUnitId> = new Map(
	(Object.keys(WRITTEN) as MassUnitId[]).flatMap((id) => WRITTEN[id].map((word) => [word, id] as const))
);

const LONGEST_SHOWN = 40;

/** The unit that a word means; capitals, dots, hyphens and spaces around do not matter. */
export function parseUnit(text: string): Result<MassUnitId, UnitProblem> {
	const shown = text.trim();
	if (shown === '') return fail({ kind: 'unit-missing' });
	const word = shown.toLowerCase().replace(/\./g, ' ').replace(/[\s_-]+/g, ' ').trim();
	const id = READ.get(word) ?? READ.get(word.replace(/ /g, ''));
	if (id !== undefined) return ok(id);
	const choices = ASKED.get(word);
	if (choices !== undefined) return fail({ kind: 'unit-ambiguous', text: shown, choices });
	return fail({ kind: 'unit-unknown', text: shown.slice(0, LONGEST_SHOWN) });
}
