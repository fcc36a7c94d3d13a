/** Things that are taken for precious metal, or hidden under it, by the density that water finds. */
export type LookAlikeId =
	| 'zinc' | 'tin' | 'steel' | 'brass' | 'nickel-silver' | 'copper' | 'silver' | 'lead' | 'tungsten-alloy' | 'tungsten';

export type LookAlike = {
	readonly id: LookAlikeId;
	readonly name: string;
	/** g/cm³ */
	readonly low: number;
	readonly high: number;
	/** Whether a magnet draws it: never, some makes of it, nearly always. */
	readonly magnet: 'none' | 'some' | 'strong';
};

const of = (id: LookAlikeId, name: string, low: number, high: number, magnet: LookAlike['magnet'] = 'none'): LookAlike => ({
	id, name, low, high, magnet
});

/**
 * The look-alikes by rising density.
 * formula: none; ranges of density in g/cm³.
 * rounding: to what the makes of an alloy differ by.
 * source: pure metals from the CRC Handbook (metals.ts), alloys common practice, no source.
 */
export const lookAlikes: readonly LookAlike[] = [
	of('zinc', 'zinc die-cast', 6.5, 6.8),
	of('tin', 'tin', 7.2, 7.5),
	of('steel', 'steel', 7.7, 8.0, 'some'),
	of('brass', 'brass', 8.4, 8.75),
	of('nickel-silver', 'nickel silver', 8.55, 8.85),
	of('copper', 'copper', 8.75, 8.96),
	of('silver', 'silver', 10.3, 10.5),
	of('lead', 'lead', 11.0, 11.35),
	of('tungsten-alloy', 'tungsten heavy alloy', 17.0, 18.5),
	of('tungsten', 'tungsten', 19.2, 19.3)
];

const BY_ID = new Map(lookAlikes.map((each) => [each.id, each]));

export function lookAlike(id: LookAlikeId): LookAlike {
	return BY_ID.get(id)!;
}

/** The look-alikes whose density lies within two standard uncertainties of a reading. */
export function looksLike(density: number, u: number): readonly LookAlike[] {
	return lookAlikes.filter(({ low, high }) => density >= low - 2 * u && density <= high + 2 * u);
}
