import type { Build } from '../evidence/belief.ts';
import { mainMetals, type MainMetal, type Subject } from '../evidence/subject.ts';
import type { Origin } from '../evidence/origin.ts';
import { findCoin } from '../metal/coins.ts';
import { compareFineness, perMilleNumber } from '../metal/fineness.ts';
import { legalMinimum, type LawId } from '../metal/law.ts';
import { parseMark, type MarkContent } from '../metal/mark.ts';
import { articleClass } from './class.ts';
import { spreadIdFor } from './class-spread.ts';
import type { Piece } from './piece.ts';

/** Why a piece is not estimated from findings: it holds no gold, silver, platinum or palladium; or it says itself that it is a layer. */
export type NoSubject = 'no-precious-metal' | 'a-layer-by-its-mark';

const LAWS: Readonly<Record<Origin, LawId>> = {
	hallmarked: 'minimum',
	'us-modern': 'us-1981',
	'us-before-1981': 'us-before-1981',
	uncontrolled: 'minimum',
	unmarked: 'minimum',
	'stranger-bar': 'minimum'
};

/** Articles that are joined with solder as a rule, and that are hollow or jointed as a rule: common practice, no source. */
const SOLDERED = new Set(['chain', 'bracelet', 'brooch', 'earring', 'pendant', 'hollowware', 'watch', 'frame']);
const JOINTED = new Set(['chain', 'bracelet', 'earring', 'pendant', 'brooch', 'watch', 'frame', 'hollowware', 'dental']);

/** How an article is made when the buyer has not said: links and joints hold a little air; "hollow" in its name says more. */
export function usualBuild(article: string): Build {
	if (/\b(?:hollow|puffed|tube|tubular)\b/i.test(article)) return 'hollow';
	return JOINTED.has(articleClass(article)) ? 'jointed' : 'solid';
}

/** The metal that a piece is bought for, and its claim: gold before platinum before palladium before silver. */
function mainContent(contents: readonly MarkContent[]): (MarkContent & { readonly metal: MainMetal }) | null {
	const order: readonly MainMetal[] = ['Au', 'Pt', 'Pd', 'Ag'];
	const held = contents.flatMap((each) => mainMetals.filter((metal) => metal === each.metal).map((metal) => ({ ...each, metal })));
	const found = [...held].sort((a, b) => order.indexOf(a.metal) - order.indexOf(b.metal) || compareFineness(b.fineness, a.fineness));
	return found[0] ?? null;
}

/**
 * The piece as the estimate sees it: its main metal, what its mark claims and what the law lets that mean, its origin and make.
 * formula: least lawful fineness by the law of the origin, with solder where the article is soldered as a rule; a coin claims its own fineness.
 * rounding: none.
 * source: metal/law.ts for the tolerances; which articles are soldered or jointed is common practice, no source.
 */
export function subjectOf(piece: Pick<Piece, 'article' | 'mark' | 'origin' | 'contents' | 'evidence'>): Subject | NoSubject {
	const { article, mark, origin, contents, evidence } = piece;
	const spread = spreadIdFor(mark, origin);
	if (spread === 'layered' || spread === 'weighted') return 'a-layer-by-its-mark';
	const read = mark === '' ? null : parseMark(mark);
	if (read?.ok && read.value.kind === 'plated') return 'a-layer-by-its-mark';
	const coin = findCoin(article);
	const claims = read?.ok ? read.value.contents : mark === '' && coin.ok ? coin.value.contents : [];
	const taken = mainContent(contents.map(({ metal, taken: fineness }) => ({ metal, fineness })));
	const claim = mainContent(claims.filter(({ metal }) => taken === null || metal === taken.metal));
	const metal = taken?.metal ?? claim?.metal;
	if (metal === undefined) return 'no-precious-metal';
	const kind = articleClass(article);
	const legal =
		claim === null
			? null
			: perMilleNumber(
					legalMinimum(claim, LAWS[origin], { solder: SOLDERED.has(kind), watchCaseOrFlatware: kind === 'watch' || kind === 'flatware' })
				);
	return {
		metal,
		claimed: claim === null ? null : perMilleNumber(claim.fineness),
		legal,
		origin,
		build: evidence?.build ?? usualBuild(article),
		coin: coin.ok ? coin.value.id : null
	};
}
