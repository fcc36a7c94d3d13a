import { BOOK, DEMO_BOOK, openBook, removeBook } from '$storage/book.ts';
import type { MarkerReading } from '$storage/marker.ts';
import { StorageFailure, type StorageProblem } from '$storage/problem.ts';
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
			if (event.kind === 'superseded' || event.kind === 'removed') void this.#superseded();
		});
		// pages read without asking what may go wrong: a read that could not be done is told of here, for all of them
		const onFailure = (event: PromiseRejectionEvent): void => {
			const thrown: unknown = event.reason;
			if (!(thrown instanceof StorageFailure)) return;
			event.preventDefault();
			if (thrown.problem.kind === 'storage-superseded') void this.#superseded();
			else void sayProblem(thrown.problem, shop.format).then((said) => shop.say(`Not read. ${said}`));
		};
		addEventListener('unhandledrejection', onFailure);
		const stopShop = await shop.start();
		this.#stop = () => {
			removeEventListener('unhandledrejection', onFailure);
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

	/** Another tab has moved the book to a newer app, or it was removed: this page must be loaded again. */
	async #superseded(): Promise<void> {
		this.readOnly = await sayProblem({ kind: 'storage-superseded' }, formatFor(navigator.language));
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
