import { decimal } from '$trade/number/decimal.ts';
import type { Deduction } from '$trade/piece/deduction.ts';
import type { StoneSize } from '$trade/piece/stones.ts';
import type { PieceForm } from './piece-form.ts';

/** Decimals of a deduction, which a draft holds as text. */
type Written = Omit<PieceForm, 'deductions'> & {
	readonly deductions: readonly (Omit<Deduction, 'mass' | 'stones'> & { grams: string; stones: Record<keyof StoneSize, string> | null })[];
};

/** A half-changed piece as the text of a draft. */
export function draftOf(form: PieceForm): string {
	const written: Written = {
		...form,
		deductions: form.deductions.map(({ what, mass, u, how, stones }) => ({
			what,
			u,
			how,
			grams: mass.grams.toFixed(),
			stones:
				stones === undefined
					? null
					: {
							cut: stones.cut,
							count: String(stones.count),
							length: stones.length.toFixed(),
							width: stones.width.toFixed(),
							depth: stones.depth.toFixed(),
							gravity: stones.gravity.toFixed()
						}
		}))
	};
	return JSON.stringify(written);
}

/** The form that a draft holds; null when it holds none. Only this app writes drafts, and each release reads its own. */
export function readDraft(text: string): PieceForm | null {
	if (text === '') return null;
	try {
		const written = JSON.parse(text) as Written;
		return {
			...written,
			deductions: written.deductions.map(({ what, u, how, grams, stones }): Deduction => {
				const held = { what, u, how, mass: { grams: decimal(grams) } };
				if (stones === null) return held;
				return {
					...held,
					stones: {
						cut: stones.cut as StoneSize['cut'],
						count: Number(stones.count),
						length: decimal(stones.length),
						width: decimal(stones.width),
						depth: decimal(stones.depth),
						gravity: decimal(stones.gravity)
					}
				};
			})
		};
	} catch {
		// a draft of an older release that reads otherwise: the piece itself is untouched
		return null;
	}
}
