// One piece with four kinds of findings (streak, fluorescence, water, magnet): what is believed of it, by the house and by the plain double
// loop over all pairs of surface and bulk, to the same answer. Then ten thousand different pieces in a thread of their own.
import { Worker } from 'node:worker_threads';
import { assess } from '../../src/trade/evidence/assess.ts';
import { startOf } from '../../src/trade/evidence/start.ts';
import { doubleLoop, type Answer } from './shared/double-loop.ts';
import { interleave, median, print, row, type BenchRow } from './shared/table.ts';
import { drawTested } from './shared/tested.ts';

const LEAST_RATIO = 10;
const MOST_MICROSECONDS = 2_000;
const SAME = 1e-9;
const PIECES = 997;
const pieces = Array.from({ length: PIECES }, (_, n) => drawTested(n));
const piece = (n: number) => pieces[n % PIECES]!;
const rows: BenchRow[] = [];

function ours(n: number): Answer {
	const { subject, findings } = piece(n);
	return assess(startOf(subject), findings);
}

/** The largest difference of any odds and of any cell of the bulk. */
function apart(a: Answer, b: Answer): number {
	const ids = ['honest', 'under', 'other', 'layered'] as const;
	return Math.max(...ids.map((id) => Math.abs(a.odds[id] - b.odds[id])), a.bulk.reduce((most, share, cell) => Math.max(most, Math.abs(share - b.bulk[cell]!)), 0));
}

let most = 0;
for (let n = 0; n < 12; n += 1) for (const tables of [false, true]) most = Math.max(most, apart(ours(n), doubleLoop(piece(n), tables)));
process.stderr.write(`largest difference of any odds or cell over 12 pieces: ${most.toExponential(1)}\n`);
if (!(most < SAME)) throw new Error(`the answers differ by ${most}`);

const names = { plain: 'logarithms and exponential for every pair', tables: 'exponential for every pair, logarithms by cell' };
const times = interleave(
	[
		{ name: 'ours', run: (n) => ours(n).mean },
		{ name: names.plain, run: (n) => doubleLoop(piece(n), false).mean },
		{ name: names.tables, run: (n) => doubleLoop(piece(n), true).mean }
	],
	5
);
const own = times.get('ours')!;
for (const name of Object.values(names)) rows.push(row('evidence', 'one piece, four kinds of findings', own, 'µs', name, times.get(name)!));

const ROUNDS = 5;
const EACH = 2_000;
type Said = { readonly done: number } | { readonly round: number; readonly microseconds: number; readonly mean: number };

const perPiece = await new Promise<number[]>((resolve, reject) => {
	const file = new URL('./shared/evidence-worker.ts', import.meta.url).href;
	const worker = new Worker(new URL('./shared/thread.js', import.meta.url), { workerData: { file, rounds: ROUNDS, each: EACH, step: 500 } });
	const found: number[] = [];
	worker.on('message', (said: Said) => {
		if ('done' in said) process.stderr.write(`${said.done} of ${ROUNDS * EACH} pieces in the worker\n`);
		else found.push(said.microseconds);
	});
	worker.on('error', reject);
	worker.on('exit', () => (found.length === ROUNDS ? resolve(found) : reject(new Error('the worker ended early'))));
});
const inWorker = median(perPiece);
rows.push(row('evidence', `${ROUNDS * EACH} different pieces in a worker, each`, inWorker, 'µs', names.plain, times.get(names.plain)!));
print(rows);
if (rows.some(({ ratio }) => ratio < LEAST_RATIO) || own > MOST_MICROSECONDS || inWorker > MOST_MICROSECONDS) {
	process.stderr.write(`Expected ${LEAST_RATIO} times the double loop and ${MOST_MICROSECONDS} µs a piece at most.\n`);
	process.exitCode = 1;
}
