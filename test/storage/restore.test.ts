import { gzipSync, gunzipSync } from 'node:zlib';
import fc from 'fast-check';
import { IDBObjectStore as FakeStore } from 'fake-indexeddb';
import { describe, expect, it, vi } from 'vitest';
import { headerText, makeDigest, readHeader } from '../../src/storage/backup-format.ts';
import { hashOf } from '../../src/storage/hash.ts';
import { makePhoto } from '../../src/storage/photos.ts';
import { canonicalJson, type Json } from '../../src/trade/record/json.ts';
import { contentOf, device, lotChange, opened, pieceChange, problem, purchaseChange, saved, START, value } from './some-books.ts';

async function backup() {
	const on = device();
	const book = await opened(on);
	const photos = await Promise.all([3, 5, 7].map((n) => makePhoto(new Uint8Array(600).fill(n).buffer, 'image/jpeg')));
	await saved(book, [lotChange('lot-1'), pieceChange('p-1', 'lot-1', '14k ring 3.2g')], { photos });
	on.time += 1_000;
	await saved(book, [purchaseChange('b-1')]);
	const file = value(await book.backup());
	const bytes = new Uint8Array(await file.blob.arrayBuffer());
	return { on, book, file, bytes, lines: gunzipSync(bytes).toString('utf8').trimEnd().split('\n') };
}

const zipped = (lines: readonly string[]) => new Blob([gzipSync(`${lines.join('\n')}\n`)]);

/** The same lines with a header that fits them again: what only a person with our code could make. */
async function sealed(lines: readonly string[], parts: Json = {}): Promise<Blob> {
	const { digest: _, ...bare } = readHeader(lines[0]!)!;
	const header = { ...bare, ...(parts as object) };
	const digest = makeDigest();
	for (const line of lines.slice(1)) await digest.add(line);
	await digest.add(headerText(header));
	return zipped([headerText({ ...header, digest: await digest.end() }), ...lines.slice(1)]);
}

describe('restoring', () => {
	it('says first what it would bring, then brings it, with sums and photos', async () => {
		const { on, file } = await backup();
		const onB = device();
		const b = await opened(onB);
		const preview = value(await b.previewBackup(file.blob));
		expect(preview).toMatchObject({ fresh: 3, known: 0, conflicts: 0, photos: 3, lots: 1, purchases: 1, from: START, to: START + 1_000, damaged: 0 });
		expect(await b.openLots()).toEqual([]);
		expect((await b.counts()).photos).toBe(0);
		expect(value(await b.restore(preview))).toHaveLength(3);
		expect(await contentOf(onB)).toBe(await contentOf(on));
		expect(await b.check()).toEqual([]);
		expect((await b.counts()).purchasesOnlyHere).toBe(0);
	});
	it('twice is the same as once', async () => {
		const { file } = await backup();
		const on = device();
		const book = await opened(on);
		value(await book.restore(value(await book.previewBackup(file.blob))));
		const once = await contentOf(on);
		const again = value(await book.previewBackup(file.blob));
		expect(again).toMatchObject({ fresh: 0, known: 3, photos: 0 });
		expect(value(await book.restore(again))).toEqual([]);
		expect(await contentOf(on)).toBe(once);
	});
	it('joins with what is here, and counts the conflicts beforehand', async () => {
		const { book, file } = await backup();
		const other = await opened();
		value(await other.restore(value(await other.previewBackup(file.blob))));
		await saved(other, [lotChange('lot-1', { name: 'theirs' }, await other.standing('lot-1'))]);
		await saved(book, [lotChange('lot-1', { name: 'ours' }, await book.standing('lot-1')), lotChange('lot-2')]);
		const theirs = value(await other.backup());
		const preview = value(await book.previewBackup(theirs.blob));
		expect(preview).toMatchObject({ fresh: 1, known: 3, conflicts: 1 });
		value(await book.restore(preview));
		expect(await book.conflicts()).toHaveLength(1);
		expect((await book.openLots()).length).toBe(2);
	});
	it('reads a file that was unpacked by hand', async () => {
		const { lines } = await backup();
		const plain = new Blob([`${lines.join('\n')}\n`]);
		expect(value(await (await opened()).previewBackup(plain))).toMatchObject({ fresh: 3, photos: 3 });
	});
	it('tells how far it is, and stopped in the middle leaves nothing', async () => {
		const { file } = await backup();
		const on = device();
		const book = await opened(on);
		const before = await contentOf(on);
		const preview = value(await book.previewBackup(file.blob));
		const stop = new AbortController();
		const result = await book.restore(preview, { signal: stop.signal, onProgress: () => stop.abort() });
		expect(problem(result)).toEqual({ kind: 'backup-cancelled' });
		expect(await contentOf(on)).toBe(before);
	});
	it('that fails at its last write leaves nothing, photos neither', async () => {
		const { file } = await backup();
		const on = device();
		const book = await opened(on);
		const before = await contentOf(on);
		const preview = value(await book.previewBackup(file.blob));
		const put = FakeStore.prototype.put;
		const spy = vi.spyOn(FakeStore.prototype, 'put').mockImplementation(function (this: IDBObjectStore, row: unknown, key?: unknown) {
			if (this.name === 'book') throw new DOMException('no room', 'QuotaExceededError');
			return put.call(this, row, key as never);
		});
		const result = await book.restore(preview);
		spy.mockRestore();
		expect(problem(result)).toMatchObject({ kind: 'storage-quota' });
		expect(await contentOf(on)).toBe(before);
	});
});

