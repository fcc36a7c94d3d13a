import type { Environment } from './environment.ts';
import { writeMarker, type Marker } from './marker.ts';
import { problemOf, StorageFailure, type StorageProblem } from './problem.ts';
import { BookDatabase, NATIVE_VERSION, SCHEMA_VERSION } from './schema.ts';
import { makeWatchers, type Watchers } from './watch.ts';

/** One page's hold on one book. Everything that reads or writes goes through `use`. */
export type Session = {
	readonly name: string;
	readonly environment: Environment;
	readonly watchers: Watchers;
	/** Why the book may only be read; null: it may be written. */
	readonly readOnly: StorageProblem | null;
	/** Runs on the open database. If the connection is lost, it is opened again and the same is tried once more. */
	readonly use: <T>(act: (db: BookDatabase) => PromiseLike<T>) => Promise<T>;
	/** One writer at a time, across tabs. */
	readonly alone: <T>(act: () => Promise<T>) => Promise<T>;
	/** Remembers outside the database what it held after a commit; not while the marker tells of a book that is missing. */
	readonly markWritten: (marker: Marker) => void;
	/** The person knows about the missing book, or has restored it: from now on this one is marked. */
	readonly settleMarker: () => void;
	readonly holdMarker: () => void;
	readonly close: () => void;
};

/**
 * The version that a database has, without opening it with our schema: the library opens a newer one with older code and
 * would write old shapes into it. 0: there is none, and none is made by asking.
 */
export async function versionFound(name: string, { indexedDB }: Environment): Promise<number> {
	if (typeof indexedDB.databases === 'function') {
		try {
			const all = await indexedDB.databases();
			return all.find((each) => each.name === name)?.version ?? 0;
		} catch {
			// some private windows refuse to list: open and look instead
		}
	}
	return new Promise((resolve, reject) => {
		const request = indexedDB.open(name);
		let missing = false;
		request.onupgradeneeded = () => {
			missing = true;
			request.transaction?.abort();
		};
		request.onsuccess = () => {
			const { version } = request.result;
			request.result.close();
			resolve(version);
		};
		request.onerror = (event) => {
			event.preventDefault();
			if (missing) resolve(0);
			else reject(request.error ?? new Error('the database did not open'));
		};
	});
}

export async function openSession(name: string, environment: Environment): Promise<Session> {
	if ((environment.indexedDB as IDBFactory | undefined) === undefined) {
		throw new StorageFailure({ kind: 'storage-unavailable', reason: 'no IndexedDB' });
	}
	const watchers = makeWatchers(name, environment);
	let ended: StorageProblem | null = null;
	let db: BookDatabase;
	let opening: Promise<BookDatabase> | null = null;
	let readOnly: StorageProblem | null = null;
	let held = false;
	let latest: Marker | null = null;

	async function connect(): Promise<BookDatabase> {
		const found = await versionFound(name, environment);
		const newer = found > NATIVE_VERSION;
		const opened = new BookDatabase(name, environment, newer);
		opened.on('versionchange', (event) => {
			// no reopening by itself: this page's code is older than the book from here on
			ended = { kind: 'storage-superseded' };
			opened.close({ disableAutoOpen: true });
			watchers.announce({ kind: event.newVersion === null ? 'removed' : 'superseded' });
			return false;
		});
		opened.on('blocked', () => watchers.announce({ kind: 'blocked' }));
		if (!newer) {
			// sticky: asked at every opening, should another tab have been quicker than the look above
			opened.on(
				'ready',
				() => {
					const native = opened.backendDB().version;
					if (native > NATIVE_VERSION) throw new StorageFailure(newerProblem(native));
				},
				true
			);
		}
		await opened.open();
		readOnly = newer ? newerProblem(found) : null;
		return opened;
	}

	/** Opens under a lock, so that only one tab looks at the version and changes the tables. */
	function reconnect(): Promise<BookDatabase> {
		opening ??= environment.lock(`${name}:open`, connect).finally(() => {
			opening = null;
		});
		return opening;
	}

	db = await reconnect().catch((thrown: unknown) => {
		watchers.close();
		throw new StorageFailure(problemOf(thrown));
	});

	async function use<T>(act: (db: BookDatabase) => PromiseLike<T>): Promise<T> {
		if (ended !== null) throw new StorageFailure(ended);
		try {
			return await act(db);
		} catch (thrown) {
			if (ended !== null) throw new StorageFailure(ended);
			if (problemOf(thrown).kind !== 'storage-lost') throw thrown;
		}
		db.close({ disableAutoOpen: true });
		db = await reconnect();
		return act(db);
	}

	return {
		name,
		environment,
		watchers,
		get readOnly() {
			return readOnly;
		},
		use,
		alone: (act) => environment.lock(`${name}:write`, act),
		markWritten(marker) {
			latest = marker;
			if (!held) writeMarker(environment.outside, name, marker);
		},
		holdMarker() {
			held = true;
		},
		settleMarker() {
			held = false;
			if (latest !== null) writeMarker(environment.outside, name, latest);
		},
		close() {
			ended ??= { kind: 'storage-lost', reason: 'closed by this page' };
			db.close({ disableAutoOpen: true });
			watchers.close();
		}
	};
}

function newerProblem(native: number): StorageProblem {
	return { kind: 'storage-newer', found: native / 10, known: SCHEMA_VERSION };
}
