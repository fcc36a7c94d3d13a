import { BOOK, DEMO_BOOK, openBook, removeBook } from '$storage/book.ts';
import type { MarkerReading } from '$storage/marker.ts';
import type { StorageProblem } from '$storage/problem.ts';
import { formatFor } from '$ui/format.ts';
import { sayProblem } from './say-problem.ts';
import { Shop } from './shop.svelte.ts';

const WHICH = 'meltbook-open';

/** Opens the buyer's book, or the demo book while that was asked for, and says what is wrong when it does not open. */
export class Opening {
	shop = $state.raw<Shop | null>(null);
	problem = $state.raw<StorageProblem | null>(null);
	/** Why the book can only be read, in a sentence; empty when it can be written. */
	readOnly = $state('');
	/** A book that was here before and is not any more, until the person has seen it. */
	missing = $state.raw<Extract<MarkerReading, { records: number }> | null>(null);

	#stop: () => void = () => {};
	#waiting: Shop | null = null;

	async open(): Promise<void> {
		const demo = localStorage.getItem(WHICH) === DEMO_BOOK;
		const opened = await openBook(demo ? DEMO_BOOK : BOOK);
		if (!opened.ok) {
			this.problem = opened.problem;
			return;
		}
		const { book, readOnly, marker } = opened.value;
		if (readOnly !== null) this.readOnly = await sayProblem(readOnly, formatFor(navigator.language));
		const shop = new Shop(book, demo);
		if (demo && readOnly === null && (await book.counts()).records === 0) {
			const { fillDemo } = await import('./demo.ts');
			const filled = await fillDemo(book, Date.now());
			if (!filled.ok) {
				this.problem = filled.problem;
				book.close();
				// loading again leads to the buyer's own book
				localStorage.removeItem(WHICH);
				return;
			}
		}
		const stopEvents = book.onEvent((event) => {
			if (event.kind === 'superseded' || event.kind === 'removed') {
				void sayProblem({ kind: 'storage-superseded' }, formatFor(navigator.language)).then((said) => (this.readOnly = said));
			}
		});
		const stopShop = await shop.start();
		this.#stop = () => {
			stopEvents();
			stopShop();
			book.close();
		};
		if (!demo && (marker.state === 'wiped' || marker.state === 'fewer')) {
			this.missing = marker;
			this.#waiting = shop;
			return;
		}
		this.shop = shop;
	}

	/** The person has read that an earlier book is gone and goes on with this one. */
	goOn(): void {
		this.#waiting?.book.acceptMarker();
		this.missing = null;
		this.shop = this.#waiting;
	}

	close(): void {
		this.#stop();
	}

	async enterDemo(): Promise<void> {
		localStorage.setItem(WHICH, DEMO_BOOK);
		await this.#again();
	}

	/** Back to the buyer's own book; the invented one is removed. */
	async leaveDemo(): Promise<void> {
		localStorage.removeItem(WHICH);
		await this.#again();
		const removed = await removeBook(DEMO_BOOK);
		const shop = this.shop as Shop | null;
		if (removed.ok) shop?.say('The demo book is removed. This is your own book.');
		else shop?.say(await sayProblem(removed.problem, shop.format));
	}

	async #again(): Promise<void> {
		this.#stop();
		this.shop = null;
		this.readOnly = '';
		await this.open();
	}
}
