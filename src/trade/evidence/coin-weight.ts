import { decimal } from '../number/decimal.ts';
import { wear, type Coin } from '../metal/coins.ts';
import { densityOf } from '../metal/density.ts';
import { lookAlike } from '../metal/look-alikes.ts';
import { exact, minus, sum } from '../number/exact.ts';
import { shareOf } from '../metal/fineness.ts';
import type { CoinWeight } from './finding.ts';
import { flat } from './grid.ts';
import type { Observation } from './observation.ts';

/** A gauge and a worn rim, in millimetres. */
const DIAMETER_U = 0.1;
const SLIP = 0.005;

const bell = (x: number, mean: number, u: number) => Math.exp(-(((x - mean) / u) ** 2) / 2) / (u * Math.sqrt(2 * Math.PI));

/** The density of the coin's alloy: what is not named in its contents is copper. */
export function coinDensity(coin: Coin): number {
	const named = coin.contents.map(({ metal, fineness }) => ({ metal, share: shareOf(fineness) }));
	const rest = minus(exact(decimal('1')), sum(named.map(({ share }) => share)));
	const copper = named.some(({ metal }) => metal === 'Cu') || rest.n === 0n ? [] : [{ metal: 'Cu' as const, share: rest }];
	return densityOf({ shares: [...named, ...copper] }).value;
}

/**
 * One coin on the scale, and in the gauge, against the table. A layered coin is either of the right size, and then its weight follows its core,
 * or of the right weight, and then it is too thick or too wide; a few are neither.
 * formula: genuine: bell about legal grams x (1 − wear) with u = √((wear's u x grams)² + division² / 6 + (0.1 % of grams)²), times a bell about
 * the legal diameter; layered: 0.6 x right size (grams x density of the core / density of the coin, ± 2 %), 0.3 x right weight (± 0.7 %; right
 * diameter as often as not), 0.1 x anything from 0.3 to 1.2 of it; 0.5 % of slips on both sides.
 * rounding: none.
 * source: the coin's own law or specification (metal/coin-table.ts); the shares are working defaults, common practice, no source.
 */
export function coinObservation(finding: Pick<CoinWeight, 'grams' | 'division' | 'diameter'>, coin: Coin): Observation {
	const legal = coin.mass.grams.toNumber();
	const grams = finding.grams.toNumber();
	const { lost, u } = wear[coin.life];
	const scale = finding.division.toNumber() / Math.sqrt(6);
	const width = coin.diameter === null ? null : Number(coin.diameter);
	const measured = finding.diameter?.toNumber() ?? null;
	const ofWidth = (mean: number, spread: number) =>
		width === null || measured === null ? 1 : (1 - SLIP) * bell(measured, mean, spread) + SLIP / width;
	const anyWeight = (grams > 0.3 * legal && grams < 1.2 * legal ? 1 : 0.01) / (0.9 * legal);
	const genuine =
		(1 - SLIP) * bell(grams, legal * (1 - lost), Math.hypot(u * legal, scale, 0.001 * legal)) * ofWidth(width ?? 0, DIAMETER_U) +
		SLIP * anyWeight * ofWidth(width ?? 0, DIAMETER_U * 10);
	const density = coinDensity(coin);
	return {
		solid: flat().fill(genuine),
		core: (core) => {
			const { low, high } = lookAlike(core);
			const byCore = (legal * (low + high)) / 2 / density;
			const wider = (width ?? 0) * Math.sqrt((2 * density) / (low + high));
			const rightSize = bell(grams, byCore, Math.hypot(0.02 * legal, scale)) * ofWidth(width ?? 0, DIAMETER_U * 1.5);
			const rightWeight =
				bell(grams, legal, Math.hypot(0.007 * legal, scale)) *
				(0.5 * ofWidth(width ?? 0, DIAMETER_U * 1.5) + 0.5 * ofWidth(wider, Math.max(DIAMETER_U, 0.02 * wider)));
			return 0.6 * rightSize + 0.3 * rightWeight + 0.1 * anyWeight * ofWidth(width ?? 0, DIAMETER_U * 10);
		}
	};
}
