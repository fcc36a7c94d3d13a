import { createContext } from 'svelte';
import { saveAll } from './save-first.ts';

/** How long drafts may take to be saved before this tab is loaded afresh, in milliseconds. */
const PATIENCE = 4_000;
/** How often a long-lived tab asks whether there is a newer release, in milliseconds. */
const ASK_EVERY = 60 * 60 * 1_000;

type Answer = { readonly needed: number; readonly kept: number };

/**
 * What the page knows about its service worker. A newer release waits until the person asks for it; then every open
 * tab saves its drafts and loads itself afresh, once.
 */
export class Updates {
	/** True when a worker is active and every file the app needs is in its cache. */
	offlineReady = $state(false);
	/** True when a newer release is installed and waits. */
	waiting = $state(false);
	/** True from the person's word until this tab is loaded afresh. */
	applying = $state(false);
	/** Why the app cannot be kept for offline on this device, in a sentence; empty when it can. */
	trouble = $state('');

	#apply: (() => void) | null = null;
	#loading = false;

	/**
	 * Registers the worker at `url`. Called once, by the layout, after the page is usable.
	 * The reload is passed in so that it can be watched in a test.
	 */
	async register(url: string, scope: string, reload: () => void = () => location.reload()): Promise<void> {
		if (!('serviceWorker' in navigator)) {
			this.trouble = 'This browser cannot keep the app for offline. Use one that supports service workers, over HTTPS.';
			return;
		}
		const container = navigator.serviceWorker;
		// the first worker to take over an open page brings nothing new; only a later one is an update
		let controlled = container.controller !== null;
		const afresh = async (): Promise<void> => {
			if (this.#loading) return;
			this.#loading = true;
			this.applying = true;
			await saveAll(PATIENCE);
			reload();
		};
		container.addEventListener('controllerchange', () => {
			if (controlled) void afresh();
			controlled = true;
		});

		const { Workbox } = await import('workbox-window');
		const workbox = new Workbox(url, { scope, updateViaCache: 'none' });
		workbox.addEventListener('waiting', () => {
			this.waiting = true;
		});
		this.#apply = () => {
			this.applying = true;
			// a tab that was loaded past the worker is not controlled and would hear of no change
			workbox.addEventListener('activated', () => void afresh());
			workbox.messageSkipWaiting();
		};
		try {
			const registration = await workbox.register({ immediate: true });
			if (registration === undefined) return;
			const ask = (): void => void registration.update().catch(() => undefined);
			let asked = performance.now();
			document.addEventListener('visibilitychange', () => {
				if (document.visibilityState !== 'visible' || performance.now() - asked < ASK_EVERY) return;
				asked = performance.now();
				ask();
			});
			addEventListener('online', ask);
			await container.ready;
			await this.#checkOffline();
		} catch {
			if (container.controller === null) {
				this.trouble = 'The app could not be kept for offline. Open it once more with a signal.';
			} else await this.#checkOffline();
		}
	}

	/** Asks the active worker to count the files it keeps; ready means none is missing. */
	async #checkOffline(): Promise<void> {
		const registration = await navigator.serviceWorker.ready;
		const worker = registration.active;
		if (worker === null) return;
		if (worker.state !== 'activated') {
			await new Promise<void>((resolve) => {
				worker.addEventListener('statechange', () => resolve(), { once: true });
			});
		}
		const channel = new MessageChannel();
		const answer = new Promise<Answer>((resolve) => {
			channel.port1.onmessage = (event: MessageEvent<Answer>) => resolve(event.data);
		});
		worker.postMessage({ type: 'COUNT_KEPT' }, [channel.port2]);
		const { needed, kept } = await answer;
		channel.port1.close();
		this.offlineReady = needed > 0 && kept === needed;
		this.trouble = this.offlineReady
			? ''
			: `${needed - kept} of the app’s ${needed} files are missing on this device. Open it once more with a signal.`;
	}

	/** The person's word: the waiting release takes over in every tab. */
	apply(): void {
		if (this.waiting && !this.applying) this.#apply?.();
	}
}

/** The updates of this tab, set by the layout and read by the pages. */
export const [getUpdates, setUpdates] = createContext<Updates>();
