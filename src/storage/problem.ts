/** What can go wrong when the book is read or written. Nothing was saved, whichever it is; the form keeps what was typed. */
export type StorageProblem =
	/** The device has no room. Offered: save without the photo, make a backup and free space. */
	| { readonly kind: 'storage-quota'; readonly reason: string }
	/** The write was refused or broken off by the device. */
	| { readonly kind: 'storage-failed'; readonly reason: string }
	/** The connection to the database was lost and could not be made again. */
	| { readonly kind: 'storage-lost'; readonly reason: string }
	/** This browser, or this private window, has no database. */
	| { readonly kind: 'storage-unavailable'; readonly reason: string }
	/** The book was written by a newer app: it can be read and exported, not written. */
	| { readonly kind: 'storage-newer'; readonly found: number; readonly known: number }
	/** Another tab has moved the book to a newer app: this page must be loaded again. */
	| { readonly kind: 'storage-superseded' }
	/** Another tab still holds the book with an older app: close it there. */
	| { readonly kind: 'storage-blocked' }
	/** Other tabs wrote without pause; the same act can be tried again. */
	| { readonly kind: 'storage-busy' }
	/** The thing was changed after the page read it. */
	| { readonly kind: 'storage-changed-since'; readonly subject: string; readonly expected: string | null; readonly found: string | null }
	/** This act was saved before, and what it holds now is something else. */
	| { readonly kind: 'storage-already-saved'; readonly act: string }
	/** Another record stands here under the id of one that was to be joined. */
	| { readonly kind: 'storage-record-differs'; readonly record: string }
	/** There is no such record to take back. */
	| { readonly kind: 'storage-no-such-record'; readonly record: string };

/** A read that could not be done even after opening the database again. Pages catch it in one place. */
export class StorageFailure extends Error {
	readonly problem: StorageProblem;

	constructor(problem: StorageProblem) {
		super(problem.kind);
		this.name = 'StorageFailure';
		this.problem = problem;
	}
}

type Thrown = { name?: unknown; message?: unknown; inner?: { name?: unknown; message?: unknown } | null };

/** What a thrown error of the database means. The names differ by browser and by what was going on. */
export function problemOf(thrown: unknown): StorageProblem {
	if (thrown instanceof StorageFailure) return thrown.problem;
	const { name, message, inner } = (typeof thrown === 'object' && thrown !== null ? thrown : { message: thrown }) as Thrown;
	const names = [String(name ?? ''), String(inner?.name ?? '')];
	const words = `${String(message ?? '')} ${String(inner?.message ?? '')}`.trim();
	const reason = `${names[0]}: ${words}`.slice(0, 300);
	// a full disk shows as DataError on one of the browsers' backends; our own data is checked before it gets here
	if (names.some((each) => each === 'QuotaExceededError' || each === 'DataError')) return { kind: 'storage-quota', reason };
	if (names.some((each) => each === 'MissingAPIError' || each === 'SecurityError')) return { kind: 'storage-unavailable', reason };
	if (names.some((each) => LOST.has(each)) || /connection (?:to indexed ?database server )?(?:is closing|lost)|connection .*clos/i.test(words)) {
		return { kind: 'storage-lost', reason };
	}
	return { kind: 'storage-failed', reason };
}

const LOST: ReadonlySet<string> = new Set(['DatabaseClosedError', 'InvalidStateError']);
