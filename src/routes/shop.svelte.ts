import { createContext } from 'svelte';
import type { Book } from '$storage/book.ts';
import type { AppendOptions, Change } from '$storage/append.ts';
import type { StorageProblem } from '$storage/problem.ts';
import { assert } from '$trade/number/decimal.ts';
import type { Result } from '$trade/number/result.ts';
import type { Tester } from '$trade/evidence/tester.ts';
import type { Scale } from '$trade/mass/scale.ts';
import type { PriceSheet } from '$trade/price/price-sheet.ts';
import { defaultSettings, type SettingsBody } from '$trade/record/kinds/settings.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { formatFor, type Format } from '$ui/format.ts';
import type { Opening } from './opening.svelte.ts';
import { sayProblem } from './say-problem.ts';

type Message = { readonly id: number; readonly text: string; readonly onundo?: () => void };
type Sheet = { readonly subject: string; readonly body: PriceSheet };

/** How often ages on the screen are looked at again, in milliseconds. */
const TICK = 30_000;

/**
 * The open book as the pages see it: settings, prices and scales as they stand, one way to write, and the message of
 * the last act. Made once by the layout; a page reads it with `getShop`.
 */
export class Shop {
	readonly book: Book;
	/** The book with invented people in it. */
	readonly demo: boolean;
	settings = $state.raw<SettingsBody>(defaultSettings());
	/** The record that the settings stand in; null while they are the defaults. */
	settingsRecord = $state.raw<string | null>(null);
	sheet = $state.raw<Sheet | null>(null);
	scales = $state.raw<readonly Scale[]>([]);
	testers = $state.raw<readonly Tester[]>([]);
	/** The moment that ages are counted from. */
	now = $state(Date.now());
	/** Raised after every committed act, here or in another tab: what was read is read again. */
	revision = $state(0);
	/** Lots that the last act touched. */
	touched = $state.raw<readonly string[]>([]);
	message = $state.raw<Message | null>(null);
	/** Purchases that are in no backup. */
	onlyHere = $state(0);
	readonly format: Format = $derived(formatFor(this.settings.language ?? navigator.language));
	readonly scale: Scale | null = $derived(this.scales.find(({ id }) => id === this.settings.scale) ?? null);

	#messages = 0;

	constructor(book: Book, demo: boolean) {
		this.book = book;
		this.demo = demo;
	}

	/** Reads what every page needs and follows the changes; the answer ends both. */
	async start(): Promise<() => void> {
		await this.#read();
		const stop = this.book.watch(({ kinds, lots }) => {
			this.touched = lots;
			void this.#read(kinds).then(() => {
				this.revision += 1;
			});
		});
		const timer = setInterval(() => {
			this.now = Date.now();
		}, TICK);
		return () => {
			stop();
			clearInterval(timer);
		};
	}

	async #read(kinds: readonly string[] | null = null): Promise<void> {
		const wants = (kind: string): boolean => kinds === null || kinds.includes(kind);
		this.now = Date.now();
		if (wants('settings')) {
			const found = await this.book.settings();
			if (found?.body) [this.settings, this.settingsRecord] = [found.body, found.record];
			else [this.settings, this.settingsRecord] = [defaultSettings(), found?.record ?? null];
		}
		if (wants('prices')) {
			const found = await this.book.latestSheet();
			this.sheet = found?.body ? { subject: found.subject, body: found.body } : null;
		}
		if (wants('scale')) {
			this.scales = (await this.book.scales()).flatMap(({ body }) => (body === null ? [] : [body]));
		}
		if (wants('tester')) {
			this.testers = (await this.book.testers()).flatMap(({ body }) => (body === null ? [] : [body]));
		}
		if (wants('purchase') || wants('backup')) this.onlyHere = (await this.book.counts()).purchasesOnlyHere;
	}

	/**
	 * Writes one act. When it is on the medium the message says so and offers to take it back; otherwise the message says
	 * what happened, nothing was saved, and the caller keeps its form.
	 */
	async act(said: string, changes: readonly Change[], options: AppendOptions = {}): Promise<Result<readonly StoredRecord[], StorageProblem>> {
		const result = await this.book.append(changes, options);
		if (result.ok) {
			const ids = result.value.map(({ id }) => id);
			this.say(said, () => void this.#undo(ids));
		} else {
			this.say(`Not saved. ${await sayProblem(result.problem, this.format)}`);
		}
		return result;
	}

	async #undo(ids: readonly string[]): Promise<void> {
		const changes = await this.book.undoOf(ids);
		const result = changes.ok ? await this.book.append(changes.value) : changes;
		this.say(result.ok ? 'Taken back.' : `Not taken back. ${await sayProblem(result.problem, this.format)}`);
	}

	say(text: string, onundo?: () => void): void {
		this.#messages += 1;
		this.message = { id: this.#messages, text, ...(onundo === undefined ? {} : { onundo }) };
	}
}

/** The way into the book, set by the layout. */
export const [getOpening, setOpening] = createContext<Opening>();

/** The open book of this tab. Pages are drawn only while there is one. */
export function getShop(): Shop {
	const { shop } = getOpening();
	assert(shop !== null, 'a page without a book');
	return shop;
}
