import type { Build } from '../../../src/trade/evidence/belief.ts';
import type { Finding, Pull, Touch } from '../../../src/trade/evidence/finding.ts';
import type { Subject } from '../../../src/trade/evidence/subject.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import { seeded } from './lot.ts';

export type Tested = { readonly subject: Subject; readonly findings: readonly Finding[] };

/** Karats that are stamped, with the density of a usual yellow alloy; the acids stand at every two karats. */
const STAMPED = [[9, 11.2], [10, 11.6], [14, 13.1], [18, 15.5], [21, 17.2], [22, 17.7]] as const;
const BUILDS: readonly Build[] = ['solid', 'jointed', 'hollow'];
const karat = (k: number): NonNullable<Touch['holds']> => ({ perMille: ratio(decimal(String(k * 125)), decimal('3')) });

/**
 * The n-th stamped gold piece with four kinds of findings: a streak, a fluorescence reading with its balance, a weighing in water
 * and a magnet. No two are alike, and about one in ten weighs far too light in water.
 */
export function drawTested(n: number): Tested {
	const random = seeded(7_919 * n + 1);
	const [k, density] = STAMPED[Math.floor(random() * STAMPED.length)]!;
	const claimed = (k * 1000) / 24;
	const shown = Math.min(990, claimed + 30 * (random() - 0.5));
	const grams = 15 + 40 * random();
	const real = density * (random() < 0.1 ? 0.75 : 1 + 0.02 * (random() - 0.5));
	const copper = (1000 - shown) * (0.3 + 0.4 * random());
	const pull: Pull = random() < 0.05 ? 'weak' : 'none';
	const reader = (id: string, u: number) => ({ id, at: n, tester: 'own', u, bias: 3, gross: 0.03 });
	return {
		subject: { metal: 'Au', claimed, legal: claimed - 3, origin: 'us-modern', build: BUILDS[n % 3]!, coin: null },
		findings: [
			{ kind: 'touch', how: n % 2 === 0 ? 'rub' : 'notch', holds: karat(k - 1), attackedBy: karat(k + 1), ...reader('a', 15) },
			{
				kind: 'fluorescence', ...reader('b', 12),
				reads: [
					{ metal: 'Au', perMille: decimal(shown.toFixed(1)) },
					{ metal: 'Cu', perMille: decimal(copper.toFixed(1)) },
					{ metal: 'Ag', perMille: decimal((1000 - shown - copper).toFixed(1)) }
				]
			},
			{
				kind: 'water', method: 'suspended', id: 'c', at: n, air: decimal(grams.toFixed(2)), water: decimal((grams - grams / real).toFixed(2)),
				division: decimal('0.01'), temperature: decimal('20')
			},
			{ kind: 'magnet', id: 'd', at: n, pull }
		]
	};
}
