import type { Format } from './format.ts';

/** One step of long work on the book, as the work reports it. */
export type RunningStep = {
	readonly step: 'counting' | 'writing' | 'verifying' | 'reading' | 'merging';
	readonly done: number;
	readonly total: number;
};

const LABELS: Readonly<Record<RunningStep['step'], string>> = {
	counting: 'Going through the book',
	writing: 'Writing the file',
	verifying: 'Reading the file back',
	reading: 'Reading',
	merging: 'Joining'
};

/** What a progress bar says and shows for a step. */
export function runningWords({ step, done, total }: RunningStep, format: Format): { label: string; value: number; text: string } {
	return { label: LABELS[step], value: total === 0 ? 0 : done / total, text: `${format.count(done)} of ${format.count(total)}` };
}

/** "1 purchase", "12 purchases". */
export function many(count: number, one: string, more: string, format: Format): string {
	return `${format.count(count)} ${count === 1 ? one : more}`;
}

/** The size of a file or of all storage: an estimate, in the largest unit that leaves a whole part. */
export function sizeWords(bytes: number, format: Format): string {
	const units = ['bytes', 'kB', 'MB', 'GB', 'TB'] as const;
	const place = Math.max(0, Math.min(units.length - 1, Math.floor(Math.log10(Math.max(bytes, 1)) / 3)));
	return `${format.estimate(bytes / 1_000 ** place)}\u00a0${units[place]}`;
}
