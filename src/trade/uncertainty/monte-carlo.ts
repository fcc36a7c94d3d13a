import { assert } from '../number/decimal.ts';
import { normalQuantile } from './normal.ts';

/** What is known of one input of a model. */
export type Input =
	| { readonly distribution: 'normal'; readonly mean: number; readonly u: number }
	| { readonly distribution: 'rectangular'; readonly low: number; readonly high: number };

/** The result of many draws: `low` to `high` holds the share `coverage` of them. */
export type Simulated = {
	readonly mean: number;
	readonly u: number;
	readonly low: number;
	readonly high: number;
	readonly coverage: number;
};

/**
 * What it is: a result found by drawing its inputs many times: the second, independent route to an uncertainty.
 * formula: mean and standard deviation of the model's values; low and high leave the same number of sorted values outside,
 * in the unit of the model. `random` gives numbers from 0 to below 1 and is passed in, so that a run can be repeated.
 * rounding: none.
 * source: JCGM 101:2008, 6.4.2 (rectangular), 6.4.7 (normal), 7.6 equations 16 and 17, 7.7.2 (symmetric interval).
 */
export function monteCarlo(
	model: (inputs: readonly number[]) => number,
	inputs: readonly Input[],
	draws: number,
	random: () => number,
	coverage = 0.95
): Simulated {
	assert(Number.isInteger(draws) && draws >= 2, `a simulation needs at least two draws, not ${draws}`);
	assert(coverage > 0 && coverage < 1, `a coverage must lie between 0 and 1, not ${coverage}`);
	const values = new Float64Array(draws);
	const drawn = inputs.map(() => 0);
	let mean = 0;
	let squares = 0;
	for (let i = 0; i < draws; i += 1) {
		inputs.forEach((input, j) => {
			drawn[j] = draw(input, random());
		});
		const y = model(drawn);
		assert(Number.isFinite(y), `draw ${i + 1} of the model is ${y}`);
		values[i] = y;
		// mean and squares in one pass, about the running mean
		const step = y - mean;
		mean += step / (i + 1);
		squares += step * (y - mean);
	}
	values.sort();
	const inside = Math.min(draws - 1, Math.floor(coverage * draws + 0.5));
	const first = Math.max(1, Math.floor((draws - inside + 1) / 2));
	return {
		mean,
		u: Math.sqrt(squares / (draws - 1)),
		low: values[first - 1]!,
		high: values[Math.min(draws, first + inside) - 1]!,
		coverage
	};
}

function draw(input: Input, share: number): number {
	assert(share >= 0 && share < 1, `a random share must lie from 0 to below 1, not ${share}`);
	if (input.distribution === 'rectangular') return input.low + (input.high - input.low) * share;
	// half a step of the finest share away from zero, where the quantile ends
	return input.mean + input.u * normalQuantile(Math.max(share, 2 ** -54));
}
