import type { Origin } from '../evidence/origin.ts';

/** A part of a typed line and where it stands. Nothing is understood yet. */
export type Token = {
	readonly kind: 'number' | 'fraction' | 'percent' | 'minus' | 'word' | 'odd';
	readonly text: string;
	readonly start: number;
	readonly end: number;
	/** No gap before it: "12.4g" is a number and a word that is glued to it. */
	readonly glued: boolean;
};

export type SplitLine = { readonly tokens: readonly Token[]; readonly origin: Origin | null; readonly note: string };

const ORIGINS: readonly (readonly [RegExp, Origin])[] = [
	[/\b(?:us[ -])?(?:pre|before)[ -]?1981\b/i, 'us-before-1981'],
	[/\b(?:us[ -])?(?:since|after)[ -]?1981\b|\bus[ -]modern\b/i, 'us-modern'],
	[/\b(?:fully )?hallmarked\b/i, 'hallmarked'],
	[/\b(?:unmarked|unstamped|no (?:mark|stamp))\b/i, 'unmarked'],
	[/\buncontrolled\b/i, 'uncontrolled']
];

const PART = new RegExp(
	[
		String.raw`(\d{1,3}\/\d{1,4}(?![\d.,/]))`,
		String.raw`([.,]*\d(?:[\d.,'\u2019]*\d)?)`,
		String.raw`([%\u2030])`,
		String.raw`([-\u2212\u2013\u2014])(?=\s*[.,]?\d)`,
		String.raw`((?:[\p{L}\p{M}\p{So}\u200d\ufe0f]|[*\u00d7])+)`,
		String.raw`(\p{N})`
	].join('|'),
	'gu'
);

/**
 * Splits a line into numbers, fractions, signs and words. What stands after "#" is the note; words of origin are taken out.
 * Digits of other scripts and signs such as "½" are told apart as odd, so that nobody guesses what they mean.
 */
export function splitLine(line: string): SplitLine {
	// line breaks, controls and direction marks are gaps; every character keeps its place
	let text = line.replace(/[\p{Cc}\p{Cs}\u200b\u200e\u200f\u202a-\u202e\u2060-\u2069\ufeff]/gu, (sign) => ' '.repeat(sign.length));
	const hash = /(?:^|\s)#/.exec(text);
	const note = hash === null ? '' : text.slice(hash.index + hash[0].length).trim();
	if (hash !== null) text = text.slice(0, hash.index);
	let origin: Origin | null = null;
	for (const [words, means] of ORIGINS) {
		const match = words.exec(text);
		if (match === null || origin !== null) continue;
		origin = means;
		text = text.slice(0, match.index) + ' '.repeat(match[0].length) + text.slice(match.index + match[0].length);
	}
	const tokens: Token[] = [];
	for (const match of text.matchAll(PART)) {
		const [found, fraction, number, percent, minus, word] = match;
		const start = match.index;
		const glued = tokens.length > 0 && tokens[tokens.length - 1]!.end === start;
		const add = (kind: Token['kind']) => tokens.push({ kind, text: found, start, end: start + found.length, glued });
		if (fraction !== undefined) add('fraction');
		else if (number !== undefined) add('number');
		else if (percent !== undefined) add('percent');
		else if (minus !== undefined) add('minus');
		else if (word !== undefined) add('word');
		else add('odd');
	}
	return { tokens, origin, note };
}

/** The words as typed; a hyphen or apostrophe between two of them is kept. */
export function joinWords(line: string, tokens: readonly Token[]): string {
	let joined = '';
	let before: Token | null = null;
	for (const token of tokens) {
		const gap = before === null ? '' : line.slice(before.end, token.start);
		joined += before === null ? '' : /^[-'\u2019&/.]$/.test(gap) ? gap : token.glued ? '' : ' ';
		joined += token.text;
		before = token;
	}
	return joined;
}
