import type { LookAlikeId } from '../metal/look-alikes.ts';
import type { MainMetal, Subject } from './subject.ts';

/** What may lie under a layer and how common it is; the chances sum to one. Working defaults, common practice, no source. */
export type CoreChance = { readonly core: LookAlikeId; readonly chance: number };

const list = (...parts: readonly (readonly [LookAlikeId, number])[]): readonly CoreChance[] => {
	const total = parts.reduce((sum, [, weight]) => sum + weight, 0);
	return parts.map(([core, weight]) => ({ core, chance: weight / total }));
};

/** Under fine gold nobody hides what water finds at once: tungsten is what such bars and coins are filled with. */
const UNDER_FINE_GOLD = list(['tungsten', 85], ['tungsten-alloy', 8], ['copper', 3], ['lead', 3], ['brass', 1]);

const UNDER: Readonly<Record<MainMetal, readonly CoreChance[]>> = {
	Au: list(
		['brass', 42], ['copper', 20], ['silver', 15], ['steel', 7], ['nickel-silver', 5],
		['lead', 4], ['zinc', 3], ['tungsten-alloy', 2], ['tungsten', 1], ['tin', 1]
	),
	Ag: list(['nickel-silver', 35], ['brass', 25], ['copper', 20], ['tin', 10], ['steel', 5], ['zinc', 3], ['lead', 2]),
	Pt: list(['silver', 30], ['nickel-silver', 20], ['steel', 20], ['tungsten-alloy', 15], ['copper', 10], ['tungsten', 5]),
	Pd: list(['silver', 45], ['nickel-silver', 25], ['steel', 20], ['copper', 10])
};

/** From this fineness on a mark says fine gold, in parts per thousand. */
export const FINE = 985;

export function isFineGold({ metal, claimed }: Pick<Subject, 'metal' | 'claimed'>): boolean {
	return metal === 'Au' && claimed !== null && claimed >= FINE;
}

export function coresOf(subject: Pick<Subject, 'metal' | 'claimed'>): readonly CoreChance[] {
	return isFineGold(subject) ? UNDER_FINE_GOLD : UNDER[subject.metal];
}

/** How thick layers are: the chance that a rub goes through, that only a notch does, and that neither does. */
export const strata: readonly { readonly id: 'thin' | 'notch' | 'thick'; readonly chance: number }[] = [
	{ id: 'thin', chance: 0.4 },
	{ id: 'notch', chance: 0.5 },
	{ id: 'thick', chance: 0.1 }
];
