import { exact } from '../number/exact.ts';
import { commonAlloys, type Alloy } from './alloy.ts';
import { metalIds, metals } from './metals.ts';

/** Words that stand for karats after or before a figure. */
export const karatWords: ReadonlySet<string> = new Set(['k', 'kt', 'ct', 'kar', 'karat', 'karats', 'carat', 'carats', 'kts', 'cts']);

/** A karat mark without a minus tolerance is struck with a P for plumb. */
export const plumbWords: ReadonlySet<string> = new Set(['p', 'kp', 'plumb']);

/** Words that change nothing about what is promised. */
export const silentWords: ReadonlySet<string> = new Set([
	'yellow', 'white', 'rose', 'red', 'pink', 'green', 'yg', 'wg', 'y', 'w', 'solid', 'stamped', 'stamp', 'mark', 'marked', 'of', 'hallmark'
]);

/** Silver that is named, not numbered; per thousand. */
export const silverNames: ReadonlyMap<string, string> = new Map([
	['sterling', '925'], ['ster', '925'], ['stg', '925'], ['sterl', '925'], ['coin', '900'], ['britannia', '958.4'], ['brit', '958.4']
]);

export const fineWords: ReadonlySet<string> = new Set(['fine', 'pure']);
export const weightedWords: ReadonlySet<string> = new Set(['weighted', 'loaded', 'reinforced', 'wtd']);

/** A layer of rolled sheet: a share of the mass when a fraction stands beside it. */
export const filledWords: ReadonlySet<string> = new Set(['gf', 'filled', 'sf', 'overlay']);
export const rolledWords: ReadonlySet<string> = new Set(['rgp', 'rolled', 'rp']);

/** A coating whose metal the mass does not tell. */
export const coatedWords: ReadonlyMap<string, string> = new Map([
	['vermeil', 'vermeil'],
	['hge', 'heavy gold electroplate'], ['hgp', 'heavy gold electroplate'],
	['hgep', 'heavy gold electroplate'], ['heavy', 'heavy gold electroplate'],
	['ge', 'gold electroplate'], ['gep', 'gold electroplate'], ['electroplate', 'gold electroplate'], ['electroplated', 'gold electroplate'],
	['gp', 'gold plated'], ['plated', 'plated'], ['plate', 'plated'], ['flash', 'plated'], ['flashed', 'plated'], ['washed', 'plated'],
	['ep', 'silver plated'], ['epns', 'silver plated'], ['epbm', 'silver plated'], ['epc', 'silver plated'], ['epwm', 'silver plated'],
	['silverplate', 'silver plated'], ['silverplated', 'silver plated'], ['sp', 'silver plated']
]);

/** Base metals and alloys by name: the composition is the trade's usual one and no promise of the piece. */
export const alloyNames: ReadonlyMap<string, Alloy> = new Map<string, Alloy>([
	...plainMetals(),
	['brass', commonAlloys.brass], ['bronze', commonAlloys.bronze], ['cupronickel', commonAlloys.cupronickel],
	['nickel silver', commonAlloys.nickelSilver], ['german silver', commonAlloys.nickelSilver], ['alpaca', commonAlloys.nickelSilver],
	['alpaka', commonAlloys.nickelSilver], ['stainless steel', commonAlloys.stainless], ['stainless', commonAlloys.stainless]
]);

/** Whole phrases that mean another spelling, so that the words below need not know them. */
export const phrases: ReadonlyMap<string, string> = new Map([
	['irid plat', 'Pt 900 Ir 100'], ['iridplat', 'Pt 900 Ir 100'],
	['10% irid plat', 'Pt 900 Ir 100'], ['10 irid plat', 'Pt 900 Ir 100'],
	['a1', 'silver plated'], ['quadruple plate', 'silver plated'], ['sheffield plate', 'silver plated'],
	['silver on copper', 'silver plated'],
	['gold wash', 'gold plated'], ['gold electro', 'gold electroplate'], ['rolled gold', 'rolled gold plate']
]);

/** A base metal by its own name is taken as pure; a precious one is asked about, because it seldom is. */
function plainMetals(): [string, Alloy][] {
	return metalIds
		.filter((id) => !metals[id].precious && id !== 'C')
		.map((id) => [metals[id].name, { name: metals[id].name, shares: [{ metal: id, share: exact(1n) }] }]);
}