describe('a file that is not whole', () => {
	it('is refused at every single damaged byte, or is the same book after all; nothing changes', async () => {
		const { bytes, file } = await backup();
		const on = device();
		const book = await opened(on);
		await saved(book, [lotChange('own')]);
		const before = await contentOf(on);
		const whole = value(await book.previewBackup(file.blob)).contents;
		let refused = 0;
		await fc.assert(
			fc.asyncProperty(fc.nat(bytes.length - 1), fc.integer({ min: 1, max: 255 }), async (place, flip) => {
				const spoiled = bytes.slice();
				spoiled[place]! ^= flip;
				const result = await book.previewBackup(new Blob([spoiled]));
				if (result.ok) {
					// bits that mean nothing: time stamp and name of the system in the ten bytes of the gzip header, and those that
					// fill up the last byte of the packed stream, before its eight bytes of checks (RFC 1952, 2.3; RFC 1951, 3.2.3)
					expect(place < 10 || place === bytes.length - 9, `byte ${place} of ${bytes.length}`).toBe(true);
					expect(result.value.contents).toEqual(whole);
				} else {
					refused += 1;
					expect(result.problem.kind).toMatch(/^backup-(not-ours|damaged|cut-short|newer)$/);
				}
			}),
			{ numRuns: 1_000 }
		);
		expect(refused).toBeGreaterThan(500);
		expect(await contentOf(on)).toBe(before);
	}, 120_000);
	it('is refused wherever it ends too early', async () => {
		const { bytes } = await backup();
		const on = device();
		const book = await opened(on);
		const before = await contentOf(on);
		for (let end = 0; end < bytes.length; end += 1 + Math.floor(bytes.length / 300)) {
			const result = await book.previewBackup(new Blob([bytes.slice(0, end)]));
			expect(problem(result).kind, `cut at ${end}`).toMatch(/^backup-(not-ours|cut-short|damaged)$/);
		}
		expect(await contentOf(on)).toBe(before);
	}, 120_000);
	it('is refused unpacked as well: every damaged byte, every missing or doubled line', async () => {
		const { lines } = await backup();
		const book = await opened();
		const text = `${lines.join('\n')}\n`;
		await fc.assert(
			fc.asyncProperty(fc.nat(text.length - 1), fc.constantFrom('x', '0', '"', '\n', ' ', '{'), async (place, put) => {
				if (text[place] === put) return;
				const result = await book.previewBackup(new Blob([text.slice(0, place) + put + text.slice(place + 1)]));
				expect(problem(result).kind).toMatch(/^backup-(not-ours|damaged|cut-short|newer)$/);
			}),
			{ numRuns: 1_000 }
		);
		for (let line = 1; line < lines.length; line += 1) {
			expect(problem(await book.previewBackup(zipped(lines.filter((_, n) => n !== line)))).kind).toBe('backup-cut-short');
			const doubled = [...lines.slice(0, line + 1), ...lines.slice(line)];
			expect(problem(await book.previewBackup(zipped(doubled)))).toMatchObject({ kind: 'backup-damaged', what: 'twice' });
		}
		const swapped = [lines[0]!, lines[2]!, lines[1]!, ...lines.slice(3)];
		expect(problem(await book.previewBackup(zipped(swapped)))).toMatchObject({ kind: 'backup-damaged', what: 'digest' });
	}, 120_000);
});

