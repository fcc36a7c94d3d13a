import { decimal } from '../number/decimal.ts';
import type { Core, Finding, Fluorescence, Read, Touch } from './finding.ts';
import { readOf } from './fluorescence.ts';
import type { MainMetal } from './subject.ts';

/** Readings of one tester further apart than so many of their uncertainties are not one reading made again. */
const APART = 2.5;

/**
 * Findings that are one test made again are one finding: five readings of the same alloy by the same tester share nearly all of their doubt.
 * formula: readings by one tester within 2.5 u of each other become their mean, with the u of one; streaks of one kind between the same acids
 * count once; everything else stays.
 * rounding: none.
 * source: JCGM 100:2008, 4.2.7 and 5.2.4 (observations that share an error do not average it out); the limit is common practice, no source.
 */
export function pooled(findings: readonly Finding[], metal: MainMetal): Finding[] {
	const rest: Finding[] = [];
	const streaks = new Map<string, Touch>();
	const readings = new Map<string, (Fluorescence | Core)[]>();
	for (const finding of findings) {
		if (finding.kind === 'touch') {
			const { how, tester, holds, attackedBy } = finding;
			const key = JSON.stringify([how, tester, holds, attackedBy], (_, value: unknown) => (typeof value === 'bigint' ? `${value}` : value));
			const known = streaks.get(key);
			if (known === undefined || finding.u < known.u) streaks.set(key, finding);
		} else if (finding.kind === 'fluorescence' || finding.kind === 'core') {
			const key = `${finding.kind}|${finding.tester ?? ''}`;
			readings.set(key, [...(readings.get(key) ?? []), finding]);
		} else rest.push(finding);
	}
	return [...rest, ...streaks.values(), ...[...readings.values()].flatMap((each) => clusters(each, metal).map(meanOf))];
}

const valueOf = (finding: Fluorescence | Core, metal: MainMetal): number =>
	finding.kind === 'core' ? finding.perMille.toNumber() : readOf(finding.reads, metal);

/** Neighbours on the line of fineness, so that the order in which they came does not matter. */
function clusters(readings: readonly (Fluorescence | Core)[], metal: MainMetal): (Fluorescence | Core)[][] {
	const sorted = [...readings].sort((a, b) => valueOf(a, metal) - valueOf(b, metal));
	const found: (Fluorescence | Core)[][] = [];
	for (const each of sorted) {
		const last = found.at(-1);
		const first = last?.[0];
		if (first !== undefined && valueOf(each, metal) - valueOf(first, metal) <= APART * Math.min(each.u, first.u)) last!.push(each);
		else found.push([each]);
	}
	return found;
}

function meanOf(readings: readonly (Fluorescence | Core)[]): Fluorescence | Core {
	const first = readings.reduce((least, each) => (each.u < least.u ? each : least));
	if (readings.length === 1) return first;
	const count = decimal(String(readings.length));
	if (first.kind === 'core') {
		const total = readings.reduce((sum, each) => (each.kind === 'core' ? sum.plus(each.perMille) : sum), decimal('0'));
		return { ...first, perMille: total.div(count) };
	}
	const sums = new Map<Read['metal'], Read['perMille']>();
	for (const each of readings) {
		for (const { metal, perMille } of each.kind === 'fluorescence' ? each.reads : []) sums.set(metal, (sums.get(metal) ?? decimal('0')).plus(perMille));
	}
	return { ...first, reads: [...sums].map(([metal, total]) => ({ metal, perMille: total.div(count) })) };
}

/** A density with its uncertainty, g/cm³. */
export type Density = { readonly density: number; readonly u: number };

/** Water weighings that agree are one: the air in a link and the alloy are the same each time. The mean, with the least u. */
export function pooledDensities(densities: readonly Density[]): Density[] {
	const found: Density[][] = [];
	for (const each of [...densities].sort((a, b) => a.density - b.density)) {
		const last = found.at(-1);
		const first = last?.[0];
		if (first !== undefined && each.density - first.density <= APART * Math.hypot(each.u, first.u)) last!.push(each);
		else found.push([each]);
	}
	return found.map((group) => ({
		density: group.reduce((sum, { density }) => sum + density, 0) / group.length,
		u: Math.min(...group.map(({ u }) => u))
	}));
}
