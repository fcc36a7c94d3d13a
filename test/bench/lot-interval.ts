// What the fine gold of 3 / 30 / 300 / 1 000 different pieces lies between, some of them perhaps filled: the convolution of their beliefs
// beside a Monte Carlo of 100 000 draws, and how far apart the ends are.
import { assess } from '../../src/trade/evidence/assess.ts';
import { startOf } from '../../src/trade/evidence/start.ts';
import { mixture, type Alike } from '../../src/trade/lot/mixture.ts';
import { drawnInterval } from './shared/draws.ts';
import { seeded } from './shared/lot.ts';
import { interleave, print, row, type BenchRow } from './shared/table.ts';
import { drawTested } from './shared/tested.ts';

const DRAWS = 100_000;
const ROUNDS = 5;
const MOST_APART = 0.01;
const MOST_OFF = 4;
const LEAST_RATIO = 8;
const rows: BenchRow[] = [];
const wrong: number[] = [];

// stamped gold as it comes: half of it untested, half with four kinds of findings
const bulks = Array.from({ length: 12 }, (_, n) => {
	const { subject, findings } = drawTested(n);
	return assess(startOf(subject), n % 2 === 0 ? [] : findings).bulk;
});

for (const many of [3, 30, 300, 1_000]) {
	const random = seeded(many);
	const pieces = Array.from({ length: many }, (_, n): Alike => ({ grams: 2 + 20 * random(), count: 1, bulk: bulks[n % bulks.length]! }));
	const onTop = { value: 0, u: 0.02 * many };
	// both give the number of pieces: how far they agree is looked at below, for draws never agree to a millionth
	const times = interleave(
		[
			{ name: 'ours', run: () => (mixture(pieces, onTop) === null ? 0 : many) },
			{ name: 'draws', run: (n) => (drawnInterval(pieces, onTop, DRAWS, n).low > 0 ? many : 0) }
		],
		ROUNDS
	);
	rows.push(row('lot-interval', `${many} pieces`, times.get('ours')!, 'µs', `Monte Carlo of ${DRAWS} draws`, times.get('draws')!));
	const found = mixture(pieces, onTop)!;
	const draws = Math.max(4 * DRAWS, Math.round(20_000_000 / many));
	const { low, high, shareBelow } = drawnInterval(pieces, onTop, draws, 1_000);
	const apart = Math.max(Math.abs(found.low - low), Math.abs(found.high - high)) / (high - low);
	// where hardly anything lies near an end, even millions of draws do not find it, and only the share below it can be held to them
	const off = Math.max(Math.abs(shareBelow(found.low) - 0.05), Math.abs(shareBelow(found.high) - 0.95)) / Math.sqrt((0.05 * 0.95) / draws);
	const normal = Math.max(Math.abs(found.mean - 1.645 * found.u - low), Math.abs(found.mean + 1.645 * found.u - high)) / (high - low);
	if (apart > MOST_APART && off > MOST_OFF) wrong.push(many);
	process.stderr.write(
		`${many} pieces against ${draws} draws: ends ${(100 * apart).toFixed(2)} % of the width apart, shares below them ${off.toFixed(1)} ` +
			`standard deviations; mean ± 1.645 u is ${(100 * normal).toFixed(0)} % of the width off\n`
	);
}
print(rows);
if (wrong.length > 0 || rows.some(({ ratio }) => ratio < LEAST_RATIO)) {
	process.stderr.write(`Expected ends within ${100 * MOST_APART} % of the width, and ${LEAST_RATIO} times the speed of the draws.\n`);
	process.exitCode = 1;
}
