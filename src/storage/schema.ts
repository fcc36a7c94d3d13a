import { Dexie, type Table } from 'dexie';
import type { Json } from '$trade/record/json.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import type { Environment } from './environment.ts';

/** The version of the tables below. A release that changes them counts it up, and never drops what it stops using. */
export const SCHEMA_VERSION = 1;
/** The database's own counting is ten times ours (the library's custom). */
export const NATIVE_VERSION = SCHEMA_VERSION * 10;

/** Where a subject stands now: a cache of `records`, written with them and rebuilt from them at any time. */
export type CurrentRow = {
	readonly subject: string;
	readonly kind: string;
	/** The winning record. */
	readonly record: string;
	readonly version: number;
	readonly at: number;
	readonly body: Json | null;
	/** Every record that stands; more than one is a conflict. Latest first. */
	readonly heads: readonly { readonly id: string; readonly at: number }[];
	/** The list that the subject is found in, and its place there; absent for what is deleted. */
	readonly shelf?: string;
	readonly order?: number;
	/** 1 while there is a conflict, absent otherwise, so that the index holds conflicts only. */
	readonly conflict?: 1;
};

/** The running sums of one lot as plain values. */
export type SumsRow = {
	readonly lot: string;
	readonly sums: unknown;
	/** Scales whose own error is in the sums: when one changes, they are made again. */
	readonly scales: readonly string[];
	/** Pieces that could not be read and are not in the sums. */
	readonly damaged: readonly string[];
};

export type PhotoRow = { readonly id: string; readonly type: string; readonly bytes: ArrayBuffer };
export type DraftRow = { readonly key: string; readonly value: Json; readonly at: number };

/** The one row about the book as a whole. Every writer counts `revision` up, so a writer sees that another was quicker. */
export type BookRow = {
	readonly key: 'book';
	readonly database: string;
	readonly device: string;
	/** Hash of this device's last record. */
	readonly head: string | null;
	/** This device's letter in purchase numbers, and how many it has given. */
	readonly letter: string;
	readonly numbered: number;
	/** Letters that other devices have numbered with. */
	readonly taken: readonly string[];
	readonly records: number;
	readonly revision: number;
	readonly lastBackup: number | null;
};

/** Purchases that are in no backup yet. */
export type OnlyHereRow = { readonly subject: string };
/** What a backup held that could not be read; kept, and written into the next backup. */
export type DamagedRow = { readonly key: string; readonly reason: string; readonly row: Json };

export class BookDatabase extends Dexie {
	/** `asFound`: with whatever tables a newer app has made, for reading only. */
	constructor(name: string, { indexedDB, IDBKeyRange }: Environment, asFound = false) {
		super(name, {
			indexedDB,
			IDBKeyRange,
			// saved means on the medium: without this a power cut loses the last seconds of acknowledged writes
			chromeTransactionDurability: 'strict',
			autoOpen: false,
			cache: 'disabled'
		});
		if (asFound) {
			this.use({
				stack: 'dbcore',
				name: 'read-only',
				create: (core) => ({
					...core,
					transaction(stores, mode, options) {
						if (mode === 'readwrite') throw new Error('a newer book is only read');
						return core.transaction(stores, mode, options);
					}
				})
			});
			return;
		}
		this.version(1).stores({
			records: 'id, subject',
			current: 'subject, [shelf+order+subject], conflict',
			sums: 'lot, *scales',
			photos: 'id',
			drafts: 'key',
			book: 'key',
			onlyHere: 'subject',
			damaged: 'key'
		});
	}

	// looked up by name: so they are there also when the tables are taken as found
	get records(): Table<StoredRecord, string> {
		return this.table('records');
	}
	get current(): Table<CurrentRow, string> {
		return this.table('current');
	}
	get sums(): Table<SumsRow, string> {
		return this.table('sums');
	}
	get photos(): Table<PhotoRow, string> {
		return this.table('photos');
	}
	get drafts(): Table<DraftRow, string> {
		return this.table('drafts');
	}
	get book(): Table<BookRow, string> {
		return this.table('book');
	}
	get onlyHere(): Table<OnlyHereRow, string> {
		return this.table('onlyHere');
	}
	get damaged(): Table<DamagedRow, string> {
		return this.table('damaged');
	}
}
