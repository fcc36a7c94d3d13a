import type { Vector } from './grid.ts';
import type { Stake } from './next-test.ts';

/**
 * What would be lost and what won on average when a piece is bought as things stand, each counted where it happens: margin = won − lost;
 * and the chance that it is bought above its worth.
 */
export type Swing = { readonly lost: number; readonly won: number; readonly atLoss: number };

const NOTHING: Swing = { lost: 0, won: 0, atLoss: 0 };

/** The swing of a piece if it is layered, and if it is not. */
export type Cases = { readonly layered: Swing; readonly sound: Swing };

/**
 * What is lost and won on a piece whose bulk is so distributed.
 * formula: lost = Σ chance x max(0, price − whole x fineness / 1000); won = Σ chance x max(0, whole x fineness / 1000 − price); at a loss = Σ chance
 * where the first is above nothing.
 * rounding: none.
 * source: expected value; common practice, no source.
 */
export function swing(bulk: Vector, { whole, price }: Stake): Swing {
	let lost = 0;
	let won = 0;
	let atLoss = 0;
	for (let cell = 0; cell < bulk.length; cell += 1) {
		const margin = (whole * cell) / 1000 - price;
		if (margin < 0) {
			lost -= bulk[cell]! * margin;
			atLoss += bulk[cell]!;
		} else won += bulk[cell]! * margin;
	}
	return { lost, won, atLoss };
}

/**
 * The swing of a piece, parted into what a layered one and what any other would bring.
 * formula: other = (bulk − odds of a layer x bulk under a layer) / (1 − odds), nothing below zero, scaled to one; then swing of each.
 * rounding: none. The bulk under a layer is that before any test, which a test of the inside would narrow; near nothing it makes no difference.
 * source: law of total probability.
 */
export function casesOf(bulk: Vector, odds: number, underLayer: Vector, stake: Stake): Cases {
	const rest = bulk.map((chance, cell) => Math.max(0, chance - odds * underLayer[cell]!));
	let total = 0;
	for (const chance of rest) total += chance;
	const sound = total > 0 ? swing(rest.map((chance) => chance / total), stake) : NOTHING;
	return { layered: swing(underLayer, stake), sound };
}

/** The swing at other odds of a layer: each case by its chance. */
export function atOdds({ layered, sound }: Cases, odds: number): Swing {
	const mean = (part: keyof Swing) => odds * layered[part] + (1 - odds) * sound[part];
	return { lost: mean('lost'), won: mean('won'), atLoss: mean('atLoss') };
}

/**
 * What a piece is worth on average.
 * formula: price + won − lost, which is Σ chance x whole x fineness / 1000.
 * rounding: none.
 * source: expected value; common practice, no source.
 */
export function expectedWorth({ lost, won }: Pick<Swing, 'lost' | 'won'>, { price }: Stake): number {
	return price + won - lost;
}

/**
 * What it is worth to know for certain before buying: no test is worth more.
 * formula: bought as things stand (won above lost) it saves what would be lost; left as things stand it wins what would be won.
 * rounding: none.
 * source: expected value of perfect information (Raiffa and Schlaifer, Applied Statistical Decision Theory, 1961), from memory.
 */
export function worthOfCertainty({ lost, won }: Pick<Swing, 'lost' | 'won'>): number {
	return Math.min(lost, won);
}
