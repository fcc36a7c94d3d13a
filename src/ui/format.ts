import { divisionOf, type Weighing } from '$trade/mass/weighing.ts';
import { massUnits, type MassUnitId } from '$trade/mass/units.ts';
import { karatsOf, type Fineness } from '$trade/metal/fineness.ts';
import type { MetalId } from '$trade/metal/metals.ts';
import { placesOf, type CurrencyCode } from '$trade/price/currency.ts';
import type { Money } from '$trade/price/money.ts';
import { decimal, Decimal } from '$trade/number/decimal.ts';
import { exact, type Exact, times } from '$trade/number/exact.ts';
import { round } from '$trade/number/rounding.ts';

/** Keeps a figure and its unit on one line. */
const TIGHT = '\u00a0';
const DAY = 86_400_000;

/** How many places to print: exactly so many, or at least and at most. */
export type Places = number | { readonly least: number; readonly most: number };

/** Sums of masses in grams: two places, a third where a scale shows one. What was typed keeps its own digits. */
export const GRAMS_SHOWN: Places = { least: 2, most: 3 };

/**
 * The only way from a decimal or a fraction to text that a person reads, in the language of numbers that the buyer chose.
 * What is exact goes to `Intl` as a text and never passes through a float; a fraction is rounded once, here, half-even,
 * for the places shown. Estimates (a `number`) have their own functions.
 */
export class Format {
	readonly language: string;
	readonly #numbers = new Map<string, Intl.NumberFormat>();
	readonly #dates = new Map<string, Intl.DateTimeFormat>();

	/** `language` is a BCP 47 tag such as "en" or "de-CH"; one that the platform does not know falls back to English. */
	constructor(language: string) {
		this.language = knownLanguage(language);
	}

