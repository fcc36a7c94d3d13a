import { findCoin } from '../metal/coins.ts';
import type { Origin } from '../evidence/origin.ts';

/** The articles that make a class, each with the words a buyer types for it. Anything else is "other", so classes stay few. */
const ARTICLES: readonly (readonly [article: string, words: readonly string[]])[] = [
	['dental', ['dental', 'crown', 'bridge', 'tooth', 'inlay', 'denture']],
	['lemel', ['lemel', 'filings', 'filing', 'sweep', 'dust', 'grinding', 'swarf']],
	['coin', ['coin', 'sovereign', 'dollar', 'franc', 'krone', 'ducat', 'medal']],
	['watch', ['watch', 'watchcase', 'case']],
	['flatware', ['flatware', 'fork', 'spoon', 'knife', 'knives', 'teaspoon', 'tablespoon', 'ladle', 'server', 'tong']],
	[
		'hollowware',
		['hollowware', 'holloware', 'candlestick', 'candelabrum', 'candelabra', 'bowl', 'tray', 'teapot', 'cup', 'goblet', 'vase', 'jug', 'salt']
	],
	['ring', ['ring', 'band', 'signet']],
	['chain', ['chain', 'necklace', 'rope', 'curb']],
	['bracelet', ['bracelet', 'bangle', 'anklet', 'cuff']],
	['earring', ['earring', 'stud', 'hoop']],
	['pendant', ['pendant', 'charm', 'locket', 'cross']],
	['brooch', ['brooch', 'pin', 'clip', 'cufflink', 'link']],
	['frame', ['frame', 'spectacle', 'glasses']],
	['wire', ['wire', 'sheet', 'tube', 'solder', 'contact', 'mesh', 'gauze', 'thermocouple']],
	['fitting', ['fitting', 'valve', 'tap', 'pipe', 'turning', 'plate']],
	['bar', ['bar', 'ingot', 'button', 'shot', 'grain', 'round']]
];

const BY_WORD: ReadonlyMap<string, string> = new Map(
	ARTICLES.flatMap(([article, words]) => words.map((word): [string, string] => [word, article]))
);

/** The words of an article in lower case, each also without its plural ending. */
export function articleWords(article: string): string[] {
	const words = article.toLowerCase().split(/[^\p{L}]+/u).filter((word) => word !== '');
	return words.flatMap((word) => {
		if (word.endsWith('ches') || word.endsWith('sses') || word.endsWith('xes')) return [word, word.slice(0, -2)];
		return word.length > 3 && word.endsWith('s') && !word.endsWith('ss') ? [word, word.slice(0, -1)] : [word];
	});
}

/** Articles come again and again: what they were read as is kept, up to so many. */
const READ = new Map<string, string>();
const MOST_READ = 500;

/** The article that a class is named after: the first known one in the order of the list above, "other" if none is known. */
export function articleClass(article: string): string {
	const known = READ.get(article);
	if (known !== undefined) return known;
	const read = readClass(article);
	if (READ.size < MOST_READ) READ.set(article, read);
	return read;
}

function readClass(article: string): string {
	const words = new Set(articleWords(article).map((word) => BY_WORD.get(word)));
	return ARTICLES.find(([name]) => words.has(name))?.[0] ?? (findCoin(article).ok ? 'coin' : 'other');
}

/**
 * The class of a piece: stamp x article x origin, the unit about which something can be learned. Two pieces of one class share
 * the class's error: forty chains of one class do not average it out. "14 kt|chain|us-modern" is the text it is counted under.
 */
export function classKey(of: { readonly stamp: string; readonly article: string; readonly origin: Origin }): string {
	const stamp = of.stamp.trim().toLowerCase().replace(/\s+/g, ' ').replaceAll('|', '/');
	return `${stamp === '' ? 'no mark' : stamp}|${articleClass(of.article)}|${of.origin}`;
}
