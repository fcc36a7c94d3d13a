import type { ChainBreak } from '$trade/record/chain.ts';
import type { BodyProblem } from '$trade/record/kind.ts';
import type { RecordProblem } from '$trade/record/record.ts';

/**
 * What can go wrong with saving, restoring and reading the book. The parts of storage are written out here, because
 * components know nothing of storage; a page that passes on a problem missing here does not compile.
 */
export type BookProblem =
	| RecordProblem
	| BodyProblem
	| ChainBreak
	| { readonly kind: 'storage-quota' | 'storage-failed' | 'storage-lost' | 'storage-unavailable'; readonly reason: string }
	| { readonly kind: 'storage-newer'; readonly found: number; readonly known: number }
	| { readonly kind: 'storage-superseded' | 'storage-blocked' | 'storage-busy' }
	| { readonly kind: 'storage-changed-since'; readonly subject: string }
	| { readonly kind: 'storage-already-saved'; readonly act: string }
	| { readonly kind: 'storage-record-differs' | 'storage-no-such-record' | 'backup-differs'; readonly record: string }
	| { readonly kind: 'backup-not-ours' | 'backup-cancelled' }
	| { readonly kind: 'backup-cut-short'; readonly line: number }
	| { readonly kind: 'backup-damaged'; readonly line: number; readonly what: string }
	| { readonly kind: 'backup-newer'; readonly what: string; readonly version: number; readonly known: number }
	| { readonly kind: 'backup-not-verified'; readonly what: string };

export function bookSentence(problem: BookProblem): string {
	switch (problem.kind) {
		case 'record-shape':
			return `A record is damaged: its ${problem.field} is ${problem.found}. It is kept and exported as it is.`;
		case 'record-body':
			return `A record is damaged: ${problem.at} should be ${problem.expected} and is ${problem.found}. It is kept and exported as it is.`;
		case 'record-newer':
			return `A ${problem.record} here was written by a newer version (${problem.version}; this one knows ${problem.known}). Update the app to see it.`;
		case 'chain-gap':
			return `A record of the device ${problem.device} is missing: the one before ${problem.record}. Restore a backup of that device to bring it back.`;
		case 'chain-fork':
			return (
				`The book of the device ${problem.device} was copied and both copies went on, from ${problem.record} and ${problem.other}. ` +
				'Nothing is lost; go on with one of them.'
			);
		case 'storage-quota':
			return (
				'Not saved: this device has no room left. Save without the photo, or make a backup and free some space. ' +
				'What you typed is still here.'
			);
		case 'storage-failed':
			return `Not saved: the device refused (${problem.reason}). What you typed is still here; try again, and make a backup if it stays so.`;
		case 'storage-lost':
			return 'Not saved: the connection to the book was lost. What you typed is still here. Load the page again, then save.';
		case 'storage-unavailable':
			return 'This browser keeps no book, as in a private window. Open the app in an ordinary window.';
		case 'storage-newer':
			return `This book was written by a newer version (${problem.found}; this one knows ${problem.known}). It can be read and exported here. Update the app to write.`;
		case 'storage-superseded':
			return 'Another tab has opened this book with a newer version. Load this page again; what you typed is kept.';
		case 'storage-blocked':
			return 'Another tab still holds this book with an older version. Close that tab, or load it again.';
		case 'storage-busy':
			return 'Not saved yet: another tab is writing without pause. Try again.';
		case 'storage-changed-since':
			return 'Not saved: this was changed in another tab or on another device since you opened it. Look at the change, then save yours.';
		case 'storage-already-saved':
			return 'This was saved before with other content. Open it from the book before changing it.';
		case 'storage-no-such-record':
			return 'There is nothing left to take back: that entry is not in this book.';
		case 'storage-record-differs':
		case 'backup-differs':
			return `The record ${problem.record} stands in this book with other content. One of the two was changed after it was written. Nothing was joined.`;
		case 'backup-not-ours':
			return 'This file is not a backup of Meltbook. Nothing was changed.';
		case 'backup-cancelled':
			return 'Stopped. Nothing was changed.';
		case 'backup-cut-short':
			return `This backup breaks off after line ${problem.line}: it was not copied whole. Copy it again. Nothing was changed.`;
		case 'backup-damaged':
			return `This backup is damaged at line ${problem.line}: ${problem.what}. Use another copy. Nothing was changed.`;
		case 'backup-newer':
			return `This backup was written by a newer version (${problem.what} ${problem.version}; this one knows ${problem.known}). Update the app first. Nothing was changed.`;
		case 'backup-not-verified':
			return `The backup was written, but reading it back gave something else (${problem.what}). Do not rely on it; make it again.`;
	}
}
