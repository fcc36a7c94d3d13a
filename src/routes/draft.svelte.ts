import { onDestroy } from 'svelte';
import type { Book } from '$storage/book.ts';
import type { Json } from '$trade/record/json.ts';
import { saveBeforeUpdate } from '$ui/update/save-first.ts';

/** How long after the last keystroke a draft is written, in milliseconds. */
const PAUSE = 300;

/**
 * What is half typed in one form, kept in the book's drafts through a reload, a crash and an update. Made while a
 * component is being set up; it is written shortly after each change and at once when the page goes away.
 */
export class Draft<T extends Json> {
	readonly key: string;
	#value = $state.raw() as T;
	readonly #empty: T;
	readonly #book: Book;
	#timer: ReturnType<typeof setTimeout> | undefined;
	#unsaved = false;

	constructor(book: Book, key: string, empty: T) {
		this.#book = book;
		this.key = key;
		this.#empty = empty;
		this.#value = empty;
		onDestroy(saveBeforeUpdate(() => this.save()));
		onDestroy(() => void this.save());
	}

	get value(): T {
		return this.#value;
	}

	set value(next: T) {
		this.#value = next;
		this.#unsaved = true;
		clearTimeout(this.#timer);
		this.#timer = setTimeout(() => void this.save(), PAUSE);
	}

	/** Takes up what was left here, unless something has been typed in the meantime. */
	async load(): Promise<void> {
		const found = await this.#book.getDraft(this.key);
		if (found !== null && !this.#unsaved) this.#value = found as T;
	}

	async save(): Promise<void> {
		clearTimeout(this.#timer);
		if (!this.#unsaved) return;
		this.#unsaved = false;
		if (this.#value === this.#empty) await this.#book.removeDraft(this.key);
		else await this.#book.setDraft(this.key, this.#value);
	}

	/** The act that used it up is saved, and the draft went with it; one written while the act was under way goes too. */
	used(): void {
		clearTimeout(this.#timer);
		this.#unsaved = false;
		this.#value = this.#empty;
		void this.#book.removeDraft(this.key);
	}
}
