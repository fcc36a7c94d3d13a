import { decimal, type Decimal } from '../number/decimal.ts';
import {
	coatedWords, filledWords, fineWords, karatWords, plumbWords, rolledWords, silentWords, silverNames, weightedWords
} from './mark-words.ts';
import type { MetalId } from './metals.ts';
import { metalWords } from './stamps.ts';

/** The parts of a stamp, told apart: nothing is understood yet, but every part is of a known sort. */
export type Tokens = {
	readonly karats: readonly Decimal[];
	/** Parts per thousand: ".925" is 925, "9999" is 999.9, "92.5%" is 925, "925/1000" is 925. */
	readonly figures: readonly Decimal[];
	readonly metals: readonly MetalId[];
	readonly fraction: { readonly n: bigint; readonly d: bigint } | null;
	readonly plumb: boolean;
	/** Words with a meaning of their own (sterling, filled, plated ...), in lower case. */
	readonly words: readonly string[];
};

const PART = /\s*[-/.,()+]?\s*(?:(\d+)\s*\/\s*(\d+)|(\d+(?:[.,]\d+)?|[.,]\d+)\s*(%|‰)?|([a-z]+))/y;

/** Splits a stamp in lower case; null when a sign, a word or an order of figures is not understood. */
export function readTokens(lower: string): Tokens | null {
	// initials with points: "g.f." is "gf", "e.p.n.s." is "epns"
	const text = lower.replace(/\b(?:[a-z]\.){2,}/g, (initials) => initials.replaceAll('.', '')).replace(/[.\s]+$/, '');
	if (/^[-+/]/.test(text)) return null;
	const karats: Decimal[] = [];
	const figures: Decimal[] = [];
	const metals: MetalId[] = [];
	const words: string[] = [];
	let fraction: Tokens['fraction'] = null;
	let plumb = false;
	// a figure waits here until the next part says whether it was karats; a karat word waits for its figure
	let waiting: Decimal | null = null;
	let karatFirst = false;
	const settle = () => {
		if (waiting !== null) figures.push(perMille(waiting));
		waiting = null;
	};
	let at = 0;
	while (at < text.length) {
		PART.lastIndex = at;
		const match = PART.exec(text);
		if (match === null) return null;
		at = PART.lastIndex;
		const [, over, under, number, unit, word] = match;
		if (over !== undefined && under !== undefined) {
			if (over.length > 6 || under.length > 6) return null;
			if (under === '1000') {
				settle();
				figures.push(decimal(over));
			} else {
				if (fraction !== null) return null;
				fraction = { n: BigInt(over), d: BigInt(under) };
			}
		} else if (number !== undefined) {
			if (number.length > 12) return null;
			settle();
			const plain = number.replace(',', '.');
			const value = decimal(plain.startsWith('.') ? `0${plain}` : plain);
			if (unit === '%') figures.push(value.times(10));
			else if (unit === '‰') figures.push(value);
			else if (karatFirst) karats.push(value);
			else waiting = value;
			if (karatFirst && unit !== undefined) return null;
			karatFirst = false;
		} else if (word !== undefined) {
			const split = known(word) ? [word] : glued(word);
			if (split === null) return null;
			for (const part of split) {
				if (karatWords.has(part) || part === 'kp') {
					if (part === 'kp') plumb = true;
					if (waiting !== null) karats.push(waiting);
					else if (karatFirst) return null;
					else karatFirst = true;
					waiting = null;
					continue;
				}
				if (karatFirst) return null;
				settle();
				const metal = metalWords.get(part);
				if (metal !== undefined) metals.push(metal);
				else if (plumbWords.has(part)) plumb = true;
				else if (!silentWords.has(part)) words.push(part);
			}
		}
	}
	if (karatFirst) return null;
	settle();
	return { karats, figures, metals, fraction, plumb, words };
}

function known(word: string): boolean {
	return (
		karatWords.has(word) || plumbWords.has(word) || silentWords.has(word) || metalWords.has(word) || silverNames.has(word) ||
		fineWords.has(word) || weightedWords.has(word) || filledWords.has(word) || rolledWords.has(word) || coatedWords.has(word)
	);
}

/** "14kgf" and "18khge": a karat word with another word run into it. */
function glued(word: string): readonly string[] | null {
	const match = /^(kt|ct|k)(.+)$/.exec(word);
	const rest = match?.[2];
	return match !== null && rest !== undefined && known(rest) && !karatWords.has(rest) ? [match[1]!, rest] : null;
}

/** A bare figure below one is a share, and four or five nines are 999.9 and 999.99. */
function perMille(value: Decimal): Decimal {
	if (value.lt(1)) return value.times(1000);
	const text = value.toString();
	return /^9{4,5}$/.test(text) ? decimal(`999.${text.slice(3)}`) : value;
}
