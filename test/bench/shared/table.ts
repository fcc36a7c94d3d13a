/** One line of a bench, as measured: times in microseconds, ratio = theirs ÷ ours. */
export type BenchRow = {
	readonly bench: string;
	readonly case: string;
	readonly ours: number;
	readonly unit: string;
	readonly peer: string;
	readonly theirs: number;
	readonly ratio: number;
};

export function row(bench: string, name: string, ours: number, unit: string, peer: string, theirs: number): BenchRow {
	return { bench, case: name, ours, unit, peer, theirs, ratio: theirs / ours };
}

const digits = (value: number): string => {
	if (value === 0) return '0';
	if (Math.abs(value) >= 1000) return value.toFixed(0);
	return value.toPrecision(3);
};

/** A table for people, or one JSON object a line with --json. */
export function print(rows: readonly BenchRow[]): void {
	if (process.argv.includes('--json')) {
		for (const each of rows) process.stdout.write(`${JSON.stringify(each)}\n`);
		return;
	}
	const cells = rows.map(({ case: name, ours, unit, peer, theirs, ratio }) => [name, `${digits(ours)} ${unit}`, peer, `${digits(theirs)} ${unit}`, digits(ratio)]);
	const all = [['case', 'ours', 'peer', 'theirs', 'ratio'], ...cells];
	const widths = all[0]!.map((_, column) => Math.max(...all.map((line) => line[column]!.length)));
	for (const line of all) process.stdout.write(`${line.map((cell, column) => cell.padEnd(widths[column]!)).join('  ').trimEnd()}\n`);
}

/** Something to time: one act, numbered so that each run is new work. It gives a figure that the others must agree on. */
export type Act = { readonly name: string; readonly run: (n: number) => number };

const MICROSECONDS = 1_000;

function timed(act: Act, n: number, repeats: number): { each: number; figure: number } {
	let figure = 0;
	const begin = process.hrtime.bigint();
	for (let i = 0; i < repeats; i += 1) figure = act.run(n * repeats + i);
	return { each: Number(process.hrtime.bigint() - begin) / MICROSECONDS / repeats, figure };
}

function median(values: readonly number[]): number {
	const sorted = [...values].sort((a, b) => a - b);
	return sorted[Math.floor(sorted.length / 2)]!;
}

/**
 * Every act in turn, round after round in one process; the median of the rounds in microseconds.
 * Each act is repeated within a round until it fills about a millisecond, so that the clock's own step does not count.
 * The figures of one round must agree to a millionth, or the bench stops: a fast wrong answer is not an answer.
 */
export function interleave(acts: readonly Act[], rounds = 9): Map<string, number> {
	const repeats = acts.map((act) => {
		timed(act, 0, 3);
		return Math.max(1, Math.min(2_000, Math.round(1_000 / Math.max(0.5, timed(act, 1, 1).each))));
	});
	const times = acts.map((): number[] => []);
	for (let round = 0; round < rounds; round += 1) {
		acts.forEach((act, i) => times[i]!.push(timed(act, round + 2, repeats[i]!).each));
		const figures = acts.map((act) => act.run(1_000_000 + round));
		for (const figure of figures) {
			if (!(Math.abs(figure - figures[0]!) <= 1e-6 * Math.abs(figures[0]!))) throw new Error(`the answers differ: ${figures.join(', ')}`);
		}
	}
	return new Map(acts.map(({ name }, i) => [name, median(times[i]!)]));
}
