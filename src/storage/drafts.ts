import type { Json } from '$trade/record/json.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import type { Session } from './open.ts';
import { problemOf, type StorageProblem } from './problem.ts';
import type { DraftRow } from './schema.ts';

/** What is half typed, kept through a reload and a crash. Drafts are no records: they are replaced and removed. */
export async function getDraft(session: Session, key: string): Promise<Json | null> {
	return (await session.use((db) => db.drafts.get(key)))?.value ?? null;
}

export async function listDrafts(session: Session, prefix = ''): Promise<readonly DraftRow[]> {
	return session.use((db) => db.drafts.where('key').startsWith(prefix).toArray());
}

export async function setDraft(session: Session, key: string, value: Json): Promise<Result<null, StorageProblem>> {
	return changing(session, async () => {
		const at = session.environment.now();
		await session.use((db) => db.transaction('rw', db.drafts, () => db.drafts.put({ key, value, at })));
	});
}

export async function removeDraft(session: Session, key: string): Promise<Result<null, StorageProblem>> {
	return changing(session, async () => {
		await session.use((db) => db.transaction('rw', db.drafts, () => db.drafts.delete(key)));
	});
}

async function changing(session: Session, act: () => Promise<void>): Promise<Result<null, StorageProblem>> {
	if (session.readOnly !== null) return fail(session.readOnly);
	try {
		await act();
		return ok(null);
	} catch (thrown) {
		return fail(problemOf(thrown));
	}
}
