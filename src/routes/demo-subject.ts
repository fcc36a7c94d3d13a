/** Whether a subject belongs to the demo book's story: its backup may be looked at, but it is not anybody's own book. */
export function isDemoSubject(subject: string): boolean {
	return subject.startsWith('demo-');
}
