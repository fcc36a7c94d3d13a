import { expect, it } from 'vitest';
import { mendable, withMended } from '../../src/routes/mend-rows.ts';
import { readTable } from '../../src/trade/lot/table.ts';

const text = 'mass;unit;mark;article\n5,20;g;585;ring\nx;g;585;ring\n3;dwt;925;fork\n8;oz;925;spoon';

it('keeps the refused rows under their headings, and nothing else', () => {
	const table = readTable(text);
	expect(table.taken.map(({ row }) => row)).toEqual([2, 4]);
	expect(mendable(text, table)).toBe('mass;unit;mark;article\nx;g;585;ring\n8;oz;925;spoon');
});

it('takes the rest once it is mended, and then nothing is left', () => {
	const left = mendable(text, readTable(text));
	const mended = withMended(withMended(left, { row: 2 }, '4,10;g;585;ring'), { row: 3 }, '8;ozt;925;spoon');
	const table = readTable(mended);
	expect(table.refused).toEqual([]);
	expect(table.taken.map(({ piece }) => piece.weighing.typed)).toEqual(['4,10', '8']);
	expect(mendable(mended, table)).toBe('');
});

it('keeps lines without headings as they are', () => {
	const lines = '14k ring 5 g\nnonsense\r\n925 8 dwt';
	expect(mendable(lines, readTable(lines))).toBe('nonsense');
});
