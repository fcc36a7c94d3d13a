import { describe, expect, it } from 'vitest';
import { parseLine } from '$trade/lot/line.ts';
import { exactToText } from '$trade/number/exact.ts';
import type { Piece } from '$trade/piece/piece.ts';
import { draftOf, readDraft } from '../../src/routes/piece-draft.ts';
import { contentsOfMark, formOf, pieceOf } from '../../src/routes/piece-form.ts';

const options = { mark: 'dot', scale: null } as const;
const piece = (line: string): Piece => {
	const read = parseLine(line);
	if (!read.ok) throw new Error(`${line}: ${read.problem.kind}`);
	return read.value;
};
const lines = ['14k chain 12.4g x3', '18k ring 5.20 g - 0.35 g stones', 'dental Au 625 Pd 180 Ag 120 4.12 g', '1/20 14k gf chain 9.1 g', 'sovereign x2'];

describe('a piece in its form', () => {
	it.each(lines)('%s comes back as it was when nothing is touched', (line) => {
		const held = piece(line);
		expect(pieceOf(formOf(held), held, options)).toEqual({ piece: held, problems: [] });
	});

	it.each(lines)('%s survives as a draft', (line) => {
		const form = formOf(piece(line));
		expect(readDraft(draftOf(form))).toEqual(form);
	});

	it('keeps the weighing with its scale until the mass is typed anew', () => {
		const held = piece('14k ring 5.20 g');
		const typed = pieceOf({ ...formOf(held), typed: '5,25' }, held, options);
		expect(typed.piece?.weighing).toMatchObject({ typed: '5,25', unit: 'g' });
	});

	it('takes the metals of a new mark, and a fineness as typed', () => {
		const held = piece('14k ring 5.20 g');
		const contents = contentsOfMark('585')!;
		const changed = pieceOf({ ...formOf(held), mark: '585', contents }, held, options);
		expect(changed.piece?.contents.map(({ taken }) => exactToText(taken.perMille))).toEqual(['585']);
		const lower = pieceOf({ ...formOf(held), contents: [{ metal: 'Au', text: '575', kept: null }] }, held, options);
		expect(lower.piece?.contents.map(({ taken }) => exactToText(taken.perMille))).toEqual(['575']);
		expect(contentsOfMark('no such mark')).toBeNull();
	});

	it('says everything that is wrong, each at its field', () => {
		const held = piece('14k ring 5.20 g');
		const wrong = pieceOf({ ...formOf(held), typed: 'x', mark: '??', contents: [{ metal: 'Au', text: '', kept: null }] }, held, options);
		expect(wrong.piece).toBeNull();
		expect(wrong.problems.map(({ field }) => field)).toEqual(['mass', 'mark', 'contents']);
		const over = pieceOf({ ...formOf(held), contents: [{ metal: 'Au', text: '700', kept: null }, { metal: 'Ag', text: '400', kept: null }] }, held, options);
		expect(over.problems.map(({ field, problem }) => [field, problem.kind])).toEqual([['piece', 'piece-contents-over-1000']]);
	});
});
