import { fail, ok, type Result } from '$trade/number/result.ts';
import type { StoredRecord } from '$trade/record/record.ts';
import { BackupFailure, type BackupProblem, type Running } from './backup-format.ts';
import { mergeRecords, planMerge } from './merge.ts';
import type { Session } from './open.ts';
import { problemOf, StorageFailure, type StorageProblem } from './problem.ts';
import { photosOf, readBackup, type BackupContents } from './read-backup.ts';

/** What restoring a file would do, shown before anything is changed. */
export type RestorePreview = {
	readonly madeAt: number;
	readonly database: string;
	/** Records that the file brings, and those that are here already. */
	readonly fresh: number;
	readonly known: number;
	/** Things on which the file and this book would newly disagree. */
	readonly conflicts: number;
	/** Photos that are not here yet. */
	readonly photos: number;
	/** All lots and purchases in the file, here already or not. */
	readonly lots: number;
	readonly purchases: number;
	/** The times of the first and the last record in the file; null for an empty one. */
	readonly from: number | null;
	readonly to: number | null;
	/** Lines that could not be read when the backup was made; they are kept. */
	readonly damaged: number;
	readonly file: Blob;
	readonly contents: BackupContents;
};

/** Reads and checks all of a file, and says what it would bring. Nothing is changed. */
export async function previewBackup(
	session: Session,
	file: Blob,
	running: Running = {}
): Promise<Result<RestorePreview, BackupProblem | StorageProblem>> {
	const read = await readBackup(file, running);
	if (!read.ok) return read;
	const { header, records, damaged, photoIds } = read.value;
	try {
		const plan = await planMerge(session, records);
		const here = await session.use((db) => db.photos.where('id').anyOf(photoIds as string[]).count());
		const subjects = (kind: string) => new Set(records.filter((record) => record.kind === kind).map(({ subject }) => subject)).size;
		const times = records.map(({ at }) => at);
		return ok({
			madeAt: header.madeAt,
			database: header.database,
			fresh: plan.fresh.length,
			known: plan.known,
			conflicts: plan.conflicts.length,
			photos: photoIds.length - here,
			lots: subjects('lot'),
			purchases: subjects('purchase'),
			from: times.length === 0 ? null : times.reduce((a, b) => Math.min(a, b)),
			to: times.length === 0 ? null : times.reduce((a, b) => Math.max(a, b)),
			damaged: damaged.length,
			file,
			contents: read.value
		});
	} catch (thrown) {
		return fail(differs(problemOf(thrown)));
	}
}

function differs(problem: StorageProblem): BackupProblem | StorageProblem {
	return problem.kind === 'storage-record-differs' ? { kind: 'backup-differs', record: problem.record } : problem;
}

const PHOTOS_AT_ONCE = 8;

/**
 * Joins a previewed file to the book. Photos come first, a few at a time: named by their bytes, they are nothing until a
 * record speaks of them, and those that came are taken away again if the rest does not succeed. Then all records in one
 * transaction.
 */
export async function restore(
	session: Session,
	preview: RestorePreview,
	{ onProgress, signal }: Running = {}
): Promise<Result<readonly StoredRecord[], BackupProblem | StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	const { records, damaged, photoIds } = preview.contents;
	const brought: string[] = [];
	try {
		const here = new Set(await session.use((db) => db.photos.where('id').anyOf(photoIds as string[]).primaryKeys()));
		const total = preview.photos + 1;
		if (photoIds.some((id) => !here.has(id))) {
			const wanted = photoIds.filter((id) => !here.has(id)).length;
			let some = [];
			for await (const photo of photosOf(preview.file, signal)) {
				if (here.has(photo.id)) continue;
				some.push(photo);
				if (some.length < PHOTOS_AT_ONCE && brought.length + some.length < wanted) continue;
				const ready = some;
				some = [];
				brought.push(...ready.map(({ id }) => id));
				await session.use((db) => db.transaction('rw', db.photos, () => db.photos.bulkPut(ready)));
				onProgress?.({ step: 'merging', done: brought.length, total });
			}
		}
		if (signal?.aborted === true) throw new BackupFailure({ kind: 'backup-cancelled' });
		const merged = await mergeRecords(session, records, { fromBackup: true, damaged });
		if (!merged.ok) throw new StorageFailure(merged.problem);
		session.settleMarker();
		onProgress?.({ step: 'merging', done: total, total });
		return ok(merged.value);
	} catch (thrown) {
		await takeAway(session, brought);
		if (thrown instanceof BackupFailure) return fail(thrown.problem);
		return fail(differs(problemOf(thrown)));
	}
}

/** Photos that no record speaks of are harmless; so is failing to take them away. */
async function takeAway(session: Session, ids: readonly string[]): Promise<void> {
	if (ids.length === 0) return;
	try {
		await session.use((db) => db.transaction('rw', db.photos, () => db.photos.bulkDelete(ids as string[])));
	} catch {
		return;
	}
}
