import { assert } from '../number/decimal.ts';

const ROOT_TWO_PI = 2.5066282746310002;

/** c[0] + c[1] x + c[2] x^2 + ... */
function polynomial(c: readonly number[], x: number): number {
	let total = 0;
	for (let i = c.length - 1; i >= 0; i -= 1) total = total * x + c[i]!;
	return total;
}

/**
 * What it is: the bell curve of mean 0 and standard deviation 1.
 * formula: e to the power of (-z squared / 2), divided by the square root of 2 pi; z counts standard deviations.
 * rounding: none beyond double precision.
 * source: definition of the normal distribution; JCGM 100:2008, C.2.14.
 */
export function normalDensity(z: number): number {
	return bell(Math.abs(z)) / ROOT_TWO_PI;
}

/** exp(-z^2 / 2) with z split at a sixteenth, so that the square does not lose digits in the tail. */
function bell(z: number): number {
	if (z > 39) return 0;
	const coarse = Math.trunc(z * 16) / 16;
	return Math.exp(-0.5 * coarse * coarse) * Math.exp(-0.5 * (z - coarse) * (z + coarse));
}

// Near the middle (|z| < 0.67448975): z P(z^2) / Q(z^2)
const MIDDLE_P = [18154.981253343561249, 1067.6894854603709582, 161.02823106855587881, 2.2352520354606839287, 0.065682337918207449113];
const MIDDLE_Q = [45507.789335026729956, 10260.932208618978205, 976.09855173777669322, 47.20258190468824187, 1];
// Up to |z| = square root of 32: bell(z) P(z) / Q(z)
const SIDE_P = [
	9842.7148383839780218, 11602.651437647350124, 6848.1904505362823326, 2494.5375852903726711, 597.27027639480026226,
	93.506656132177855979, 8.8831497943883759412, 0.39894151208813466764, 1.0765576773720192317e-8
];
const SIDE_Q = [
	19685.429676859990727, 38912.003286093271411, 34900.952721145977266, 18615.571640885098091, 6485.558298266760755,
	1519.377599407554805, 235.38790178262499861, 22.266688044328115691, 1
];
// Beyond: bell(z) / z (1 / root 2 pi - t P(t) / Q(t)) with t = 1 / z^2
const FAR_P = [
	2.9112874951168792e-5, 0.001421619193227893466, 0.022235277870649807, 0.1274011611602473639, 0.21589853405795699, 0.02307344176494017303
];
const FAR_Q = [7.29751555083966205e-5, 0.00378239633202758244, 0.0659881378689285515, 0.468238212480865118, 1.28426009614491121, 1];

/**
 * What it is: the chance that a normal quantity lies below z standard deviations from its mean.
 * formula: area under the bell curve to the left of z, by rational approximations on three ranges of the absolute z.
 * rounding: none beyond double precision; the left tail keeps its relative precision.
 * source: W. J. Cody, Math. Comp. 23 (1969) 631 (coefficients for the normal integral as in ACM algorithm 715), from memory.
 */
export function normalCdf(z: number): number {
	assert(!Number.isNaN(z), 'the normal distribution has no value at not-a-number');
	const size = Math.abs(z);
	if (size <= 0.67448975) {
		const square = z * z;
		return 0.5 + (z * polynomial(MIDDLE_P, square)) / polynomial(MIDDLE_Q, square);
	}
	let tail: number;
	if (size > 39) tail = 0;
	else if (size <= 5.656854249492380581) tail = (bell(size) * polynomial(SIDE_P, size)) / polynomial(SIDE_Q, size);
	else {
		const t = 1 / (size * size);
		tail = (bell(size) * (1 / ROOT_TWO_PI - (t * polynomial(FAR_P, t)) / polynomial(FAR_Q, t))) / size;
	}
	return z > 0 ? 1 - tail : tail;
}

const A = [
	3.3871328727963666080, 1.3314166789178437745e2, 1.9715909503065514427e3, 1.3731693765509461125e4,
	4.5921953931549871457e4, 6.7265770927008700853e4, 3.3430575583588128105e4, 2.5090809287301226727e3
];
const B = [
	1, 4.2313330701600911252e1, 6.8718700749205790830e2, 5.3941960214247511077e3,
	2.1213794301586595867e4, 3.9307895800092710610e4, 2.8729085735721942674e4, 5.2264952788528545610e3
];
const C = [
	1.42343711074968357734, 4.63033784615654529590, 5.76949722146069140550, 3.64784832476320460504,
	1.27045825245236838258, 2.41780725177450611770e-1, 2.27238449892691845833e-2, 7.74545014278341407640e-4
];
const D = [
	1, 2.05319162663775882187, 1.67638483018380384940, 6.89767334985100004550e-1,
	1.48103976427480074590e-1, 1.51986665636164571966e-2, 5.47593808499534494600e-4, 1.05075007164441684324e-9
];
const E = [
	6.65790464350110377720, 5.46378491116411436990, 1.78482653991729133580, 2.96560571828504891230e-1,
	2.65321895265761230930e-2, 1.24266094738807843860e-3, 2.71155556874348757815e-5, 2.01033439929228813265e-7
];
const F = [
	1, 5.99832206555887937690e-1, 1.36929880922735805310e-1, 1.48753612908506148525e-2,
	7.86869131145613259100e-4, 1.84631831751005468180e-5, 1.42151175831644588870e-7, 2.04426310338993978564e-15
];

/**
 * What it is: the number of standard deviations below which a share p of a normal quantity lies; p between 0 and 1.
 * formula: the inverse of normalCdf by rational approximations on three ranges of p.
 * rounding: none beyond double precision (about one part in 10^16).
 * source: M. J. Wichura, Algorithm AS 241 (PPND16), Applied Statistics 37 (1988) 477, coefficients from memory.
 */
export function normalQuantile(p: number): number {
	assert(p > 0 && p < 1, `a share must lie between 0 and 1, not ${p}`);
	const q = p - 0.5;
	if (Math.abs(q) <= 0.425) {
		const r = 0.180625 - q * q;
		return (q * polynomial(A, r)) / polynomial(B, r);
	}
	const r = Math.sqrt(-Math.log(q < 0 ? p : 1 - p));
	const z = r <= 5 ? polynomial(C, r - 1.6) / polynomial(D, r - 1.6) : polynomial(E, r - 5) / polynomial(F, r - 5);
	return q < 0 ? -z : z;
}
