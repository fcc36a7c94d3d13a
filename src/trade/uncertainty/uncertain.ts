import { assert } from '../number/decimal.ts';

/**
 * An estimate that remembers where its doubt comes from: one signed standard uncertainty per source, in the unit of the
 * value. Two estimates that share a source share that error: it adds up, it does not average out. Sources are independent
 * of each other. The sign says which way the value moves when the source's error is positive.
 */
export type Uncertain = { readonly value: number; readonly contributions: Readonly<Record<string, number>> };

/** One input of a result and how far the result moves for one unit of it. */
export type Term = { readonly input: Uncertain; readonly sensitivity: number };

/** A value without any doubt. */
export function certain(value: number): Uncertain {
	return fromMap(value, new Map());
}

/** A value with the standard uncertainty `u` from one source. */
export function uncertain(value: number, source: string, u: number): Uncertain {
	return fromMap(value, new Map([[source, u]]));
}

/**
 * What it is: the mean of repeated observations, one source per repetition, so that quantities observed in the same
 * repetitions are correlated as their scatter says.
 * formula: mean = sum of x / n; contribution of repetition i = (x_i - mean) / square root of n (n - 1), in the unit of x.
 * rounding: none.
 * source: JCGM 100:2008, 4.2.3 (variance of the mean) and 5.2.3 equation 17 (covariance of two means).
 */
export function fromRepeats(values: readonly number[], sources: readonly string[]): Uncertain {
	const n = values.length;
	assert(n >= 2, `the scatter of ${n} observations is not known`);
	assert(sources.length === n && new Set(sources).size === n, `${n} observations need ${n} different sources`);
	// the mean about the first value: large common parts cancel before they are summed
	const origin = values[0]!;
	const mean = origin + values.reduce((total, x) => total + (x - origin), 0) / n;
	const scale = 1 / Math.sqrt(n * (n - 1));
	return fromMap(mean, new Map(values.map((x, i) => [sources[i]!, (x - mean) * scale])));
}

/** a + b: contributions of one source add with their signs. */
export function plusUncertain(a: Uncertain, b: Uncertain): Uncertain {
	return sumUncertain([a, b]);
}

/** a - b: what both share cancels. */
export function minusUncertain(a: Uncertain, b: Uncertain): Uncertain {
	return propagate(a.value - b.value, [
		{ input: a, sensitivity: 1 },
		{ input: b, sensitivity: -1 }
	]);
}

/** k a, with k known exactly. */
export function timesUncertain(a: Uncertain, k: number): Uncertain {
	return propagate(a.value * k, [{ input: a, sensitivity: k }]);
}

/** The sum of many: one pass over all contributions. */
export function sumUncertain(values: readonly Uncertain[]): Uncertain {
	return propagate(
		values.reduce((total, a) => total + a.value, 0),
		values.map((input) => ({ input, sensitivity: 1 }))
	);
}

/**
 * What it is: a result with the doubts of its inputs carried through.
 * formula: contribution of a source to the result = sum over inputs of (sensitivity x that input's contribution from the
 * source); the caller gives the value and the sensitivities (partial derivatives), in units of result per unit of input.
 * rounding: none.
 * source: JCGM 100:2008, 5.2.2 equation 13 and F.1.2.3 (correlated inputs expressed through common independent ones).
 */
export function propagate(value: number, terms: readonly Term[]): Uncertain {
	const total = new Map<string, number>();
	for (const { input, sensitivity } of terms) {
		for (const [source, u] of Object.entries(input.contributions)) {
			total.set(source, (total.get(source) ?? 0) + sensitivity * u);
		}
	}
	return fromMap(value, total);
}

/**
 * What it is: the combined standard uncertainty, in the unit of the value.
 * formula: square root of the sum of squares of the contributions over all sources.
 * rounding: none.
 * source: JCGM 100:2008, 5.1.2 equation 11a.
 */
export function standardUncertainty(a: Uncertain): number {
	return Math.sqrt(Object.values(a.contributions).reduce((total, u) => total + u * u, 0));
}

/**
 * What it is: how far two estimates move together, in the product of their units.
 * formula: sum over the sources that both have of (contribution to a x contribution to b).
 * rounding: none.
 * source: JCGM 100:2008, F.1.2.3 equation F.2.
 */
export function covariance(a: Uncertain, b: Uncertain): number {
	let total = 0;
	for (const [source, u] of Object.entries(a.contributions)) {
		if (Object.hasOwn(b.contributions, source)) total += u * b.contributions[source]!;
	}
	return total;
}

/**
 * What it is: the correlation coefficient of two estimates, from -1 to 1; 0 where one of them has no doubt.
 * formula: covariance / (standard uncertainty of a x standard uncertainty of b).
 * rounding: none; held within -1 and 1.
 * source: JCGM 100:2008, 5.2.2 equation 14.
 */
export function correlation(a: Uncertain, b: Uncertain): number {
	const scale = standardUncertainty(a) * standardUncertainty(b);
	return scale === 0 ? 0 : Math.max(-1, Math.min(1, covariance(a, b) / scale));
}

function fromMap(value: number, contributions: ReadonlyMap<string, number>): Uncertain {
	assert(Number.isFinite(value), `an estimate must be a number, not ${value}`);
	for (const [source, u] of contributions) assert(Number.isFinite(u), `the doubt from ${source} must be a number, not ${u}`);
	return { value, contributions: Object.fromEntries(contributions) };
}
