import { onDestroy } from 'svelte';
import type { Running } from '$storage/backup-format.ts';
import type { RunningStep } from '$ui/running-words.ts';

/** One piece of long work of a page: how far it is, and the way to stop it. It is stopped when the page is left. */
export class LongWork {
	step = $state.raw<RunningStep | null>(null);
	#control: AbortController | null = null;

	constructor() {
		onDestroy(() => this.cancel());
	}

	get running(): boolean {
		return this.step !== null;
	}

	/** Runs one piece of work; a second one waits for the first to be over. */
	async run<T>(first: RunningStep['step'], work: (running: Running) => Promise<T>): Promise<T | null> {
		if (this.running) return null;
		const control = new AbortController();
		this.#control = control;
		this.step = { step: first, done: 0, total: 0 };
		try {
			return await work({
				signal: control.signal,
				onProgress: (progress) => {
					if (this.running) this.step = progress;
				}
			});
		} finally {
			this.step = null;
		}
	}

	cancel(): void {
		this.#control?.abort();
	}
}
