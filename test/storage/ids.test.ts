import { describe, expect, it } from 'vitest';
import { newId, recordId } from '../../src/storage/ids.ts';
import { START } from './some-books.ts';

describe('ids', () => {
	it('sort as they were made, also within one millisecond and when the clock is set back', () => {
		const times = [START, START, START, START + 1, START - 9_999, START + 5, START + 5];
		const ids = Array.from({ length: 700 }, (_, n) => newId(times[Math.floor(n / 100)]!));
		expect([...ids].sort()).toEqual(ids);
		expect(new Set(ids).size).toBe(700);
		for (const id of ids) expect(id).toMatch(/^[0-9A-HJKMNP-TV-Z]{26}$/);
	});
	it('begin with their time, so that those of two devices sort too', () => {
		const far = START + 1_000_000;
		const [a, b] = [newId(far), newId(far + 1_000)];
		expect(a.slice(0, 10) < b.slice(0, 10)).toBe(true);
		const seen = [...a.slice(0, 10)].reduce((sum, digit) => sum * 32 + '0123456789ABCDEFGHJKMNPQRSTVWXYZ'.indexOf(digit), 0);
		expect(seen).toBe(far);
	});
	it('of the records of one act keep their order up to any number', () => {
		const ids = Array.from({ length: 40_000 }, (_, n) => recordId('act', n));
		expect([...ids].sort()).toEqual(ids);
		expect(recordId('act', 0)).toBe('act-0000');
	});
});
