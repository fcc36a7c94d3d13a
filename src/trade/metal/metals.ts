/**
 * The metals that a buyer meets, with what the trade computes from: density, atomic mass, melting and boiling point.
 * Any of them may carry a price. Carbon stands here because steels hold it; its density is that of graphite.
 */
export type MetalId =
	| 'Au' | 'Ag' | 'Cu' | 'Zn' | 'Ni' | 'Pd' | 'Pt' | 'Rh' | 'Ir' | 'Ru' | 'Sn'
	| 'In' | 'Ga' | 'Pb' | 'Cd' | 'Fe' | 'Cr' | 'W' | 'Co' | 'Mn' | 'C';

export type Metal = {
	readonly id: MetalId;
	readonly name: string;
	/** g/cm³ at room temperature. */
	readonly density: number;
	/** Standard uncertainty of the density: the spread between handbooks and lattice constants. */
	readonly densityU: number;
	/** Grams per mole, for shares counted by atoms. */
	readonly atomicMass: number;
	/** °C */
	readonly melting: number;
	/** °C at normal pressure. */
	readonly boiling: number;
	readonly precious: boolean;
};

function metal(
	id: MetalId,
	name: string,
	[density, densityU]: readonly [number, number],
	atomicMass: number,
	melting: number,
	boiling: number,
	precious = false
): Metal {
	return { id, name, density, densityU, atomicMass, melting, boiling, precious };
}

/**
 * One table of the metals.
 * formula: none; densities in g/cm³, temperatures in °C, atomic masses in g/mol.
 * rounding: as printed in the handbook.
 * source: CRC Handbook of Chemistry and Physics, physical constants of the elements (densities cross-checked with lattice
 * constants); boiling points of Zn, Cd, Pb, Ag, Cu and Au seen in a copy, melting points and atomic masses from memory.
 */
export const metals: Readonly<Record<MetalId, Metal>> = {
	Au: metal('Au', 'gold', [19.3, 0.02], 196.967, 1064.18, 2836, true),
	Ag: metal('Ag', 'silver', [10.5, 0.01], 107.868, 961.78, 2162, true),
	Cu: metal('Cu', 'copper', [8.95, 0.01], 63.546, 1084.62, 2560),
	Zn: metal('Zn', 'zinc', [7.14, 0.01], 65.38, 419.53, 907),
	Ni: metal('Ni', 'nickel', [8.9, 0.01], 58.693, 1455, 2913),
	Pd: metal('Pd', 'palladium', [12.01, 0.02], 106.42, 1554.8, 2963, true),
	Pt: metal('Pt', 'platinum', [21.45, 0.02], 195.084, 1768.2, 3825, true),
	Rh: metal('Rh', 'rhodium', [12.42, 0.02], 102.906, 1963, 3695, true),
	Ir: metal('Ir', 'iridium', [22.56, 0.02], 192.217, 2446, 4428, true),
	Ru: metal('Ru', 'ruthenium', [12.37, 0.05], 101.07, 2333, 4147, true),
	Sn: metal('Sn', 'tin', [7.29, 0.01], 118.71, 231.93, 2586),
	In: metal('In', 'indium', [7.31, 0.01], 114.818, 156.6, 2027),
	Ga: metal('Ga', 'gallium', [5.91, 0.01], 69.723, 29.76, 2229),
	Pb: metal('Pb', 'lead', [11.34, 0.01], 207.2, 327.46, 1749),
	Cd: metal('Cd', 'cadmium', [8.67, 0.02], 112.414, 321.07, 767),
	Fe: metal('Fe', 'iron', [7.87, 0.01], 55.845, 1538, 2861),
	Cr: metal('Cr', 'chromium', [7.17, 0.02], 51.996, 1907, 2671),
	W: metal('W', 'tungsten', [19.27, 0.03], 183.84, 3422, 5555),
	Co: metal('Co', 'cobalt', [8.88, 0.02], 58.933, 1495, 2927),
	Mn: metal('Mn', 'manganese', [7.25, 0.05], 54.938, 1246, 2061),
	// graphite sublimes; it neither melts nor boils at normal pressure, so both points are its sublimation point
	C: metal('C', 'carbon', [2.26, 0.2], 12.011, 3825, 3825)
};

export const metalIds = Object.keys(metals) as readonly MetalId[];

export function isMetalId(text: string): text is MetalId {
	return Object.hasOwn(metals, text);
}
