/**
 * Wrote the frozen records of version 1 beside it, once: `npx tsx test/records/v1/make.ts`. It does not overwrite. When a
 * kind changes, its version counts up and gets a folder of its own; these files stay, and today's code must go on reading them.
 */
import { createHash } from 'node:crypto';
import { existsSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { exact, ratio } from '../../../src/trade/number/exact.ts';
import type { Piece } from '../../../src/trade/piece/piece.ts';
import type { PriceSheet } from '../../../src/trade/price/price-sheet.ts';
import { encodeBody, type Bodies, type RecordKind } from '../../../src/trade/record/kind.ts';
import { settingsShape1, type Settings1 } from '../../../src/trade/record/kinds/settings.ts';
import { canonicalText } from '../../../src/trade/record/record.ts';

const d = decimal;
const at = 1_790_000_000_000;

const prices: PriceSheet = {
	currency: 'EUR',
	quotes: [
		{ metal: 'Au', amount: d('3512.45'), per: 'ozt' },
		{ metal: 'Ag', amount: d('1.234'), per: 'g' }
	],
	at,
	source: 'typed at the stall'
};

const ring: Piece = {
	article: 'ring with stones',
	count: 3,
	weighing: { typed: '12,40', reading: d('12.4'), unit: 'g', division: d('0.01'), scale: 'scale-1', repeats: [d('12.41'), d('12.39')], tare: d('0.5') },
	mark: '14 kt',
	origin: 'us-modern',
	contents: [{ metal: 'Au', taken: { perMille: ratio(d('1750'), d('3')) } }],
	deductions: [
		{
			what: 'stones',
			mass: { grams: d('0.35') },
			u: 0.035,
			how: '3 round 4.1 x 2.5 mm',
			stones: { cut: 'round', count: 3, length: d('4.1'), width: d('4.1'), depth: d('2.5'), gravity: d('3.52') }
		},
		{ what: 'springs', mass: { grams: d('0.05') }, u: 0.005, how: 'typed' }
	],
	lossClass: 'stone-set',
	moreThanMelt: true,
	note: 'one stone is loose',
	photos: ['9f86d081884c7d659a2feaa0c55ad015a3bf4f1b2b0b822cd15d6c15b0f00a08']
};

/** One body of each kind as its version 1 was, with every field in use. */
export const bodies: Omit<Bodies, 'settings'> & { readonly settings: Settings1 } = {
	lot: { name: 'Tuesday, second seller', note: 'box of odds', state: 'open', purchase: null, sheet: 'sheet-1', openedAt: at, ask: '1.250' },
	piece: { lot: 'lot-1', order: 1.5, piece: ring },
	prices,
	purchase: {
		number: 'A-0001',
		lot: 'lot-1',
		boughtAt: at + 1,
		seller: { name: 'Maren Holt', document: 'passport 12', note: '' },
		paid: { amount: d('350.05'), currency: 'EUR' },
		means: 'cash',
		offer: { amount: d('350.00'), currency: 'EUR' },
		share: d('0.82'),
		sheet: 'sheet-1',
		prices,
		totals: { gross: d('11.9'), net: d('11.5'), fine: { Au: ratio(d('161'), d('24')) }, value: exact(d('757.13')) },
		second: { typed: '11.91', reading: d('11.91'), unit: 'g', division: null, scale: null, repeats: [], tare: null },
		entries: 1,
		pieces: 3
	},
	settings: {
		currency: 'EUR',
		mark: 'comma',
		massUnit: 'dwt',
		scale: 'scale-1',
		cashStep: d('0.05'),
		tiers: [
			{ from: d('0'), share: d('0.8') },
			{ from: d('1000'), share: d('0.85') }
		],
		volatility: { Au: 0.16, Ag: 0.3 },
		days: 21,
		spreads: { hallmarked: { shared: 0.002, own: 0.004 } },
		losses: { worn: { metalLoss: { low: d('0.004'), high: d('0.012') } } },
		language: 'de-AT'
	},
	scale: { id: 'scale-1', name: 'Counter', unit: 'g', division: d('0.01'), verification: d('0.1'), accuracyClass: 'II', checkedOn: '2026-09-01' },
	tester: {
		id: 'tester-1',
		name: 'Back room',
		kind: 'fluorescence',
		rows: [
			{ metal: 'Au', colour: 'any', perMille: 585, u: 14 },
			{ metal: 'Au', colour: 'white', perMille: 750, u: 12.5 }
		],
		bias: 2,
		gross: 0.03,
		checkedOn: '2026-09-01'
	}
};

export const subjects: Readonly<Record<RecordKind, string>> = {
	lot: 'lot-1',
	piece: 'piece-1',
	prices: 'sheet-1',
	purchase: 'purchase-1',
	settings: 'settings',
	scale: 'scale-1',
	tester: 'tester-1'
};

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	let previous: string | null = null;
	for (const kind of Object.keys(bodies) as RecordKind[]) {
		const record = {
			id: `01KFROZEN-${kind}`,
			kind,
			version: 1,
			subject: subjects[kind],
			replaces: kind === 'purchase' ? '01KBEFORE' : null,
			settles: kind === 'purchase' ? ['01KOTHER'] : [],
			at,
			device: 'device-1',
			body: kind === 'settings' ? settingsShape1.write(bodies.settings) : encodeBody(kind, bodies[kind] as never),
			previous
		};
		const hash: string = createHash('sha256').update(canonicalText(record)).digest('hex');
		previous = hash;
		const file = fileURLToPath(new URL(`${kind}.json`, import.meta.url));
		if (existsSync(file)) console.log(`${kind}.json is there and stays as it is`);
		else writeFileSync(file, `${JSON.stringify({ ...record, hash }, null, '\t')}\n`);
	}
}
