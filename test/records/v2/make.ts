/**
 * Wrote the frozen records of version 2 beside it, once: `npx tsx test/records/v2/make.ts`. It does not overwrite. Version 2 of a piece may
 * hold evidence, and the settings say how it is weighed; other kinds have no version 2.
 */
import { createHash } from 'node:crypto';
import { existsSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Evidence } from '../../../src/trade/evidence/belief.ts';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import { encodeBody } from '../../../src/trade/record/kind.ts';
import { canonicalText } from '../../../src/trade/record/record.ts';
import { bodies as before } from '../v1/make.ts';

const d = decimal;
const at = 1_796_000_000_000;
const readBy = { tester: 'tester-1', u: 16, bias: 2, gross: 0.03 };

const evidence: Evidence = {
	build: 'hollow',
	findings: [
		{
			kind: 'touch', id: 'f1', at, how: 'rub', holds: { perMille: ratio(d('1750'), d('3')) }, attackedBy: { perMille: ratio(d('750'), d('1')) }, tester: null,
			u: 15, bias: 5, gross: 0.02
		},
		{ kind: 'fluorescence', id: 'f2', at, ...readBy, reads: [{ metal: 'Au', perMille: d('588.2') }, { metal: 'Cu', perMille: d('300') }] },
		{ kind: 'water', id: 'f3', at, method: 'suspended', air: d('12.4'), water: d('11.00'), division: d('0.01'), temperature: d('21.5') },
		{ kind: 'magnet', id: 'f4', at, pull: 'none' },
		{ kind: 'core', id: 'f5', at, ...readBy, perMille: d('12') },
		{ kind: 'assay', id: 'f6', at, ...readBy, tester: null, perMille: d('9.5'), sampleU: 3, by: 'an office' },
		{ kind: 'coin', id: 'f7', at, coin: 'sovereign', grams: d('7.98'), division: d('0.01'), diameter: d('22.05') }
	],
	belief: {
		metal: 'Au', mean: 471.25, low: 4.5, median: 580, high: 585.5, odds: { honest: 0.79, under: 0.015, other: 0.005, layered: 0.19 }, shared: { 'tester-1': -0.25 }, own: 223.5
	},
	taking: { metal: 'Au', taken: { perMille: ratio(d('500'), d('1')) }, rests: ['f1', 'f2'], prudence: 0.8 }
};

/** The bodies of version 1, with what version 2 added. */
export const bodies = {
	piece: { ...before.piece, piece: { ...before.piece.piece, evidence } },
	settings: {
		...before.settings,
		prudence: 0.9,
		testCosts: { core: d('15'), touch: d('0.75') },
		priors: { hallmarked: { honest: 0.98, under: 0.01, other: 0.005, layered: 0.005 } }
	}
};

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	let previous: string | null = null;
	for (const kind of ['piece', 'settings'] as const) {
		const record = {
			id: `01KFROZEN2-${kind}`,
			kind,
			version: 2,
			subject: kind === 'piece' ? 'piece-1' : 'settings',
			replaces: null,
			settles: [],
			at,
			device: 'device-1',
			body: encodeBody(kind, bodies[kind] as never),
			previous
		};
		const hash: string = createHash('sha256').update(canonicalText(record)).digest('hex');
		previous = hash;
		const file = fileURLToPath(new URL(`${kind}.json`, import.meta.url));
		if (existsSync(file)) console.log(`${kind}.json is there and stays as it is`);
		else writeFileSync(file, `${JSON.stringify({ ...record, hash }, null, '\t')}\n`);
	}
}
