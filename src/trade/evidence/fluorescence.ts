import type { MetalId } from '../metal/metals.ts';
import type { Fluorescence } from './finding.ts';
import { flat, readingLikelihood } from './grid.ts';
import type { Observation } from './observation.ts';
import type { MainMetal } from './subject.ts';

type Reading = Pick<Fluorescence, 'reads' | 'u' | 'gross'>;

/** How far the fineness under a rhodium plate is in doubt for each part per thousand of rhodium that was read. */
const RHODIUM_DOUBT = 0.2;
/** From here on tungsten is no noise of the instrument, in parts per thousand; how often it shows though there is none. */
const TUNGSTEN_SHOWS = 5;
const TUNGSTEN_BY_CHANCE = 0.002;
const TUNGSTEN_THROUGH = 0.3;

/** Parts per thousand of one metal in a reading; what was not shown was not there. */
export function readOf(reads: Reading['reads'], metal: MetalId): number {
	return reads.find((read) => read.metal === metal)?.perMille.toNumber() ?? 0;
}

/**
 * The fineness of the surface as the reading has it, a rhodium plate taken off.
 * formula: reading / (1 − rhodium share); u = √(u² + (0.2 x rhodium)²) / (1 − rhodium share), in parts per thousand.
 * rounding: none.
 * source: arithmetic of shares; the doubt under a plate is a working default, common practice, no source.
 */
export function surfaceReading(finding: Reading, metal: MainMetal): { readonly perMille: number; readonly u: number } {
	const rhodium = readOf(finding.reads, 'Rh');
	const rest = Math.max(0.05, 1 - rhodium / 1000);
	return { perMille: Math.min(1000, readOf(finding.reads, metal) / rest), u: Math.hypot(finding.u, RHODIUM_DOUBT * rhodium) / rest };
}

/**
 * A fluorescence reading: of the surface, and of nothing under it. Tungsten that shows through speaks of a tungsten core, except in platinum,
 * which is alloyed with it.
 * formula: bell of the reading about the surface's fineness, and a small flat part (readingLikelihood).
 * rounding: none.
 * source: fluorescence reaches less than 10 µm and is deceived by plating (LBMA, non-destructive testing page).
 */
export function fluorescenceObservation(finding: Reading, metal: MainMetal): Observation {
	const { perMille, u } = surfaceReading(finding, metal);
	const surface = readingLikelihood(perMille, u, finding.gross);
	if (metal === 'Pt' || readOf(finding.reads, 'W') < TUNGSTEN_SHOWS) return { surface };
	return {
		surface,
		solid: flat().fill(TUNGSTEN_BY_CHANCE),
		core: (core) => (core.startsWith('tungsten') ? TUNGSTEN_THROUGH : TUNGSTEN_BY_CHANCE)
	};
}

/** The metals beside the main one, as shares of the balance that sum to one. */
export type Balance = readonly { readonly metal: MetalId; readonly share: number }[];

/** A balance is believed when all that was read is nearly the whole, and the balance more than a trace. */
const NEARLY_WHOLE = 930;
const A_TRACE = 5;

/**
 * What the balance of the piece is made of, from all readings that show nearly the whole; null when none does.
 * formula: for each metal beside the main one and rhodium: sum of its readings / sum of all of theirs.
 * rounding: none.
 * source: common practice, no source.
 */
export function balanceOf(findings: readonly Reading[], metal: MainMetal): Balance | null {
	const sums = new Map<MetalId, number>();
	for (const { reads } of findings) {
		const whole = reads.reduce((sum, read) => sum + read.perMille.toNumber(), 0);
		if (whole < NEARLY_WHOLE) continue;
		for (const read of reads) {
			if (read.metal !== metal && read.metal !== 'Rh') sums.set(read.metal, (sums.get(read.metal) ?? 0) + read.perMille.toNumber());
		}
	}
	const total = [...sums.values()].reduce((sum, value) => sum + value, 0);
	return total < A_TRACE ? null : [...sums].filter(([, value]) => value > 0).map(([of, value]) => ({ metal: of, share: value / total }));
}