describe('a file that was made to fit', () => {
	it('is refused when a record was changed, left out, or put in from nowhere', async () => {
		const { lines } = await backup();
		const book = await opened();
		const record = (JSON.parse(lines[1]!) as { record: Record<string, never> }).record;
		const changed = canonicalJson({ record: { ...record, at: 5 } as unknown as Json });
		expect(problem(await book.previewBackup(await sealed([lines[0]!, changed, ...lines.slice(2)])))).toEqual({ kind: 'backup-damaged', line: 2, what: 'hash' });
		const without = await sealed([lines[0]!, ...lines.slice(2)], { records: 2 });
		expect(problem(await book.previewBackup(without))).toMatchObject({ kind: 'backup-damaged', what: expect.stringContaining('chain-gap') as string });
		const counted = await sealed(lines, { records: 2, photos: 4 });
		expect(problem(await book.previewBackup(counted))).toMatchObject({ kind: 'backup-damaged', what: 'counts' });
		const photo = lines.at(-1)!.replace('base64":"A', 'base64":"B').replace('base64":"B', 'base64":"C');
		const base = photo === lines.at(-1) ? lines.at(-1)!.replace(/"base64":"../, '"base64":"zz') : photo;
		expect(problem(await book.previewBackup(await sealed([...lines.slice(0, -1), base])))).toMatchObject({ what: 'photo' });
		expect(problem(await book.previewBackup(await sealed([...lines.slice(0, -1), '{"secret":1}'])))).toMatchObject({ what: 'line' });
	});
	it('is refused when a body is not what its kind holds', async () => {
		const { lines } = await backup();
		const record = (JSON.parse(lines[1]!) as { record: Parameters<typeof hashOf>[0] & { hash: string } }).record;
		const bare = { ...record, body: { colour: 'red' } };
		const line = canonicalJson({ record: { ...bare, hash: await hashOf(bare) } as unknown as Json });
		const result = await (await opened()).previewBackup(await sealed([lines[0]!, line, ...lines.slice(2)]));
		expect(problem(result)).toMatchObject({ kind: 'backup-damaged', line: 2, what: 'record-body name' });
	});
	it('asks for a newer app when the file, a kind or a version is newer', async () => {
		const { lines } = await backup();
		const book = await opened();
		const record = (JSON.parse(lines[1]!) as { record: Parameters<typeof hashOf>[0] }).record;
		const withLine = async (parts: object) => {
			const bare = { ...record, ...parts };
			return sealed([lines[0]!, canonicalJson({ record: { ...bare, hash: await hashOf(bare) } as unknown as Json }), ...lines.slice(2)]);
		};
		expect(problem(await book.previewBackup(await sealed(lines, { version: 2 })))).toEqual({ kind: 'backup-newer', what: 'file', version: 2, known: 1 });
		expect(problem(await book.previewBackup(await withLine({ kind: 'melt' })))).toEqual({ kind: 'backup-newer', what: 'melt', version: 1, known: 0 });
		expect(problem(await book.previewBackup(await withLine({ version: 3 })))).toEqual({ kind: 'backup-newer', what: 'lot', version: 3, known: 1 });
	});
	it('is refused when another record stands here under the same id', async () => {
		const { lines, file } = await backup();
		const book = await opened();
		value(await book.restore(value(await book.previewBackup(file.blob))));
		const record = (JSON.parse(lines[3]!) as { record: Parameters<typeof hashOf>[0] & { id: string } }).record;
		const bare = { ...record, at: record.at + 1 };
		const line = canonicalJson({ record: { ...bare, hash: await hashOf(bare) } as unknown as Json });
		const result = await book.previewBackup(await sealed([...lines.slice(0, 3), line, ...lines.slice(4)]));
		expect(problem(result)).toEqual({ kind: 'backup-differs', record: record.id });
	});
	it.each(['', 'hello', '{}', '{"format":"meltbook-backup"}', '\u0000\u0001', '[]\n[]\n', '{"format":"other","version":1}\n'])('%j is no backup of ours', async (text) => {
		const book = await opened();
		for (const blob of [new Blob([text]), new Blob([gzipSync(text)])]) {
			expect(problem(await book.previewBackup(blob)).kind).toMatch(/^backup-(not-ours|cut-short)$/);
		}
	});
});
