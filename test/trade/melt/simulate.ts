import { toNumber, type Exact } from '../../../src/trade/number/exact.ts';
import { metals, type MetalId } from '../../../src/trade/metal/metals.ts';
import { lossesOf, type LossOverrides } from '../../../src/trade/melt/losses.ts';
import type { MeltParcel } from '../../../src/trade/melt/spread.ts';
import { monteCarlo, type Input } from '../../../src/trade/uncertainty/monte-carlo.ts';

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

/** A value and how far each drawn source moves it. */
type Drawn = { readonly value: number; readonly moves: readonly (readonly [number, number])[] };

function moved({ value, moves }: Drawn, drawn: readonly number[]): number {
	let total = value;
	for (const [source, u] of moves) total += u * drawn[source]!;
	return total;
}

/**
 * The second route to a melt's interval: every source drawn once a run, the melt worked out again in plain numbers.
 * `what` names the figure: the bar in grams, one metal's retained grams, or its fineness in ‰.
 */
export function simulateMelt(
	parcels: readonly MeltParcel[],
	what: { readonly figure: 'bar' } | { readonly figure: 'fine' | 'fineness'; readonly metal: MetalId },
	options: { readonly draws: number; readonly coverage: number; readonly seed: number; readonly losses: 'normal' | 'rectangular'; readonly own?: LossOverrides }
) {
	const inputs: Input[] = [];
	const place = new Map<string, number>();
	const use = (name: string, input: Input) => {
		if (!place.has(name)) place.set(name, inputs.push(input) - 1);
	};
	for (const parcel of parcels) {
		const losses = lossesOf(parcel.lossClass, options.own);
		for (const part of ['nonMetal', 'metalLoss', 'retention'] as const) {
			const [low, high] = [losses[part].low.toNumber(), losses[part].high.toNumber()];
			use(
				`${part}:${parcel.lossClass}`,
				options.losses === 'rectangular'
					? { distribution: 'rectangular', low, high }
					: { distribution: 'normal', mean: (low + high) / 2, u: (high - low) / Math.sqrt(12) }
			);
		}
		for (const doubt of [parcel.netDoubt, ...Object.values(parcel.fineDoubt ?? {})]) {
			for (const source of Object.keys(doubt?.contributions ?? {})) use(source, { distribution: 'normal', mean: 0, u: 1 });
		}
	}
	const at = (name: string) => place.get(name)!;
	const doubtful = (value: number, contributions: Readonly<Record<string, number>> = {}): Drawn => ({
		value,
		moves: Object.entries(contributions).map(([source, u]): [number, number] => [at(source), u])
	});
	const ready = parcels.map((parcel) => ({
		dirt: at(`nonMetal:${parcel.lossClass}`),
		loss: at(`metalLoss:${parcel.lossClass}`),
		kept: at(`retention:${parcel.lossClass}`),
		net: doubtful(parcel.net.toNumber(), parcel.netDoubt?.contributions),
		fine: (Object.entries(parcel.fine) as [MetalId, Exact][]).map(([id, grams]) => ({
			wanted: what.figure !== 'bar' && id === what.metal,
			precious: metals[id].precious,
			grams: doubtful(toNumber(grams), parcel.fineDoubt?.[id]?.contributions)
		}))
	}));
	const model = (drawn: readonly number[]): number => {
		let bar = 0;
		let fine = 0;
		for (const parcel of ready) {
			const keep = 1 - drawn[parcel.dirt]!;
			const lost = 1 - drawn[parcel.kept]!;
			const metal = keep * moved(parcel.net, drawn);
			let precious = 0;
			let wanted = 0;
			let wantedIsPrecious = true;
			for (const each of parcel.fine) {
				const grams = keep * moved(each.grams, drawn);
				if (each.precious) precious += grams;
				if (each.wanted) {
					wanted = grams;
					wantedIsPrecious = each.precious;
				}
			}
			const base = metal - precious;
			const baseLost = Math.min(Math.max(metal * drawn[parcel.loss]! - precious * lost, 0), base / 2);
			bar += metal - precious * lost - baseLost;
			fine += wanted * (wantedIsPrecious ? 1 - lost : 1 - baseLost / base);
		}
		return what.figure === 'bar' ? bar : what.figure === 'fine' ? fine : (1000 * fine) / bar;
	};
	return monteCarlo(model, inputs, options.draws, seeded(options.seed), options.coverage);
}
