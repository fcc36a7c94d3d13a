import type { StoredRecord } from './record.ts';

/** Where the chain of one device's records does not hold. */
export type ChainBreak =
	/** `record` says that another record stands before it, and it is not there. */
	| { readonly kind: 'chain-gap'; readonly device: string; readonly record: string; readonly missing: string }
	/** Two records say that the same one (or none) stands before them: the device's book was copied and both copies went on. */
	| { readonly kind: 'chain-fork'; readonly device: string; readonly record: string; readonly other: string };

type Link = Pick<StoredRecord, 'id' | 'device' | 'previous' | 'hash'>;

/**
 * Follows each device's records from one to the next by `previous` and names what does not fit. Hashes are not recomputed
 * here; together with recomputed hashes a changed or missing record is found.
 * Whole means: every `previous` is null once per device, or the hash of another record of that device, each used once.
 */
export function chainBreaks(records: Iterable<Link>, alsoThere: (hash: string) => boolean = () => false): ChainBreak[] {
	const byHash = new Map<string, Link>();
	const all = [...records];
	for (const record of all) byHash.set(record.hash, record);
	const followed = new Map<string, Link>();
	const breaks: ChainBreak[] = [];
	for (const record of all) {
		const { device, id, previous } = record;
		if (previous !== null && byHash.get(previous)?.device !== device && !alsoThere(previous)) {
			breaks.push({ kind: 'chain-gap', device, record: id, missing: previous });
		}
		const link = `${device} ${previous ?? 'first'}`;
		const other = followed.get(link);
		if (other === undefined) followed.set(link, record);
		else breaks.push({ kind: 'chain-fork', device, record: id, other: other.id });
	}
	return breaks;
}
