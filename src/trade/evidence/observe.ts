import { coinById } from '../metal/coins.ts';
import { coinObservation } from './coin-weight.ts';
import { coreObservation } from './core-test.ts';
import { isFineGold } from './cores.ts';
import type { Finding } from './finding.ts';
import { assayObservation } from './fire-assay.ts';
import { balanceOf, fluorescenceObservation, type Balance } from './fluorescence.ts';
import { magnetObservation } from './magnet.ts';
import type { Observation } from './observation.ts';
import { pooled, pooledDensities } from './pool.ts';
import type { Start } from './start.ts';
import { touchObservation } from './touch.ts';
import { densityObservation, usefulDensity } from './water-reading.ts';

/**
 * What one finding says of this piece by itself; null when it says nothing: too light on the water scale, a coin that is not in the table.
 * The balance that a fluorescence reading shows serves a water weighing.
 */
export function observe(start: Start, finding: Finding, balance: Balance | null): Observation | null {
	const { metal, build } = start.subject;
	switch (finding.kind) {
		case 'touch':
			return touchObservation(finding);
		case 'fluorescence':
			return fluorescenceObservation(finding, metal);
		case 'water': {
			const found = usefulDensity(finding);
			return found === null ? null : densityObservation(found.density, found.u, { metal, build, matched: isFineGold(start.subject) }, balance);
		}
		case 'magnet':
			return magnetObservation(finding.pull, metal);
		case 'core':
			return coreObservation(finding);
		case 'assay':
			return assayObservation(finding);
		case 'coin': {
			const coin = coinById(finding.coin);
			return coin === null ? null : coinObservation(finding, coin);
		}
	}
}

export function balanceIn(start: Start, findings: readonly Finding[]): Balance | null {
	return balanceOf(findings.filter((finding) => finding.kind === 'fluorescence'), start.subject.metal);
}

/** All that the findings say together: a test made again by the same tester is one, and so are water weighings that agree. */
export function observeAll(start: Start, findings: readonly Finding[]): readonly Observation[] {
	const { metal, build } = start.subject;
	const balance = balanceIn(start, findings);
	const densities = pooledDensities(findings.flatMap((finding) => (finding.kind === 'water' ? (usefulDensity(finding) ?? []) : [])));
	const of = { metal, build, matched: isFineGold(start.subject) };
	return [
		...densities.map(({ density, u }) => densityObservation(density, u, of, balance)),
		...pooled(findings.filter(({ kind }) => kind !== 'water'), metal).flatMap((finding) => observe(start, finding, balance) ?? [])
	];
}
