import { decimal, type Decimal } from '../number/decimal.ts';
import { parseNumber, type DecimalMark } from '../number/field.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { parseUnit, type MassUnitId } from '../mass/units.ts';
import type { DeductionKind } from '../piece/deduction.ts';
import type { LineProblem } from './line-problem.ts';
import type { Token } from './line-tokens.ts';

/** A number with the unit that stands after it, and what it is about if it is taken off. */
export type Amount = {
	readonly start: number;
	readonly end: number;
	/** The number as typed. */
	readonly typed: string;
	/** Null: percent of the gross mass. */
	readonly unit: MassUnitId | null;
	/** Behind a minus sign or the word "less". */
	readonly off: boolean;
	readonly what: DeductionKind | null;
	/** Places of its tokens, the words of what is taken off included. */
	readonly from: number;
	readonly to: number;
};

const DEDUCTION_WORDS: Readonly<Record<DeductionKind, readonly string[]>> = {
	stones: [
		'stone', 'diamond', 'gem', 'gemstone', 'pearl', 'ruby', 'rubies', 'sapphire', 'emerald', 'opal', 'garnet', 'cz', 'zirconia',
		'turquoise', 'amethyst', 'topaz', 'onyx', 'jade', 'cameo'
	],
	springs: ['spring'],
	pins: ['pin'],
	movement: ['movement', 'works'],
	crystal: ['crystal', 'glass'],
	filler: ['filler', 'filling', 'pitch', 'plaster', 'cement', 'resin'],
	enamel: ['enamel'],
	dirt: ['dirt', 'wax', 'grease'],
	other: ['other', 'steel', 'leather', 'cord', 'plastic', 'wood']
};

const WHAT: ReadonlyMap<string, DeductionKind> = new Map(
	(Object.keys(DEDUCTION_WORDS) as DeductionKind[]).flatMap((kind) =>
		DEDUCTION_WORDS[kind].flatMap((word): [string, DeductionKind][] => [
			[word, kind],
			[`${word}s`, kind]
		])
	)
);

export function deductionWord(token: Token | undefined): DeductionKind | null {
	return token?.kind === 'word' ? (WHAT.get(token.text.toLowerCase()) ?? null) : null;
}

export const karatOnly = /^(?:k|kt|kts|kp|karats?)$/i;
export const caratWord = /^(?:cts?|carats?)$/i;
const LESS = /^(?:less|minus)$/i;
const OF = /^(?:of|for|in)$/i;

export function isTimes(token: Token | undefined): boolean {
	return token?.kind === 'word' && /^[x*\u00d7]$/i.test(token.text);
}

/** Every number with a unit of mass or a percent sign behind it. "k" is karats; "ct" is listed as carats and judged later. */
export function readAmounts(tokens: readonly Token[]): Result<Amount[], LineProblem> {
	const found: Amount[] = [];
	tokens.forEach((token, at) => {
		if (token.kind !== 'number' && token.kind !== 'fraction') return;
		const off = tokens[at - 1]?.kind === 'minus' || LESS.test(tokens[at - 1]?.text ?? '');
		const unit = unitAfter(tokens, at);
		if (unit === null) return;
		if (unit.id === null && !off) return;
		let [from, to] = [off ? at - 1 : at, unit.to];
		let what = deductionWord(tokens[to + 1]);
		if (what !== null) to += 1;
		else if (OF.test(tokens[to + 1]?.text ?? '') && deductionWord(tokens[to + 2]) !== null) {
			what = deductionWord(tokens[to + 2]);
			to += 2;
		} else if (off && deductionWord(tokens[from - 1]) !== null) {
			from -= 1;
			what = deductionWord(tokens[from]);
		} else if (off && LESS.test(tokens[from - 1]?.text ?? '')) from -= 1;
		const end = tokens[unit.to]!.end;
		found.push({ start: token.start, end, typed: token.text, unit: unit.id, off, what, from, to });
	});
	for (const [at, token] of tokens.entries()) {
		if (token.kind !== 'number') continue;
		const word = tokens[at + 1];
		if (word?.kind !== 'word' || found.some(({ start }) => start === token.start)) continue;
		const unit = parseUnit(word.text);
		if (!unit.ok && unit.problem.kind === 'unit-ambiguous') {
			const { start, end, text } = word;
			return fail({ kind: 'line-unit', start, end, found: text, problem: unit.problem });
		}
	}
	return ok(found);
}

function unitAfter(tokens: readonly Token[], at: number): { id: MassUnitId | null; to: number } | null {
	if (tokens[at + 1]?.kind === 'percent') return { id: null, to: at + 1 };
	for (const words of [3, 2, 1]) {
		const span = tokens.slice(at + 1, at + 1 + words);
		if (span.length < words || span.some(({ kind }) => kind !== 'word')) continue;
		const unit = parseUnit(span.map(({ text }) => text).join(' '));
		if (unit.ok) return { id: unit.value, to: at + words };
	}
	return null;
}

/** "1/10" as "0.1", for the fractions of an ounce that end; null for thirds and the like. */
export function endingFraction(text: string): string | null {
	const [n = '', d = ''] = text.split('/');
	if (/^0*$/.test(d)) return null;
	const value = decimal(n).div(decimal(d));
	return value.decimalPlaces() <= 6 ? value.toFixed() : null;
}

/** The number of an amount; the problem says where in the line it stands. */
export function readNumber(
	typed: string,
	start: number,
	end: number,
	mark: DecimalMark | undefined,
	whole = false
): Result<Decimal, LineProblem> {
	const plain = typed.includes('/') ? (endingFraction(typed) ?? typed) : typed;
	const number = parseNumber(plain, { positive: true, whole, ...(mark === undefined ? {} : { mark }) });
	return number.ok ? number : fail({ kind: 'line-number', start, end, found: typed, problem: number.problem });
}
