import { gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { blobTarget, type BackupTarget } from '../../src/storage/backup.ts';
import type { Progress } from '../../src/storage/backup-format.ts';
import { makePhoto } from '../../src/storage/photos.ts';
import { device, lotChange, opened, pieceChange, problem, purchaseChange, raw, saved, value } from './some-books.ts';

const linesOf = async (blob: Blob) =>
	gunzipSync(new Uint8Array(await blob.arrayBuffer()))
		.toString('utf8')
		.trimEnd()
		.split('\n')
		.map((line) => JSON.parse(line) as Record<string, unknown>);

async function fullBook() {
	const on = device();
	const book = await opened(on);
	const photo = await makePhoto(new Uint8Array(70_000).map((_, n) => n % 251).buffer, 'image/jpeg');
	await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.20g')], { photos: [photo] });
	await saved(book, [purchaseChange('b-1'), purchaseChange('b-2')]);
	return { on, book, photo };
}

describe('a backup', () => {
	it('is lines of JSON in gzip: a header, every record, every photo, decimals as text', async () => {
		const { book, photo } = await fullBook();
		const file = value(await book.backup());
		const [header, ...lines] = await linesOf(file.blob);
		expect(file.name).toMatch(/^meltbook-2026-09-21-\d{4}\.jsonl\.gz$/);
		expect(header).toMatchObject({ format: 'meltbook-backup', version: 1, records: 4, photos: 1, damaged: 0, breaks: [] });
		expect(Object.keys(header!)).toEqual(['breaks', 'damaged', 'database', 'digest', 'format', 'madeAt', 'photos', 'records', 'version']);
		expect(lines.map((line) => Object.keys(line)[0])).toEqual(['record', 'record', 'record', 'record', 'photo']);
		const piece = lines.map(({ record }) => record as { kind: string; body: { piece: { weighing: object } } } | undefined).find((record) => record?.kind === 'piece');
		expect(piece?.body.piece.weighing).toMatchObject({ typed: '3.20', reading: '3.2' });
		const kept = lines.at(-1)!.photo as { id: string; base64: string };
		expect(kept.id).toBe(photo.id);
		expect(new Uint8Array(Buffer.from(kept.base64, 'base64')).buffer).toEqual(photo.bytes);
	});
	it('counts what is only on this phone until the person has the file, and goes on counting after', async () => {
		const { on, book } = await fullBook();
		expect((await book.counts()).purchasesOnlyHere).toBe(2);
		const file = value(await book.backup());
		expect((await book.counts()).purchasesOnlyHere).toBe(2);
		await saved(book, [purchaseChange('b-3')]);
		on.time += 5;
		value(await book.handedOver(file));
		expect(await book.counts()).toMatchObject({ purchasesOnlyHere: 1, lastBackup: file.madeAt, records: 5, photos: 1 });
	});
	it('tells how far it is, and can be stopped without leaving anything', async () => {
		const { book } = await fullBook();
		const seen: Progress[] = [];
		value(await book.backup({ onProgress: (progress) => seen.push(progress) }));
		expect([...new Set(seen.map(({ step }) => step))]).toEqual(['counting', 'writing', 'verifying']);
		for (const { done, total } of seen) expect(done).toBeLessThanOrEqual(total);
		for (const stopAt of ['counting', 'writing', 'verifying'] as const) {
			const stop = new AbortController();
			const result = await book.backup({ signal: stop.signal, onProgress: ({ step }) => step === stopAt && stop.abort() });
			if (stopAt !== 'verifying') expect(problem(result)).toEqual({ kind: 'backup-cancelled' });
		}
		const stopped = new AbortController();
		stopped.abort();
		expect(problem(await book.backup({ signal: stopped.signal }))).toEqual({ kind: 'backup-cancelled' });
		expect((await book.counts()).purchasesOnlyHere).toBe(2);
	});
	it('is read back, and refused when the medium gives back something else', async () => {
		const { book } = await fullBook();
		const spoiling = (spoil: (blob: Blob) => Blob): BackupTarget => {
			const inner = blobTarget();
			return { write: (chunk) => inner.write(chunk), end: async () => spoil(await inner.end()) };
		};
		const cut = await book.backup({ target: spoiling((blob) => blob.slice(0, blob.size - 20)) });
		expect(problem(cut)).toMatchObject({ kind: 'backup-not-verified', what: expect.stringMatching(/backup-(cut-short|damaged)/) as string });
		const other = value(await (await fullBook()).book.backup());
		const swapped = await book.backup({ target: spoiling(() => other.blob) });
		expect(problem(swapped)).toEqual({ kind: 'backup-not-verified', what: 'header' });
	});
	it('that the medium refuses is a problem', async () => {
		const { book } = await fullBook();
		const full: BackupTarget = {
			write: () => {
				throw new DOMException('the card is full', 'QuotaExceededError');
			},
			end: () => new Blob()
		};
		expect(problem(await book.backup({ target: full }))).toMatchObject({ kind: 'storage-quota' });
	});
	it('keeps what cannot be read, and says where a chain does not hold', async () => {
		const { on, book, photo } = await fullBook();
		const db = await raw(on);
		const [, second] = await db.records.toArray();
		await db.records.put({ ...second!, at: second!.at + 1 });
		await db.records.put({ id: 'zz-nonsense', colour: 7n } as never);
		await db.photos.put({ ...photo, bytes: new Uint8Array([1]).buffer });
		db.close();
		const file = value(await book.backup());
		expect(file).toMatchObject({ records: 3, damaged: 3, photos: 0 });
		const [header, ...lines] = await linesOf(file.blob);
		const breaks = header!.breaks as { kind: string; missing: string }[];
		expect(breaks).toMatchObject([{ kind: 'chain-gap', missing: second!.hash }]);
		const damaged = lines.filter((line) => 'damaged' in line).map(({ damaged: kept }) => kept as { key: string; reason: string; row: unknown });
		expect(damaged.map(({ key, reason }) => [key, reason])).toEqual([
			[second!.id, 'record-changed'],
			['zz-nonsense', 'record-shape kind'],
			[`photo ${photo.id}`, 'photo-damaged']
		]);
		expect(damaged[1]!.row).toEqual({ id: 'zz-nonsense', colour: 'bigint 7' });
		// and such a backup can be restored: what is whole comes back, the rest is kept for the next backup
		const onB = device();
		const b = await opened(onB);
		const preview = value(await b.previewBackup(file.blob));
		expect(preview).toMatchObject({ fresh: 3, damaged: 3 });
		value(await b.restore(preview));
		expect((await b.counts()).damaged).toBe(3);
		const again = value(await b.backup());
		expect(again).toMatchObject({ records: 3, damaged: 3 });
		const texts = (all: readonly object[]) => all.map((line) => JSON.stringify(line)).filter((line) => line.startsWith('{"damaged":{'));
		expect(texts(await linesOf(again.blob)).sort()).toEqual(texts(lines).sort());
	});
	it('of an empty book restores to an empty book', async () => {
		const file = value(await (await opened()).backup());
		const other = await opened();
		const preview = value(await other.previewBackup(file.blob));
		expect(preview).toMatchObject({ fresh: 0, known: 0, from: null, to: null, lots: 0, purchases: 0 });
		expect(value(await other.restore(preview))).toEqual([]);
	});
});
