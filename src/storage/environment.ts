/** What the storage needs from the outside, so that tests can put their own in its place. */
export type Environment = {
	readonly indexedDB: IDBFactory;
	readonly IDBKeyRange: typeof globalThis.IDBKeyRange;
	/** Milliseconds since 1970-01-01 UTC. */
	readonly now: () => number;
	/** Runs one writer at a time under a name, across all tabs. */
	readonly lock: Lock;
	/** Small text kept outside the database; null where there is none. */
	readonly outside: OutsideStore | null;
	/** Tells other tabs that something changed; null where there is no way to. */
	readonly channel: ((name: string) => BroadcastChannel) | null;
};

export type Lock = <T>(name: string, act: () => Promise<T>) => Promise<T>;
export type OutsideStore = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** One writer at a time within this page, for places without Web Locks. The transaction checks again whatever the lock does. */
export function pageLock(): Lock {
	const tails = new Map<string, Promise<unknown>>();
	return async <T>(name: string, act: () => Promise<T>): Promise<T> => {
		const before = tails.get(name) ?? Promise.resolve();
		const turn = before.then(act, act);
		tails.set(
			name,
			turn.catch(() => undefined)
		);
		return turn;
	};
}

const fallback = pageLock();

/** Web Locks where there are any: they hold across tabs and are let go when a tab crashes. */
export const webLock: Lock = (name, act) => {
	const locks = (globalThis.navigator as { locks?: LockManager } | undefined)?.locks;
	return locks === undefined ? fallback(name, act) : locks.request(name, { mode: 'exclusive' }, act);
};

/** The browser's own. */
export function browserEnvironment(): Environment {
	return {
		indexedDB: globalThis.indexedDB,
		IDBKeyRange: globalThis.IDBKeyRange,
		now: () => Date.now(),
		lock: webLock,
		outside: outsideStore(),
		channel: typeof BroadcastChannel === 'undefined' ? null : (name) => new BroadcastChannel(name)
	};
}

function outsideStore(): OutsideStore | null {
	try {
		return globalThis.localStorage ?? null;
	} catch {
		// reading the property itself throws where storage is forbidden
		return null;
	}
}
