import { decimal, type Decimal } from '../../../src/trade/number/decimal.ts';
import { weighing } from '../../../src/trade/mass/weighing.ts';
import { fromKarat, fromPerMille } from '../../../src/trade/metal/fineness.ts';
import type { MetalId } from '../../../src/trade/metal/metals.ts';
import type { Entry } from '../../../src/trade/lot/sums.ts';
import type { Content, Piece } from '../../../src/trade/piece/piece.ts';
import type { PriceSheet } from '../../../src/trade/price/price-sheet.ts';

/** A repeatable row of numbers from 0 to below 1 (mulberry32). */
export function seeded(seed: number): () => number {
	let state = seed;
	return () => {
		state = (state + 0x6d2b79f5) | 0;
		let t = Math.imul(state ^ (state >>> 15), 1 | state);
		t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
		return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
	};
}

export const METALS = ['Au', 'Ag', 'Pt', 'Pd', 'Cu', 'Zn'] as const satisfies readonly MetalId[];

const karat = (k: string): Content => ({ metal: 'Au', taken: fromKarat(decimal(k)) });
const milles = (metal: MetalId, text: string): Content => ({ metal, taken: fromPerMille(decimal(text)) });

/** What a counter sees: karat gold, silver, platinum, dental and brass; between them the six metals. */
const KINDS: readonly { readonly article: string; readonly mark: string; readonly contents: readonly Content[]; readonly lossClass: Piece['lossClass'] }[] = [
	{ article: 'chain', mark: '14 kt', contents: [karat('14')], lossClass: 'worn' },
	{ article: 'ring', mark: '18 kt', contents: [karat('18')], lossClass: 'clean' },
	{ article: 'ring', mark: '10 kt', contents: [karat('10')], lossClass: 'zinc-solder' },
	{ article: 'fork', mark: '925', contents: [milles('Ag', '925')], lossClass: 'clean' },
	{ article: 'ring', mark: 'Pt 950', contents: [milles('Pt', '950')], lossClass: 'clean' },
	{ article: 'dental', mark: '', contents: [milles('Au', '625'), milles('Pd', '180'), milles('Ag', '120')], lossClass: 'dental' },
	{ article: 'fitting', mark: '', contents: [milles('Cu', '667'), milles('Zn', '333')], lossClass: 'base' }
];

function drawPiece(random: () => number): Piece {
	const kind = KINDS[Math.floor(random() * KINDS.length)]!;
	const weighed = weighing((0.5 + random() * 60).toFixed(2), 'g');
	if (!weighed.ok) throw new Error(weighed.problem.kind);
	return { ...kind, count: 1, weighing: weighed.value, origin: 'us-modern', deductions: [], moreThanMelt: false, note: '', photos: [] };
}

/** A lot of so many pieces, the same every time. */
export function drawLot(many: number): Entry[] {
	const random = seeded(2_024);
	return Array.from({ length: many }, (_, i) => ({ piece: drawPiece(random), key: `p${i}` }));
}

/** Another piece for the same place, as when a mass is typed anew. */
export function withMass(piece: Piece, grams: string): Piece {
	const weighed = weighing(grams, 'g');
	if (!weighed.ok) throw new Error(weighed.problem.kind);
	return { ...piece, weighing: weighed.value };
}

export const SHEET: PriceSheet = {
	currency: 'USD',
	quotes: [
		{ metal: 'Au', amount: decimal('4102.50'), per: 'ozt' },
		{ metal: 'Ag', amount: decimal('49.17'), per: 'ozt' },
		{ metal: 'Pt', amount: decimal('1588.00'), per: 'ozt' },
		{ metal: 'Pd', amount: decimal('1401.50'), per: 'ozt' },
		{ metal: 'Cu', amount: decimal('9.85'), per: 'kg' },
		{ metal: 'Zn', amount: decimal('2.94'), per: 'kg' }
	],
	at: 0,
	source: 'drawn for the bench'
};

/** Gold a little dearer each time, so that nothing can be remembered from the run before. */
export function goldPrice(run: number): Decimal {
	return decimal('4102.50').plus(decimal('0.05').times(run));
}

/** Grams and shares by metal of one piece, as plain numbers: what a program of floats would keep. */
export type Row = { grams: number; shares: number[] };

export function rowOf({ piece }: Entry): Row {
	const shares = METALS.map((metal) => {
		const found = piece.contents.find((content) => content.metal === metal);
		return found === undefined ? 0 : Number(found.taken.perMille.n) / Number(found.taken.perMille.d) / 1000;
	});
	return { grams: piece.weighing.reading.toNumber(), shares };
}
