import type { Finding } from '$trade/evidence/finding.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import { densityByWater } from '$trade/evidence/water-weighing.ts';
import { coinById } from '$trade/metal/coins.ts';
import { perMilleNumber, type Fineness } from '$trade/metal/fineness.ts';
import { standardUncertainty } from '$trade/uncertainty/uncertain.ts';
import type { Format } from '../format.ts';
import { karatWords } from './karat-words.ts';

export type FindingWords = {
	/** What was done and what it showed. */
	readonly what: string;
	/** How good it is. */
	readonly how: string;
	/** When it says nothing: why, and what would help. */
	readonly mute: string;
};

const PULLS = { none: 'not drawn', weak: 'drawn a little', strong: 'drawn strongly' } as const;

/** One finding as a row of the piece's page. */
export function findingWords(finding: Finding, { metal }: Pick<Subject, 'metal'>, format: Format, testerName: (id: string) => string | null): FindingWords {
	const by = 'tester' in finding && finding.tester !== null ? (testerName(finding.tester) ?? 'a tester that is gone') : null;
	const good = (u: number) => `good to ±${format.estimate(u, 2)}\u00a0‰`;
	const how = (...parts: readonly (string | null)[]) => [...parts, by].filter((part) => part !== null && part !== '').join(' · ');
	switch (finding.kind) {
		case 'touch': {
			const drawn = finding.how === 'rub' ? 'Streak rubbed off the surface' : 'Streak out of a filed notch';
			return { what: `${drawn}: ${bracketWords(finding.holds, finding.attackedBy, metal, format)}`, how: how(good(finding.u)), mute: '' };
		}
		case 'fluorescence': {
			const reads = finding.reads.map((read) => `${read.metal} ${format.number(read.perMille)}`).join(', ');
			return { what: `Fluorescence reading: ${reads}\u00a0‰`, how: how(good(finding.u), 'the surface only'), mute: '' };
		}
		case 'core':
			return { what: `Core test: ${format.number(finding.perMille)}\u00a0‰`, how: how(good(finding.u), 'the inside'), mute: '' };
		case 'assay':
			return {
				what: `Fire assay: ${format.number(finding.perMille)}\u00a0‰`,
				how: how(good(finding.u), `its sample ±${format.estimate(finding.sampleU, 2)}\u00a0‰`, finding.by),
				mute: ''
			};
		case 'magnet':
			return { what: `Magnet: ${PULLS[finding.pull]}`, how: '', mute: '' };
		case 'coin': {
			const coin = coinById(finding.coin);
			const wide = finding.diameter === null ? '' : `, ${format.number(finding.diameter)}\u00a0mm`;
			return {
				what: `${coin?.name ?? 'Coin'} weighed: ${format.mass(finding.grams)}${wide}`,
				how: coin === null ? '' : `legal ${format.mass(coin.mass.grams, 'g', { least: 2, most: 4 })}${coin.diameter === null ? '' : `, ${coin.diameter}\u00a0mm`}`,
				mute: coin === null ? 'This coin is not in the table, so its weight says nothing.' : ''
			};
		}
		case 'water':
			return waterWords(finding, format);
	}
}

function bracketWords(holds: Fineness | null, attackedBy: Fineness | null, metal: Subject['metal'], format: Format): string {
	const words = (fineness: Fineness) => karatWords(perMilleNumber(fineness), metal, format);
	const parts = [
		holds === null ? '' : `withstands the acid for ${words(holds)}`,
		attackedBy === null ? '' : `is attacked by the one for ${words(attackedBy)}`
	];
	return parts.filter((part) => part !== '').join(', ');
}

function waterWords(finding: Extract<Finding, { kind: 'water' }>, format: Format): FindingWords {
	const { method, air, water, temperature } = finding;
	const way = method === 'suspended' ? `${format.mass(water)} hung in water` : `the beaker gained ${format.mass(water)}`;
	const how = `${format.mass(air)} in air, ${way} of ${format.number(temperature)}\u00a0°C`;
	const found = densityByWater(finding);
	if (!found.ok) return { what: 'Water weighing', how, mute: 'These readings make no density.' };
	const { density, useful, leastGrams, leastDivision } = found.value;
	const u = standardUncertainty(density);
	const what = `Water weighing: ${format.estimate(density.value, 4)} ± ${format.estimate(u, 1)}\u00a0g/cm³`;
	if (useful) return { what, how, mute: '' };
	const help = [
		Number.isFinite(leastGrams) ? `at least ${format.estimate(Math.ceil(leastGrams), 3)}\u00a0g of pieces alike` : '',
		leastDivision === 0 ? '' : `a scale with steps of ${format.estimate(leastDivision, 1)}\u00a0g`
	].filter((part) => part !== '');
	const mute =
		`Too light for this scale to say anything of the fineness: with steps of ${format.mass(finding.division)} and a bubble the density is doubtful by ` +
		`${format.estimate((100 * u) / density.value, 2)}\u00a0%. What would help: ${help.length === 0 ? 'another test' : help.join(', or ')}.`;
	return { what, how, mute };
}
