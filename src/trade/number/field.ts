import { decimal, type Decimal } from './decimal.ts';
import { fail, ok, type Result } from './result.ts';

/** What can be wrong with a number that a person typed. Each kind has a sentence in ui/sentences. */
export type NumberProblem =
	| { readonly kind: 'number-missing' }
	| { readonly kind: 'number-unreadable'; readonly text: string }
	| { readonly kind: 'number-ambiguous'; readonly text: string; readonly asDecimal: string; readonly asThousands: string }
	| { readonly kind: 'number-negative'; readonly text: string }
	| { readonly kind: 'number-not-positive'; readonly text: string }
	| { readonly kind: 'number-not-whole'; readonly text: string }
	| { readonly kind: 'number-too-large'; readonly text: string; readonly most: string }
	| { readonly kind: 'number-too-many-digits'; readonly text: string; readonly most: number };

/** Which mark the buyer writes before the decimals. It decides only readings that would otherwise be asked about. */
export type DecimalMark = 'dot' | 'comma';

export type NumberRules = {
	/** The buyer's own decimal mark (default dot): a single group of three after the *other* mark is asked about. */
	readonly mark?: DecimalMark;
	/** Zero is refused. */
	readonly positive?: boolean;
	readonly whole?: boolean;
	/** The largest value accepted, as plain text. */
	readonly most?: string;
};

const MOST_DIGITS = 15;
const MOST = '999999999';

/**
 * A number as people type it: comma or dot before the decimals, groups of three by the other mark, a space or an
 * apostrophe. "1,234" could be 1.234 or 1234: it is asked about, never guessed, and so is "1.234" for a buyer who
 * writes decimal commas. Exponents, signs other than a leading plus, and digits of other scripts are refused.
 * rounding: none; more than 15 digits are refused.
 * source: BIPM SI Brochure 9th edition, 5.4.4 (either mark; groups of three by a space), from memory.
 */
export function parseNumber(text: string, rules: NumberRules = {}): Result<Decimal, NumberProblem> {
	const shown = text.trim();
	if (shown === '') return fail({ kind: 'number-missing' });
	const unreadable = fail<NumberProblem>({ kind: 'number-unreadable', text: shown });
	if (shown.length > 40) return unreadable;
	const negative = /^[-\u2212]/.test(shown);
	const body = shown.replace(/^[-+\u2212]\s*/, '');
	// spaces (plain, no-break, thin, narrow) and apostrophes may only stand between groups of three
	const quiet = /[ \u00a0\u2009\u202f'\u2019]/;
	let plain = body;
	if (quiet.test(body)) {
		if (!/^\d{1,3}(?:[ \u00a0\u2009\u202f'\u2019]\d{3})+(?:[.,]\d+)?$/.test(body)) return unreadable;
		plain = body.replace(/[ \u00a0\u2009\u202f'\u2019]/g, '');
		const decimals = plain.replace(',', '.');
		return check(decimals, shown, negative, rules);
	}
	if (/^\d+$/.test(plain)) return check(plain, shown, negative, rules);
	const single = /^(\d*)([.,])(\d+)$/.exec(plain);
	if (single !== null) {
		const [, whole = '', mark, rest = ''] = single;
		const asDecimal = `${whole === '' ? '0' : whole}.${rest}`;
		const other = rules.mark === 'comma' ? '.' : ',';
		const groups = /^[1-9]\d{0,2}$/.test(whole) && rest.length === 3;
		// a comma before three digits is asked of everybody; a dot only of those who write decimal commas
		if (groups && (mark === ',' || mark === other)) {
			return fail({ kind: 'number-ambiguous', text: shown, asDecimal, asThousands: whole + rest });
		}
		return check(asDecimal, shown, negative, rules);
	}
	if (/^\d+[.,]$/.test(plain)) return check(plain.slice(0, -1), shown, negative, rules);
	const grouped =
		/^([1-9]\d{0,2}(?:,\d{3})+)(?:\.(\d+))?$/.exec(plain) ?? /^([1-9]\d{0,2}(?:\.\d{3})+)(?:,(\d+))?$/.exec(plain);
	if (grouped === null) return unreadable;
	const whole = grouped[1]!.replace(/[.,]/g, '');
	return check(grouped[2] === undefined ? whole : `${whole}.${grouped[2]}`, shown, negative, rules);
}

function check(plain: string, shown: string, negative: boolean, rules: NumberRules): Result<Decimal, NumberProblem> {
	const digits = plain.replace('.', '').replace(/^0+/, '');
	if (digits.length > MOST_DIGITS) return fail({ kind: 'number-too-many-digits', text: shown, most: MOST_DIGITS });
	const value = decimal(plain);
	if (negative && !value.isZero()) return fail({ kind: 'number-negative', text: shown });
	if (rules.positive === true && value.isZero()) return fail({ kind: 'number-not-positive', text: shown });
	if (rules.whole === true && !value.isInteger()) return fail({ kind: 'number-not-whole', text: shown });
	const most = rules.most ?? MOST;
	if (value.gt(decimal(most))) return fail({ kind: 'number-too-large', text: shown, most });
	return ok(value);
}
