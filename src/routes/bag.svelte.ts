import { onDestroy } from 'svelte';
import type { BagPiece } from '$trade/lot/bag.ts';
import { subjectOf } from '$trade/piece/subject.ts';
import type { PriceSheet } from '$trade/price/price-sheet.ts';
import type { Bodies } from '$trade/record/kind.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import type { Book } from '$storage/book.ts';
import { writeEvidence, type Answer, type Job, type Sent } from './bag-weighed.ts';
import { stakeOf } from './piece-evidence.ts';

/** So many pieces are read at a time. */
const READ_AT_ONCE = 500;

/** A bag that is being weighed, or was: how far it is, and what was found. */
export class Bag {
	total = $state(0);
	done = $state(0);
	/** What is being done; 'idle' before it began and after it was stopped. */
	stage = $state<'idle' | 'reading' | 'weighing' | 'ready' | 'failed'>('idle');
	pieces = $state.raw<readonly BagPiece[]>([]);
	before = $state(0);
	/** Pieces that no test speaks of: base metal, layers by their mark, no price. */
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
		if (this.running) this.stage = 'idle';
	}

	async weigh(book: Book, lot: string, sheet: PriceSheet, settings: SettingsBody): Promise<void> {
		this.stop();
		const turn = this.#turn;
		this.stage = 'reading';
		const keys = await book.lotKeys(lot);
		if (turn !== this.#turn) return;
		[this.total, this.done] = [keys.length, 0];
		const names = new Map<string, Bodies['piece']['piece']>();
		const sent: Sent[] = [];
		for (let from = 0; from < keys.length; from += READ_AT_ONCE) {
			const found = await book.pieces(keys.slice(from, from + READ_AT_ONCE));
			if (turn !== this.#turn) return;
			for (const entry of found) {
				const piece = entry?.body?.piece;
				if (entry === null || piece === undefined) continue;
				const subject = subjectOf(piece);
				const stake = typeof subject === 'string' ? null : stakeOf(piece, subject.metal, sheet, settings);
				if (typeof subject === 'string' || stake === null) continue;
				names.set(entry.subject, piece);
				sent.push({ key: entry.subject, subject, evidence: writeEvidence(piece.evidence), stake });
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
