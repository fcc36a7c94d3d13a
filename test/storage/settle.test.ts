import { describe, expect, it } from 'vitest';
import { settlement } from '../../src/storage/settle.ts';
import { frozen } from '../trade/record/kinds/frozen.ts';
import { problem, value } from './some-books.ts';

const kept = { ...frozen('lot'), id: 'r2' };
const other = { ...frozen('lot'), id: 'r3', body: null };
const conflict = { subject: 'lot-1', kind: 'lot', winner: 'r2', standing: [kept, other] };

describe('settling a conflict', () => {
	it('lets the kept record stand again and names the others', () => {
		expect(value(settlement(conflict, 'r2'))).toMatchObject({ kind: 'lot', subject: 'lot-1', replaces: 'r2', settles: ['r3'], body: { state: 'open' } });
	});
	it('can keep a deletion', () => {
		expect(value(settlement(conflict, 'r3'))).toMatchObject({ body: null, replaces: 'r2', settles: ['r3'] });
	});
	it('is refused for a record that does not stand, is of a newer kind, or cannot be read', () => {
		const refused = { kind: 'storage-no-such-record' };
		expect(problem(settlement(conflict, 'r9'))).toMatchObject(refused);
		expect(problem(settlement({ ...conflict, kind: 'melt' }, 'r2'))).toMatchObject(refused);
		expect(problem(settlement({ ...conflict, standing: [{ ...kept, body: 7 }] }, 'r2'))).toMatchObject(refused);
	});
});