	#intl(options: Intl.NumberFormatOptions): Intl.NumberFormat {
		const key = JSON.stringify(options);
		const known = this.#numbers.get(key);
		if (known !== undefined) return known;
		const made = new Intl.NumberFormat(this.language, { numberingSystem: 'latn', ...options });
		this.#numbers.set(key, made);
		return made;
	}

	#text(value: Decimal | Exact, places: Places | null, options: Intl.NumberFormatOptions = {}): string {
		const own = value instanceof Decimal ? value.decimalPlaces() : 0;
		const { least, most } = typeof places === 'number' ? { least: places, most: places } : (places ?? { least: 0, most: own });
		const rounded = round(value, stepOf(most), 'half-even');
		const intl = this.#intl({ ...options, minimumFractionDigits: least, maximumFractionDigits: most });
		return trueMinus(intl.format(rounded.toFixed(most) as Intl.StringNumericLiteral));
	}

	/** A plain number; without `places` a decimal is printed with every digit it has. */
	number(value: Decimal | Exact, places?: Places): string {
		return this.#text(value, value instanceof Decimal ? (places ?? null) : (places ?? { least: 0, most: 6 }));
	}

	count(value: number): string {
		return this.#intl({ maximumFractionDigits: 0 }).format(value);
	}

	/** "348.27 g", "8 dwt": in the unit given; the amount is in that unit. Without `places` every digit of a decimal. */
	mass(amount: Decimal | Exact, unit: MassUnitId = 'g', places?: Places): string {
		return this.number(amount, places) + TIGHT + massUnits[unit].symbol;
	}

	/** A weighing with the digits that were typed: "12.30 g" stays "12.30 g". */
	weighing(w: Weighing): string {
		const typed = divisionOf({ ...w, division: null }).decimalPlaces();
		return this.mass(w.reading, w.unit, Math.max(typed, w.reading.decimalPlaces()));
	}

	/** "3.60 g Au". */
	fine(metal: MetalId, grams: Exact | Decimal, places: Places = 2): string {
		return `${this.mass(grams, 'g', places)}${TIGHT}${metal}`;
	}

	/** "585 ‰"; at most one place unless more are asked for. */
	fineness(value: Fineness, places: Places = { least: 0, most: 1 }): string {
		return `${this.#text(value.perMille, places)}${TIGHT}‰`;
	}

	/** "14 kt". */
	karats(value: Fineness, places: Places = { least: 0, most: 2 }): string {
		return `${this.#text(karatsOf(value), places)}${TIGHT}kt`;
	}

	/** "€1,124.00": with its currency, all minor units, and never fewer digits than the amount has. */
	money(value: Money): string {
		return this.#text(value.amount, moneyPlaces(value.amount, value.currency), { style: 'currency', currency: value.currency });
	}

	/** The amount alone, for rows under a total that names the currency. */
	amount(value: Money): string {
		return this.#text(value.amount, moneyPlaces(value.amount, value.currency));
	}

	/** An exact value that is not rounded to money yet, shown to the minor unit; what is paid goes through `money`. */
	worth(value: Exact, currency: CurrencyCode): string {
		return this.#text(value, placesOf(currency), { style: 'currency', currency });
	}

	/** A price as typed, "4,186.20 per ozt"; at least the minor unit, and every digit that was typed. */
	price(amount: Decimal, currency: CurrencyCode): string {
		return this.#text(amount, moneyPlaces(amount, currency));
	}

	per(unit: MassUnitId): string {
		return `per${TIGHT}${massUnits[unit].symbol}`;
	}

	/** A share of one as percent, "85 %", or "0.85" as "85 %". */
	share(value: Decimal | Exact, places: Places = { least: 0, most: 2 }): string {
		const hundred = times(value instanceof Decimal ? exact(value) : value, exact(100n));
		return `${this.#text(hundred, places)}${TIGHT}%`;
	}

	/** An estimate, to so many significant digits; never anything that is paid. */
	estimate(value: number, digits = 3): string {
		if (!Number.isFinite(value)) return 'unknown';
		return trueMinus(this.#intl({ maximumSignificantDigits: digits, minimumSignificantDigits: 1 }).format(value));
	}

	/** An estimated chance or share of one, "2.6 %"; never "0 %" or "100 %" for what is only likely. */
	chance(value: number): string {
		if (!Number.isFinite(value)) return 'unknown';
		if (value > 0 && value < 0.001) return `under${TIGHT}${this.#tenths(0.1)}${TIGHT}%`;
		if (value < 1 && value > 0.999) return `over${TIGHT}${this.#tenths(99.9)}${TIGHT}%`;
		return `${this.#tenths(value * 100)}${TIGHT}%`;
	}

	#tenths(value: number): string {
		return trueMinus(this.#intl({ maximumFractionDigits: 1 }).format(value));
	}

	/** An interval of an estimate, "12.1–12.9 g Au": both ends to the same places. */
	interval(low: number, high: number, unit = '', places = 2): string {
		if (!Number.isFinite(low) || !Number.isFinite(high)) return 'unknown';
		const intl = this.#intl({ minimumFractionDigits: places, maximumFractionDigits: places });
		return `${trueMinus(intl.format(low))}–${trueMinus(intl.format(high))}${unit === '' ? '' : TIGHT + unit}`;
	}

	/** "3 May 2025". */
	date(at: number): string {
		return this.#date({ day: 'numeric', month: 'short', year: 'numeric' }).format(at);
	}

	/** "3 May 2025, 14:05". */
	moment(at: number): string {
		return this.#date({ day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' }).format(at);
	}

	#date(options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
		const key = JSON.stringify(options);
		const known = this.#dates.get(key);
		if (known !== undefined) return known;
		const made = new Intl.DateTimeFormat(this.language, { numberingSystem: 'latn', ...options });
		this.#dates.set(key, made);
		return made;
	}

	/** How long ago, "14 min ago", "yesterday"; a moment that has not come yet says so. */
	age(at: number, now: number): string {
		const minutes = Math.floor((now - at) / 60_000);
		if (minutes < -5) return 'ahead of this clock';
		if (minutes < 1) return 'just now';
		if (minutes < 60) return `${minutes}${TIGHT}min ago`;
		if (minutes < 60 * 24) return `${Math.floor(minutes / 60)}${TIGHT}h ago`;
		const days = Math.round((dayOf(now) - dayOf(at)) / DAY);
		if (days <= 1) return 'yesterday';
		return days < 60 ? `${days}${TIGHT}days ago` : this.date(at);
	}
}

const kept = new Map<string, Format>();

/** The format of a language, made once. */
export function formatFor(language: string): Format {
	const known = kept.get(language);
	if (known !== undefined) return known;
	const made = new Format(language);
	kept.set(language, made);
	return made;
}

function knownLanguage(tag: string): string {
	try {
		return Intl.NumberFormat.supportedLocalesOf([tag])[0] ?? 'en';
	} catch {
		return 'en';
	}
}

function moneyPlaces(amount: Decimal, currency: CurrencyCode): Places {
	const minor = placesOf(currency);
	return { least: minor, most: Math.max(minor, amount.decimalPlaces()) };
}

function stepOf(places: number): Decimal {
	return decimal(places === 0 ? '1' : `0.${'0'.repeat(places - 1)}1`);
}

/** Midnight at the start of a moment's day, here. */
function dayOf(at: number): number {
	return new Date(at).setHours(0, 0, 0, 0);
}

/** A hyphen is not a minus sign. */
function trueMinus(text: string): string {
	return text.replace('-', '\u2212');
}
