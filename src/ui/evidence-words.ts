import type { HypothesisId } from '$trade/evidence/belief.ts';
import type { FindingKind } from '$trade/evidence/finding.ts';
import type { Odds } from '$trade/evidence/odds.ts';
import type { TesterKind } from '$trade/evidence/tester.ts';
import type { Format } from './format.ts';

/** What a piece can be. */
export const hypothesisWords: Readonly<Record<HypothesisId, string>> = {
	honest: 'as its mark says',
	under: 'under its mark',
	other: 'another standard',
	layered: 'a layer, core or filling'
};

/** What a test is called. */
export const testWords: Readonly<Record<FindingKind, string>> = {
	touch: 'touch with acids',
	fluorescence: 'fluorescence reading',
	water: 'water weighing',
	magnet: 'magnet',
	core: 'core test',
	assay: 'fire assay',
	coin: 'coin against the table'
};

export const testerKindWords: Readonly<Record<TesterKind, string>> = {
	fluorescence: 'reads by fluorescence',
	acids: 'acids and a stone'
};

/** "as its mark says 97.5 %, under its mark 1 %, ...". */
export function oddsWords(odds: Odds, ids: readonly HypothesisId[], format: Format): string {
	return ids.map((id) => `${hypothesisWords[id]} ${format.estimate(odds[id] * 100, 6)}\u00a0%`).join(', ');
}
