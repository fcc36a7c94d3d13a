import type { Origin } from '$trade/evidence/origin.ts';
import type { LossClassId } from '$trade/piece/loss-class.ts';

/** Where a piece comes from, which decides how far its mark is believed. */
export const originWords: Readonly<Record<Origin, string>> = {
	hallmarked: 'an assay office: hallmarked',
	'us-modern': 'a maker in the US, since October 1981',
	'us-before-1981': 'a maker in the US, before October 1981',
	uncontrolled: 'a market without control',
	unmarked: 'nobody knows: no mark',
	'stranger-bar': 'a stranger: a bar'
};

/** How metal behaves in the melt. */
export const lossClassWords: Readonly<Record<LossClassId, string>> = {
	clean: 'clean karat metal',
	worn: 'chains, soldered or worn pieces',
	'stone-set': 'stone-set, not cleaned',
	lemel: 'lemel, after magnet and burn',
	dental: 'dental, with ceramic',
	'zinc-solder': '9–10 kt with zinc solder',
	base: 'base metal',
	bar: 'a bar or clean shot'
};

/** A class by its key ("14 kt|chain|us-modern"): "14 kt chain", or "coin, no mark". Symbols of metals get their capital back. */
export function className(key: string): string {
	const [stamp = '', article = ''] = key.split('|');
	if (stamp === 'no mark') return `${article}, no mark`;
	const named = stamp.replace(/\b(?:au|ag|pd|pt|rh|ir|ru|cu|zn)\b/g, (symbol) => symbol.charAt(0).toUpperCase() + symbol.slice(1));
	return `${named} ${article}`;
}
