import { onDestroy } from 'svelte';
import type { BagPiece } from '$trade/lot/bag.ts';
import { shareFor } from '$trade/price/offer.ts';
import type { PriceSheet } from '$trade/price/price-sheet.ts';
import { valueOf } from '$trade/price/value.ts';
import type { Bodies } from '$trade/record/kind.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import type { Book } from '$storage/book.ts';
import { sentOf } from './bag-sent.ts';
import type { Answer, Job, Sent } from './bag-weighed.ts';

/** So many pieces are read at a time. */
const READ_AT_ONCE = 500;

/** A bag that is being weighed, or was: how far it is, and what was found. */
export class Bag {
	total = $state(0);
	done = $state(0);
	/** What is being done: it begins with reading. */
	stage = $state<'reading' | 'weighing' | 'ready' | 'stopped' | 'failed'>('reading');
	pieces = $state.raw<readonly BagPiece[]>([]);
	before = $state(0);
	/** Entries that no test speaks of: base metal, layers by their mark, no price. */
	apart = $state(0);
	names = $state.raw<ReadonlyMap<string, Bodies['piece']['piece']>>(new Map());
	#worker: Worker | null = null;
	#turn = 0;

	constructor() {
		onDestroy(() => this.stop());
	}

	get running(): boolean {
		return this.stage === 'reading' || this.stage === 'weighing';
	}

	stop(): void {
		this.#turn += 1;
		this.#worker?.terminate();
		this.#worker = null;
		if (this.running) this.stage = 'stopped';
	}

	async weigh(book: Book, lot: string, sheet: PriceSheet, settings: SettingsBody): Promise<void> {
		this.stop();
		const turn = this.#turn;
		this.stage = 'reading';
		[this.total, this.done] = [0, 0];
		const [keys, found] = await Promise.all([book.lotKeys(lot), book.lot(lot)]);
		if (turn !== this.#turn) return;
		this.total = keys.length;
		// the share that is paid for the whole lot is what each piece of it costs
		const share = shareFor(valueOf(found?.sums.fine ?? {}, sheet).total, settings.tiers);
		const names = new Map<string, Bodies['piece']['piece']>();
		const sent: Sent[] = [];
		for (let from = 0; from < keys.length; from += READ_AT_ONCE) {
			const entries = await book.pieces(keys.slice(from, from + READ_AT_ONCE));
			if (turn !== this.#turn) return;
			for (const entry of entries) {
				const piece = entry?.body?.piece;
				if (entry === null || piece === undefined) continue;
				const ready = sentOf(entry.subject, piece, sheet, settings, share);
				if (ready === null) continue;
				names.set(entry.subject, piece);
				sent.push(ready);
			}
			this.done = Math.min(keys.length, from + READ_AT_ONCE);
		}
		[this.names, this.apart, this.total, this.done] = [names, keys.length - sent.length, sent.length, 0];
		this.stage = 'weighing';
		const worker = new Worker(new URL('./bag.worker.ts', import.meta.url), { type: 'module' });
		this.#worker = worker;
		worker.onmessage = ({ data }: MessageEvent<Answer>) => {
			if ('done' in data) {
				this.done = data.done;
				return;
			}
			[this.pieces, this.before, this.stage] = [data.pieces, data.before, 'ready'];
			worker.terminate();
		};
		worker.onerror = () => {
			this.stage = 'failed';
			worker.terminate();
		};
		// plain values; a proxy of the page would not go through
		const job: Job = { pieces: sent, own: $state.snapshot(settings.priors) };
		worker.postMessage(job);
	}
}
