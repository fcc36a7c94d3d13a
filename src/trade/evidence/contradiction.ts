import type { Fineness } from '../metal/fineness.ts';
import { looksLike, type LookAlikeId } from '../metal/look-alikes.ts';
import { balanceIn, observe } from './observe.ts';
import type { Start } from './start.ts';
import { enrichmentOf } from './enrichment.ts';
import type { Finding, Pull } from './finding.ts';
import { surfaceReading } from './fluorescence.ts';
import { CELLS, flat, type Vector } from './grid.ts';
import { throughSurface } from './joint.ts';
import { solidDensity, usefulDensity } from './water-reading.ts';

/** What one voice says of the piece, in figures that a sentence can be made of. Fineness in parts per thousand, density in g/cm³. */
export type Says =
	| { readonly by: 'mark'; readonly perMille: number }
	| { readonly by: 'touch'; readonly id: string; readonly holds: Fineness | null; readonly attackedBy: Fineness | null }
	| { readonly by: 'fluorescence' | 'core' | 'assay'; readonly id: string; readonly perMille: number }
	| { readonly by: 'water'; readonly id: string; readonly density: number; readonly like: readonly LookAlikeId[] }
	| { readonly by: 'magnet'; readonly id: string; readonly pull: Pull }
	| { readonly by: 'coin'; readonly id: string; readonly grams: number };

/** Two voices that can hardly both be right about a piece of one alloy. */
export type Contradiction = { readonly first: Says; readonly second: Says };

/** Two bells three standard deviations apart from a common middle: e^(−4.5). */
const APART = Math.exp(-4.5);
/** A pull or a coin's weight speaks against any solid piece when it is so much likelier over some core. */
const AGAINST_SOLID = 20;

export function saysOf(start: Start, finding: Finding): Says | null {
	const { id } = finding;
	switch (finding.kind) {
		case 'touch':
			return { by: 'touch', id, holds: finding.holds, attackedBy: finding.attackedBy };
		case 'fluorescence':
			return { by: 'fluorescence', id, perMille: surfaceReading(finding, start.subject.metal).perMille };
		case 'core':
		case 'assay':
			return { by: finding.kind, id, perMille: finding.perMille.toNumber() };
		case 'water': {
			const found = usefulDensity(finding);
			if (found === null) return null;
			return { by: 'water', id, density: found.density, like: looksLike(found.density, found.u).map((each) => each.id) };
		}
		case 'magnet':
			return { by: 'magnet', id, pull: finding.pull };
		case 'coin':
			return { by: 'coin', id, grams: finding.grams.toNumber() };
	}
}

const peak = (values: Vector) => values.reduce((most, value) => Math.max(most, value), 0);
const scaled = (values: Vector): Vector => {
	const least = values.reduce((low, value) => Math.min(low, value), Infinity);
	const most = peak(values);
	// the flat part for slips is taken off: it is there so that nothing is impossible, not so that everything agrees
	return most - least <= 0 ? flat() : values.map((value) => (value - least) / (most - least));
};

/** What a density says of one alloy without air in it: an innocent low reading is an excuse, not an agreement. */
function bareDensity({ subject }: Start, finding: Finding): Vector | null {
	const found = finding.kind === 'water' ? usefulDensity(finding) : null;
	return found === null ? null : solidDensity(found.density, found.u, subject.metal, null);
}

/**
 * The pairs of voices that cannot both be right about one alloy all through: the mark and each finding, and each two findings.
 * formula: likelihoods by bulk, each scaled to a peak of 1 without its flat part; the pair disagrees when the largest product is under e^(−4.5);
 * a pull or a coin's weight disagrees with the mark when it is 20 times likelier over some core.
 * rounding: none.
 * source: the criterion of three standard deviations is common practice, no source.
 */
export function contradictions(start: Start, findings: readonly Finding[]): Contradiction[] {
	const enrichment = enrichmentOf(start.subject);
	const voices: { readonly says: Says; readonly values: Vector }[] = [];
	const { claimed } = start.subject;
	const mark: Says | null = claimed === null ? null : { by: 'mark', perMille: claimed };
	if (mark !== null) voices.push({ says: mark, values: scaled(start.prior.bulk.honest.map((share, cell) => Math.max(share, cell >= claimed! ? 1e-3 : 0))) });
	const found: Contradiction[] = [];
	const balance = balanceIn(start, findings);
	for (const finding of findings) {
		const observation = observe(start, finding, balance);
		const says = saysOf(start, finding);
		if (observation === null || says === null) continue;
		const { surface, bulk, solid, streak, core } = observation;
		if (says.by === 'magnet' || says.by === 'coin') {
			const over = Math.max(...start.cores.map((each) => Number(core?.(each.core) ?? 0)));
			if (mark !== null && over > AGAINST_SOLID * (solid?.[0] ?? 1)) found.push({ first: mark, second: says });
			continue;
		}
		const values = streak?.values ?? bulk ?? (surface === undefined ? null : throughSurface(surface, enrichment)) ?? bareDensity(start, finding);
		if (values !== null) voices.push({ says, values: scaled(values) });
	}
	voices.forEach((first, index) => {
		for (const second of voices.slice(index + 1)) {
			let most = 0;
			for (let cell = 0; cell < CELLS; cell += 1) most = Math.max(most, first.values[cell]! * second.values[cell]!);
			if (most < APART) found.push({ first: first.says, second: second.says });
		}
	});
	return found;
}
