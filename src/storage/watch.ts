import type { Environment } from './environment.ts';

/** What changed in one committed act: enough for a page to tell whether it must read again. */
export type Changed = {
	readonly kinds: readonly string[];
	/** Lots whose pieces or sums changed. */
	readonly lots: readonly string[];
	/** False: another tab did it. */
	readonly own: boolean;
};

/** Things that a page must show a banner for. */
export type BookEvent =
	/** A newer app in another tab needs the book: drafts are kept, this page must be loaded again. */
	| { readonly kind: 'superseded' }
	/** The book was removed in another tab. */
	| { readonly kind: 'removed' }
	/** An older app in another tab keeps this one waiting. */
	| { readonly kind: 'blocked' }
	/** A row that could not be read; it is kept and exported. */
	| { readonly kind: 'damaged'; readonly subject: string; readonly reason: string };

export type Watchers = {
	readonly watch: (fn: (changed: Changed) => void) => () => void;
	readonly onEvent: (fn: (event: BookEvent) => void) => () => void;
	/** After a commit: tells this page and the other tabs. */
	readonly tell: (changed: Omit<Changed, 'own'>) => void;
	readonly announce: (event: BookEvent) => void;
	readonly close: () => void;
};

export function makeWatchers(name: string, { channel }: Environment): Watchers {
	const watching = new Set<(changed: Changed) => void>();
	const listening = new Set<(event: BookEvent) => void>();
	const between = channel === null ? null : channel(`${name}:changes`);
	const spread = (changed: Changed) => {
		// apart from the act itself: what is saved is saved, whatever a page makes of the news
		for (const fn of [...watching]) queueMicrotask(() => fn(changed));
	};
	if (between !== null) {
		between.onmessage = ({ data }: MessageEvent<Omit<Changed, 'own'>>) => spread({ kinds: data.kinds, lots: data.lots, own: false });
	}
	const add = <T>(set: Set<T>, fn: T) => {
		set.add(fn);
		return () => void set.delete(fn);
	};
	return {
		watch: (fn) => add(watching, fn),
		onEvent: (fn) => add(listening, fn),
		tell({ kinds, lots }) {
			between?.postMessage({ kinds, lots });
			spread({ kinds, lots, own: true });
		},
		announce(event) {
			for (const fn of [...listening]) queueMicrotask(() => fn(event));
		},
		close: () => between?.close()
	};
}
