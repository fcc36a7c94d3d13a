import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromBase64, toBase64 } from '../../src/storage/base64.ts';

describe('base64', () => {
	it('reads back any bytes, and is what another program writes', () => {
		fc.assert(
			fc.property(fc.uint8Array({ maxLength: 300 }), (bytes) => {
				expect(toBase64(bytes)).toBe(Buffer.from(bytes).toString('base64'));
				expect([...fromBase64(toBase64(bytes))!]).toEqual([...bytes]);
			}),
			{ numRuns: 1_000 }
		);
	});
	it('takes a large photo', () => {
		const bytes = new Uint8Array(1_500_000).map((_, n) => n % 256);
		expect(Buffer.compare(fromBase64(toBase64(bytes))!, bytes)).toBe(0);
	});
	it.each(['a', 'ab', 'abc', 'ab=c', '====', 'a b=', 'ab-_', 'é===', 'YQ=', 'YR=='])('does not read %j, or reads what it would write', (text) => {
		const read = fromBase64(text);
		if (read !== null) expect(toBase64(read)).toBe(text);
	});
});
