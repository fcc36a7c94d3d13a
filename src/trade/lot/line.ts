import { fail, ok, type Result } from '../number/result.ts';
import type { Piece } from '../piece/piece.ts';
import { isTimes, readAmounts, type Amount } from './line-amounts.ts';
import { readCarats } from './line-carats.ts';
import { readCounts, type Count } from './line-count.ts';
import { isMetalName, isStamp, readLineCoin, readLineMark, type FoundCoin } from './line-mark.ts';
import { makePiece } from './line-piece.ts';
import type { LineOptions, LineProblem, Place } from './line-problem.ts';
import { joinWords, splitLine, type Token } from './line-tokens.ts';

export type { LineOptions, LineProblem, Place } from './line-problem.ts';

const LONGEST = 300;

/**
 * One piece from one typed line: "14k chain 12.4g x3", "925 8 dwt", "18k ring 5,20 g - 0,35 g stones", in any order of words.
 * The mass is that of all pieces together. A number whose meaning is not certain is asked about, never guessed.
 * rounding: none.
 * source: our own way of writing; marks, units and coins as in metal/ and mass/.
 */
export function parseLine(line: string, options: LineOptions = {}): Result<Piece, LineProblem> {
	if (line.length > LONGEST) return fail({ kind: 'line-too-long', length: line.length, most: LONGEST });
	const { tokens } = splitLine(line);
	if (tokens.length === 0) return fail({ kind: 'line-empty' });
	const odd = tokens.find(({ kind }) => kind === 'odd');
	if (odd !== undefined) {
		return fail({ kind: 'line-number', ...placeOf(odd, odd), problem: { kind: 'number-unreadable', text: odd.text } });
	}
	const each = tokens.find(({ kind, text }) => kind === 'word' && /^(?:each|ea|apiece)$/i.test(text));
	if (each !== undefined) return fail({ kind: 'line-each', ...placeOf(each, each) });
	const coin = readLineCoin(tokens);
	if (coin?.coin.ok === true) {
		const withCoin = readWith(line, tokens, coin, options);
		// a mark beside the name of a coin counts more: "14k buffalo pendant 5 g"
		if (withCoin !== null) return withCoin;
	}
	const plain = readWith(line, tokens, null, options)!;
	if (plain.ok || plain.problem.kind !== 'line-mark-missing' || coin === null || coin.coin.ok) return plain;
	return fail({ kind: 'line-coin', ...placeOf(tokens[coin.from]!, tokens[coin.to]!, line), problem: coin.coin.problem });
}

export function placeOf(first: Token, last: Token, line?: string): Place {
	const found = line === undefined ? first.text : line.slice(first.start, last.end);
	return { start: first.start, end: last.end, found };
}

/** Null when a coin was given but the rest of the line holds a mark of its own. */
function readWith(
	line: string,
	tokens: readonly Token[],
	coin: FoundCoin | null,
	options: LineOptions
): Result<Piece, LineProblem> | null {
	const used = new Set<number>();
	const use = (from: number, to: number) => {
		for (let at = from; at <= to; at += 1) used.add(at);
	};
	if (coin !== null) use(coin.from, coin.to);
	const free = (at: number) => at >= 0 && at < tokens.length && !used.has(at);
	const named = [...used];
	const visible = tokens.map((token, at): Token => (named.includes(at) ? { ...token, kind: 'word', text: '' } : token));
	const amounts = readAmounts(visible);
	if (!amounts.ok) return amounts;
	const carats = readCarats(visible, amounts.value, line);
	if (!carats.ok) return carats;
	for (const { from, to } of carats.value) use(from, to);
	const counts = readCounts(visible, free, carats.value, line);
	if (!counts.ok) return counts;
	for (const { from, to } of counts.value) use(from, to);
	const mark = readLineMark(visible, free);
	if (coin !== null && (!mark.ok || mark.value !== null)) return null;
	if (!mark.ok) return mark;
	for (const at of mark.value?.used ?? []) used.add(at);
	const bare = readBare(visible, free, carats.value, counts.value, line);
	if (!bare.ok) return bare;
	for (const { from, to } of [bare.value.mass, bare.value.count].filter((found) => found !== null)) use(from, to);
	const layered = mark.value !== null && (mark.value.mark.kind === 'filled' || mark.value.mark.kind === 'plated');
	const words = tokens.filter((token, at) => {
		if (named.includes(at)) return true;
		if (token.kind !== 'word' || isTimes(token)) return false;
		return !used.has(at) || (isMetalName(token) && (mark.value?.used.has(at) ?? false) && !layered);
	});
	return makePiece({
		line,
		article: joinWords(line, words),
		amounts: bare.value.mass === null ? carats.value : [...carats.value, bare.value.mass],
		counts: bare.value.count === null ? counts.value : [...counts.value, bare.value.count],
		unsure: bare.value.unsure,
		mark: mark.value?.mark ?? null,
		coin: coin?.coin.ok === true ? { coin: coin.coin.value, place: placeOf(tokens[coin.from]!, tokens[coin.to]!, line) } : null,
		options
	});
}

type Bare = { readonly mass: Amount | null; readonly count: Count | null; readonly unsure: Place | null };

/** Numbers with nothing beside them: at most one mass and, at the very start, one count. Everything else is asked about. */
function readBare(
	tokens: readonly Token[],
	free: (at: number) => boolean,
	amounts: readonly Amount[],
	counts: readonly Count[],
	line: string
): Result<Bare, LineProblem> {
	const left = [...tokens.keys()].filter((at) => free(at) && (tokens[at]!.kind === 'number' || tokens[at]!.kind === 'fraction'));
	const unexplained = (at: number) => fail<LineProblem>({ kind: 'line-unexplained', ...placeOf(tokens[at]!, tokens[at]!) });
	const hasMass = amounts.some(({ off }) => !off);
	let mass: Amount | null = null;
	let count: Count | null = null;
	let unsure: Place | null = null;
	for (const at of left) {
		const token = tokens[at]!;
		const next = tokens[at + 1];
		const gluedToWord = (token.glued && tokens[at - 1]?.kind === 'word') || (next?.glued === true && next.kind === 'word');
		if (gluedToWord || token.kind === 'fraction' || tokens[at - 1]?.kind === 'minus') return unexplained(at);
		if (/^[1-9]\d{0,2}$/.test(token.text) && next?.kind === 'number' && /^\d{3}(?:[.,]\d+)?$/.test(next.text) && !isStamp(next.text)) {
			const together = `${token.text}${next.text}`;
			return fail({ kind: 'line-grouping-unclear', ...placeOf(token, next, line), together });
		}
		const whole = /^\d{1,6}$/.test(token.text);
		const first = at === 0 && tokens.length > 1;
		const others = left.length > 1 || hasMass;
		if (whole && first && count === null && counts.length === 0 && (others || !hasMass)) {
			if (next?.kind === 'number' && free(at + 1)) return unexplained(at);
			count = { start: token.start, end: token.end, typed: token.text, from: at, to: at };
			unsure = placeOf(token, token);
		} else if (!hasMass && mass === null) {
			mass = { start: token.start, end: token.end, typed: token.text, unit: null, off: false, what: null, from: at, to: at };
		} else return unexplained(at);
	}
	return ok({ mass, count, unsure: mass === null && !hasMass ? unsure : null });
}
