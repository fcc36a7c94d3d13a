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

/** The last of the repeats has the round's own number, the same for every act, so that the figures can be compared. */
function timed(act: Act, round: number, repeats: number): { each: number; figure: number } {
	let figure = 0;
	const begin = process.hrtime.bigint();
	for (let i = repeats - 1; i >= 0; i -= 1) figure = act.run(round + 1_000 * i);
	return { each: Number(process.hrtime.bigint() - begin) / MICROSECONDS / repeats, figure };
}

/** Runs an act until the compiler has had its chance (a twentieth of a second, at least once), and says how long one takes. */
function warm(act: Act): number {
	let runs = 0;
	let spent = 0;
	do {
		spent += timed(act, runs, 1).each;
		runs += 1;
	} while (spent < 50_000);
	return spent / runs;
}

export function median(values: readonly number[]): number {
	const sorted = [...values].sort((a, b) => a - b);
	return sorted[Math.floor(sorted.length / 2)]!;
}

/**
 * Every act in turn, round after round in one process; the median of the rounds in microseconds.
 * Each act is repeated within a round until it fills about a fiftieth of a second, so that the clock's own step does not count.
 * The figures of one round must agree to a millionth, or the bench stops: a fast wrong answer is not an answer.
 */
export function interleave(acts: readonly Act[], rounds = 9): Map<string, number> {
	const repeats = acts.map((act) => Math.max(1, Math.min(5_000, Math.round(20_000 / warm(act)))));
	const times = acts.map((): number[] => []);
	for (let round = 0; round < rounds; round += 1) {
		const figures = acts.map((act, i) => {
			const { each, figure } = timed(act, round, repeats[i]!);
			times[i]!.push(each);
			return figure;
		});
		for (const figure of figures) {
			if (!(Math.abs(figure - figures[0]!) <= 1e-6 * Math.abs(figures[0]!))) throw new Error(`the answers differ: ${figures.join(', ')}`);
		}
	}
	return new Map(acts.map(({ name }, i) => [name, median(times[i]!)]));
}
