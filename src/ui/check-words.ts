/**
 * What a check of the book found, as the check names it. Written out here because words know nothing of storage; a page
 * that passes on a finding missing here does not compile.
 */
export type CheckFinding =
	| { readonly kind: 'check-record-changed'; readonly record: string; readonly subject: string; readonly why: string }
	| { readonly kind: 'check-record-missing'; readonly device: string; readonly after: string | null }
	| { readonly kind: 'check-record-before-missing'; readonly device: string; readonly record: string }
	| { readonly kind: 'check-copied-device'; readonly device: string; readonly record: string; readonly other: string }
	| { readonly kind: 'check-current-differs'; readonly subject: string }
	| { readonly kind: 'check-sums-differ'; readonly lot: string }
	| { readonly kind: 'check-photo-missing'; readonly photo: string; readonly subject: string }
	| { readonly kind: 'check-photo-damaged'; readonly photo: string }
	| { readonly kind: 'check-number-twice'; readonly number: string }
	| { readonly kind: 'check-number-missing'; readonly letter: string; readonly count: number };

/** What was found, where, and what to do. `of` says what a thing is called where that is known. */
export function findingSentence(finding: CheckFinding, of: (subject: string) => string): string {
	switch (finding.kind) {
		case 'check-record-changed':
			return `An entry about ${of(finding.subject)} is not what was written (${finding.why}). Restore a backup made before it changed, on an empty device, to see it as it was.`;
		case 'check-record-missing':
			return finding.after === null
				? 'The last entry of this device is missing. Restore your latest backup.'
				: `The last entry of this device is missing, after ${finding.after}. Restore your latest backup.`;
		case 'check-record-before-missing':
			return `The entry before ${finding.record} is missing (device ${finding.device}). Restore a backup of that device to bring it back.`;
		case 'check-copied-device':
			return `This book was copied and both copies went on, from ${finding.record} and ${finding.other}. Nothing is lost; go on with one of them.`;
		case 'check-current-differs':
			return `What the pages show of ${of(finding.subject)} is not what its entries say. Making the pages’ figures again puts it right.`;
		case 'check-sums-differ':
			return `The sums of ${of(finding.lot)} are not the sums of its pieces. Making the pages’ figures again puts it right.`;
		case 'check-photo-missing':
			return `A photo of ${of(finding.subject)} is missing. Restore a backup that has it.`;
		case 'check-photo-damaged':
			return `The photo ${finding.photo} is damaged. Restore a backup that has it.`;
		case 'check-number-twice':
			return `The purchase number ${finding.number} was given twice. Both purchases are kept; write on the slips which is which.`;
		case 'check-number-missing':
			return `The purchase number ${finding.letter}-${String(finding.count).padStart(4, '0')} is missing between others. Restore your latest backup.`;
	}
}

/** Findings that making the current state again puts right. */
export function isRebuildable({ kind }: CheckFinding): boolean {
	return kind === 'check-current-differs' || kind === 'check-sums-differ';
}
