import { fail, ok, type Result } from '../number/result.ts';
import { findCoin, type Coin, type CoinProblem } from '../metal/coins.ts';
import { parseMark, type Mark } from '../metal/mark.ts';
import {
	alloyNames, coatedWords, filledWords, fineWords, rolledWords, silverNames, weightedWords
} from '../metal/mark-words.ts';
import { metalsOfStamp } from '../metal/stamps.ts';
import { caratWord, karatOnly } from './line-amounts.ts';
import type { LineProblem } from './line-problem.ts';
import type { Token } from './line-tokens.ts';

/** A mark and the tokens it was read from. */
export type FoundMark = { readonly mark: Mark; readonly used: ReadonlySet<number> };

const METAL_NAMES = new Set([
	'gold', 'silver', 'silber', 'platinum', 'platin', 'plat', 'palladium', 'pall', 'rhodium', 'iridium', 'irid', 'ruthenium'
]);
const NOBLE_SYMBOLS = new Set(['au', 'ag', 'pt', 'pd']);
const OTHER_SYMBOLS = new Set(['cu', 'zn', 'ni', 'rh', 'ir', 'ru', 'sn', 'ga', 'pb', 'cd', 'fe', 'cr', 'mn']);
/** Symbols that are words as well: only as written in chemistry. */
const SYMBOLS_THAT_ARE_WORDS = new Set(['In', 'Co', 'C', 'W']);
const ALWAYS = new Set([
	...METAL_NAMES, ...NOBLE_SYMBOLS, ...weightedWords, ...filledWords, ...rolledWords, ...coatedWords.keys(), ...silverNames.keys()
]);
/** Words that belong to a mark only beside certain others. */
const SOFT = new Set(['coin', 'heavy', 'flash', 'flashed', 'washed', 'plate', ...fineWords]);

/** Figures that are struck on goods, with or without a point before them. */
export function isStamp(text: string): boolean {
	return /^9{4,5}$/.test(text) || metalsOfStamp(text.replace(/^\./, '').replace(',', '.')) !== null;
}

export function isMetalName(token: Token): boolean {
	return token.kind === 'word' && METAL_NAMES.has(token.text.toLowerCase());
}

/**
 * The mark in a line: all tokens that speak of one are read together, wherever they stand, so that "gold filled chain 14k 1/20"
 * can never be taken for 14 kt. `free` says which tokens nothing else has used; null when no token speaks of a mark.
 */
export function readLineMark(tokens: readonly Token[], free: (at: number) => boolean): Result<FoundMark | null, LineProblem> {
	const alloy = readAlloy(tokens, free);
	const chosen = tokens.map((_, at) => free(at) && !alloy.includes(at) && speaksOfMark(tokens, at, free));
	// a word such as "gold" alone is no mark beside a named alloy: "gold coloured brass"
	const strong = tokens.filter((token, at) => chosen[at] === true && !isMetalName(token) && !SOFT.has(token.text.toLowerCase()));
	if (alloy.length > 0 && strong.length === 0) {
		const mark = parseMark(alloy.map((at) => tokens[at]!.text).join(' '));
		if (mark.ok) return ok({ mark: mark.value, used: new Set(alloy) });
	}
	const places = [...tokens.keys()].filter((at) => chosen[at] === true);
	if (places.length === 0) return ok(null);
	if (alloy.length > 0) return fail(markProblem(tokens, [...alloy, ...places], null));
	const unclear = sharesUnclear(tokens, places);
	if (unclear !== null) return fail(unclear);
	const whole = parseMark(textOf(tokens, places));
	if (whole.ok) return ok({ mark: whole.value, used: new Set(places) });
	const firm = places.filter((at) => !SOFT.has(tokens[at]!.text.toLowerCase()));
	if (firm.length > 0 && firm.length < places.length) {
		const again = parseMark(textOf(tokens, firm));
		if (again.ok) return ok({ mark: again.value, used: new Set(firm) });
	}
	return fail(markProblem(tokens, places, whole.problem));
}

function textOf(tokens: readonly Token[], places: readonly number[]): string {
	return places.map((at, i) => (i > 0 && tokens[at]!.glued && places[i - 1] === at - 1 ? '' : ' ') + tokens[at]!.text).join('').trim();
}

function markProblem(
	tokens: readonly Token[],
	places: readonly number[],
	problem: (LineProblem & { kind: 'line-mark' })['problem'] | null
): LineProblem {
	const sorted = [...places].sort((a, b) => a - b);
	const [start, end] = [tokens[sorted[0]!]!.start, tokens[sorted.at(-1)!]!.end];
	const found = textOf(tokens, sorted);
	return { kind: 'line-mark', start, end, found, problem: problem ?? { kind: 'mark-two-marks', text: found, marks: [found] } };
}

