import type { Book } from '$storage/book.ts';

/** Which of a list's forms are open. One that holds something half typed opens again after a reload. */
export class OpenForms {
	readonly prefix: string;
	#open = $state.raw<ReadonlySet<string>>(new Set());

	constructor(book: Book, prefix: string) {
		this.prefix = prefix;
		void book.listDrafts(prefix).then((rows) => {
			this.#open = new Set([...this.#open, ...rows.map(({ key }) => key.slice(prefix.length))]);
		});
	}

	has(id: string): boolean {
		return this.#open.has(id);
	}

	open(id: string): void {
		this.#open = new Set([...this.#open, id]);
	}

	close(id: string): void {
		this.#open = new Set([...this.#open].filter((each) => each !== id));
	}

	/** The ids of the open forms. */
	get ids(): readonly string[] {
		return [...this.#open];
	}
}
