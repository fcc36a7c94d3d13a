import type { MetalId } from './metals.ts';

/**
 * What the figures of a stamp mean when no metal is written beside them. One metal: that metal is taken. Several: asked about.
 * The fineness is always the figures as struck: "916" is 916 ‰, although the United Kingdom strikes 916 for its standard of
 * 916.6 ‰ (Hallmarking Act 1973 Sch. 2); write "22ct" for 22/24. The lower reading never pays for gold that is not promised.
 * Where a second metal is possible but rare (silver of 916, platinum of 585, gold of 800 or 958), the common one is taken and
 * the other must be named: "Ag 916".
 */
const TABLE: readonly (readonly [string, readonly MetalId[]])[] = [
	['333', ['Au']], ['375', ['Au']], ['416', ['Au']], ['417', ['Au']], ['500', ['Pd', 'Au', 'Pt']], ['583', ['Au']],
	['585', ['Au']], ['625', ['Au']], ['750', ['Au']], ['800', ['Ag']], ['813', ['Ag']], ['826', ['Ag']], ['830', ['Ag']],
	['833', ['Ag', 'Au']], ['835', ['Ag']], ['840', ['Ag']], ['850', ['Pt']], ['875', ['Ag', 'Au']], ['900', ['Ag', 'Au', 'Pt']],
	['916', ['Au']], ['916.6', ['Au']], ['916.7', ['Au']], ['917', ['Au']], ['925', ['Ag']], ['935', ['Ag']],
	['950', ['Pt', 'Pd', 'Ag']], ['958', ['Ag']], ['958.4', ['Ag']], ['965', ['Au']], ['980', ['Ag']], ['986', ['Au']],
	['990', ['Au', 'Ag']], ['995', ['Au']], ['999', ['Au', 'Ag', 'Pt', 'Pd']], ['999.5', ['Pt', 'Pd', 'Au']],
	['999.9', ['Au', 'Ag']], ['999.99', ['Au']]
];

const bare: ReadonlyMap<string, readonly MetalId[]> = new Map(TABLE);

/** The metals that figures alone can stand for, the likeliest first; null for figures that are no usual stamp. */
export function metalsOfStamp(figures: string): readonly MetalId[] | null {
	return bare.get(figures) ?? null;
}

/** The usual stamps of a metal, rising: offered when figures or a metal stand alone. */
export function stampsOf(metal: MetalId): readonly string[] {
	return TABLE.filter(([, of]) => of.includes(metal)).map(([figures]) => figures);
}

/** Words and letters that name a metal beside figures. */
export const metalWords: ReadonlyMap<string, MetalId> = new Map<string, MetalId>([
	['au', 'Au'], ['gold', 'Au'], ['ag', 'Ag'], ['silver', 'Ag'], ['s', 'Ag'],
	['pt', 'Pt'], ['plat', 'Pt'], ['platinum', 'Pt'], ['pd', 'Pd'], ['pall', 'Pd'], ['palladium', 'Pd'],
	['cu', 'Cu'], ['zn', 'Zn'], ['ni', 'Ni'], ['rh', 'Rh'], ['rhodium', 'Rh'], ['ir', 'Ir'], ['irid', 'Ir'], ['iridium', 'Ir'],
	['ru', 'Ru'], ['ruthenium', 'Ru'], ['sn', 'Sn'], ['in', 'In'], ['ga', 'Ga'], ['pb', 'Pb'], ['cd', 'Cd'], ['fe', 'Fe'], ['cr', 'Cr'],
	['co', 'Co'], ['mn', 'Mn']
]);