function speaksOfMark(tokens: readonly Token[], at: number, free: (at: number) => boolean): boolean {
	const token = tokens[at]!;
	const before = free(at - 1) ? tokens[at - 1] : undefined;
	const after = free(at + 1) ? tokens[at + 1] : undefined;
	const word = token.text.toLowerCase();
	if (token.kind === 'fraction') return true;
	if (token.kind === 'percent') return before?.kind === 'number';
	if (token.kind === 'number') {
		if (isStamp(token.text) || after?.kind === 'percent' || isKarat(after)) return true;
		if (before?.kind === 'word' && /^k$/i.test(before.text) && token.glued) return true;
		return [before, after].some((beside) => beside !== undefined && isSymbolOrName(beside)) && /^\d{3}(?:[.,]\d+)?$/.test(token.text)
			? true
			: isSymbol(before);
	}
	if (token.kind !== 'word') return false;
	if (isKarat(token)) return before?.kind === 'number' || (/^k$/i.test(token.text) && after?.kind === 'number' && after.glued);
	if (word === 'coin') return after !== undefined && /^silver$/i.test(after.text);
	if (word === 'heavy') return tokens.some(({ text }) => /^(?:electroplated?|ge|gep)$/i.test(text));
	if (SOFT.has(word)) return [before, after].some((beside) => beside !== undefined && (isSymbolOrName(beside) || word === 'plate'));
	if (ALWAYS.has(word)) return true;
	return isSymbol(token) && after?.kind === 'number';
}

/** "k", "kt", "karat"; "ct" when it was judged to be karats; "kgf" and the like, which parseMark takes apart. */
function isKarat(token: Token | undefined): boolean {
	if (token?.kind !== 'word') return false;
	if (karatOnly.test(token.text) || caratWord.test(token.text)) return true;
	return /^(?:kt?|ct)[a-z]{2,5}$/i.test(token.text) && token.glued && parseMark(`1/20 14${token.text}`).ok;
}

function isSymbol(token: Token | undefined): boolean {
	if (token?.kind !== 'word') return false;
	const word = token.text.toLowerCase();
	return NOBLE_SYMBOLS.has(word) || OTHER_SYMBOLS.has(word) || SYMBOLS_THAT_ARE_WORDS.has(token.text);
}

function isSymbolOrName(token: Token): boolean {
	return isSymbol(token) || isMetalName(token);
}

function readAlloy(tokens: readonly Token[], free: (at: number) => boolean): number[] {
	for (const [at, token] of tokens.entries()) {
		if (token.kind !== 'word' || !free(at)) continue;
		const next = tokens[at + 1];
		if (next?.kind === 'word' && free(at + 1) && alloyNames.has(`${token.text} ${next.text}`.toLowerCase())) return [at, at + 1];
		if (alloyNames.has(token.text.toLowerCase())) return [at];
	}
	return [];
}

/** "Au 62.5 Pd 18 Ag 12" is percent or parts per thousand: ten times apart, so it is asked about. */
function sharesUnclear(tokens: readonly Token[], places: readonly number[]): LineProblem | null {
	const figures = places.filter((at) => tokens[at]!.kind === 'number' && isSymbolOrName(tokens[at - 1] ?? tokens[at]!));
	if (figures.length < 2 || places.some((at) => tokens[at]!.kind === 'percent' || isKarat(tokens[at]))) return null;
	const values = figures.map((at) => Number(tokens[at]!.text.replace(',', '.')));
	const all = values.reduce((a, b) => a + b, 0);
	if (!(all <= 100)) return null;
	const [start, end] = [tokens[places[0]!]!.start, tokens[places.at(-1)!]!.end];
	return { kind: 'line-shares-unclear', start, end, found: textOf(tokens, places) };
}

export type FoundCoin = { readonly coin: Result<Coin, CoinProblem>; readonly from: number; readonly to: number };

/** The longest run of tokens that names a coin, or that names several coins and must be asked about. */
export function readLineCoin(tokens: readonly Token[]): FoundCoin | null {
	for (let length = Math.min(6, tokens.length); length > 0; length -= 1) {
		for (let from = 0; from + length <= tokens.length; from += 1) {
			const span = tokens.slice(from, from + length);
			const edges = [span[0]!, span.at(-1)!];
			if (!span.some(({ kind, text }) => kind === 'word' && text.length > 1) || edges.some(({ kind }) => kind === 'minus')) continue;
			const coin = findCoin(span.map(({ text, glued }, i) => (glued || i === 0 ? text : ` ${text}`)).join(''));
			if (coin.ok || coin.problem.kind === 'coin-ambiguous') return { coin, from, to: from + length - 1 };
		}
	}
	return null;
}
