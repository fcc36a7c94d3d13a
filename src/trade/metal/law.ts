import { compareExact, EXACT_ZERO, exact, minus, ratio, times, type Exact } from '../number/exact.ts';
import { decimal } from '../number/decimal.ts';
import { fromPerMille, type Fineness } from './fineness.ts';
import type { MetalId } from './metals.ts';

/**
 * What a stamp promises by law. 'minimum': no minus tolerance (United Kingdom, the Convention, ISO 9202); 'us-1981': the
 * National Stamping Act for articles made from 1 October 1981 on; 'us-before-1981': the same Act before that day.
 */
export type LawId = 'minimum' | 'us-1981' | 'us-before-1981';

/** With solder the whole article is judged, solder and all. */
export type LegalArticle = { readonly solder: boolean; readonly watchCaseOrFlatware: boolean };

const karat = ratio(1000n, 24n);
const perMille = (n: bigint) => exact(n);

/**
 * The least fineness that an article may have and still be lawfully stamped.
 * formula: mark minus tolerance. Gold since 1981: 3 ‰; with solder 7 ‰, but 3 ‰ for watch cases and flatware. Gold before:
 * half a karat (watch cases and flatware 3 ‰); with solder one karat. Silver: 4 ‰; with solder 10 ‰. Other metals and the
 * 'minimum' law: nothing off.
 * rounding: none; never below zero.
 * source: 15 U.S.C. 295 and its notes on Pub. L. 94-450 (gold); 15 U.S.C. 296 (silver), from memory; Hallmarking Act 1973 Sch. 2.
 */
export function legalMinimum(
	content: { readonly metal: MetalId; readonly fineness: Fineness },
	law: LawId,
	article: LegalArticle
): Fineness {
	const lowest = minus(content.fineness.perMille, tolerance(content.metal, law, article));
	return { perMille: compareExact(lowest, EXACT_ZERO) < 0 ? EXACT_ZERO : lowest };
}

function tolerance(metal: MetalId, law: LawId, { solder, watchCaseOrFlatware }: LegalArticle): Exact {
	if (law === 'minimum') return EXACT_ZERO;
	if (metal === 'Ag') return perMille(solder ? 10n : 4n);
	if (metal !== 'Au') return EXACT_ZERO;
	if (law === 'us-1981') return perMille(solder && !watchCaseOrFlatware ? 7n : 3n);
	if (solder) return karat;
	return watchCaseOrFlatware ? perMille(3n) : times(karat, ratio(1n, 2n));
}

const list = (...marks: string[]): readonly Fineness[] => marks.map((mark) => fromPerMille(decimal(mark)));

/** The millesimal marks of the Convention's common control mark, lowest first. */
export const controlMarks: Readonly<Partial<Record<MetalId, readonly Fineness[]>>> = {
	Au: list('375', '585', '750', '916', '999'),
	Ag: list('800', '830', '925', '999'),
	Pt: list('850', '900', '950', '999'),
	Pd: list('500', '950', '999')
};

/**
 * The highest millesimal mark that an article of this fineness may take.
 * formula: the largest mark not above the fineness; null under the lowest mark.
 * rounding: down to a mark, because a fineness is a minimum.
 * source: Tukes (Finland), fineness requirements (588 ‰ takes 585, 584 ‰ takes 375); the Convention's list of marks, from memory.
 */
export function largestMark(fineness: Fineness, metal: MetalId = 'Au'): Fineness | null {
	const fitting = (controlMarks[metal] ?? []).filter((mark) => compareExact(mark.perMille, fineness.perMille) <= 0);
	return fitting.at(-1) ?? null;
}
