import { decimal } from '$trade/number/decimal.ts';
import type { Deduction } from '$trade/piece/deduction.ts';
import type { StoneSize } from '$trade/piece/stones.ts';
import type { PieceForm } from './piece-form.ts';

/** The form as JSON makes it: decimals write themselves as text. */
type Written = Omit<PieceForm, 'deductions'> & {
	readonly deductions: readonly (Omit<Deduction, 'mass' | 'stones'> & {
		readonly mass: { readonly grams: string };
		readonly stones?: Omit<StoneSize, 'length' | 'width' | 'depth' | 'gravity'> &
			Record<'length' | 'width' | 'depth' | 'gravity', string>;
	})[];
};

/** A half-changed piece as the text of a draft. */
export function draftOf(form: PieceForm): string {
	return JSON.stringify(form);
}

/** The form that a draft holds; null when it holds none. Only this app writes drafts, and each release reads its own. */
export function readDraft(text: string): PieceForm | null {
	if (text === '') return null;
	try {
		const written = JSON.parse(text) as Written;
		return {
			...written,
			deductions: written.deductions.map(({ mass, stones, ...rest }): Deduction => {
				const held = { ...rest, mass: { grams: decimal(mass.grams) } };
				if (stones === undefined) return held;
				const { length, width, depth, gravity } = stones;
				const sizes = { length: decimal(length), width: decimal(width), depth: decimal(depth), gravity: decimal(gravity) };
				return { ...held, stones: { ...stones, ...sizes } };
			})
		};
	} catch {
		// a draft of an older release that reads otherwise: the piece itself is untouched
		return null;
	}
}
