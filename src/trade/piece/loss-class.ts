import { exact, plus, EXACT_ZERO, compareExact, type Exact } from '../number/exact.ts';
import { decimal } from '../number/decimal.ts';
import type { Fineness } from '../metal/fineness.ts';
import { metals, type MetalId } from '../metal/metals.ts';
import { articleClass, articleWords } from './class.ts';

/** How a piece behaves in the crucible. The figures of loss for each stand in melt/. */
export type LossClassId = 'clean' | 'worn' | 'stone-set' | 'lemel' | 'dental' | 'zinc-solder' | 'base' | 'bar';

export const lossClasses: readonly LossClassId[] = [
	'clean',
	'worn',
	'stone-set',
	'lemel',
	'dental',
	'zinc-solder',
	'base',
	'bar'
];

export function isLossClass(text: string): text is LossClassId {
	return (lossClasses as readonly string[]).includes(text);
}

const STONE_WORDS = new Set(['stone', 'diamond', 'gem', 'pearl', 'ruby', 'sapphire', 'emerald', 'opal', 'turquoise', 'set']);
const ZINC_SOLDER_FROM = exact(decimal('330'));
const ZINC_SOLDER_TO = exact(decimal('425'));

/**
 * The class of loss that a piece is put in until the buyer says otherwise.
 * formula: by article (dental, lemel, bar, stones, chains and worn goods) and by contents: no precious metal is base,
 * gold of 330 to 425 parts per thousand (9 and 10 karat) is taken to carry zinc solder.
 * rounding: none.
 * source: common practice, no source.
 */
export function lossClassFor(
	article: string,
	contents: readonly { metal: MetalId; taken: Fineness }[],
	stonesTakenOff = false
): LossClassId {
	const kind = articleClass(article);
	const words = articleWords(article);
	let precious: Exact = EXACT_ZERO;
	let gold: Exact = EXACT_ZERO;
	for (const { metal, taken } of contents) {
		if (metals[metal].precious) precious = plus(precious, taken.perMille);
		if (metal === 'Au') gold = plus(gold, taken.perMille);
	}
	if (kind === 'lemel') return 'lemel';
	if (kind === 'dental') return 'dental';
	if (precious.n === 0n) return 'base';
	if (kind === 'bar') return 'bar';
	if (!stonesTakenOff && words.some((word) => STONE_WORDS.has(word))) return 'stone-set';
	if (compareExact(gold, ZINC_SOLDER_FROM) >= 0 && compareExact(gold, ZINC_SOLDER_TO) <= 0) return 'zinc-solder';
	if (kind === 'chain' || kind === 'bracelet' || kind === 'watch' || words.includes('worn')) return 'worn';
	// a rolled or filled layer: most of the piece is base metal under the gold
	return compareExact(precious, exact(decimal('100'))) < 0 ? 'worn' : 'clean';
}
