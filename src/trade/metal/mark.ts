import { decimal, type Decimal } from '../number/decimal.ts';
import { ratio, times } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import { compareFineness, fromKarat, fromPerMille, fromShare, perMilleNumber, shareOf, type Fineness } from './fineness.ts';
import { alloyNames, coatedWords, filledWords, fineWords, phrases, rolledWords, silverNames, weightedWords } from './mark-words.ts';
import { readTokens, type Tokens } from './mark-tokens.ts';
import type { MetalId } from './metals.ts';
import { metalsOfStamp, stampsOf } from './stamps.ts';

/** What a stamp claims: the normalised text and the metals it promises, per thousand of the whole article. */
export type Mark = {
	readonly text: string;
	readonly kind: 'karat' | 'millesimal' | 'named' | 'filled' | 'plated';
	readonly contents: readonly MarkContent[];
};
export type MarkContent = { readonly metal: MetalId; readonly fineness: Fineness };

export type MarkProblem =
	| { readonly kind: 'mark-missing' }
	| { readonly kind: 'mark-unknown'; readonly text: string }
	/** Karats that no maker strikes, such as 15.5. */
	| { readonly kind: 'mark-karat-unknown'; readonly text: string; readonly karats: string; readonly nearest: readonly string[] }
	| { readonly kind: 'mark-karat-over-24'; readonly text: string; readonly karats: string }
	/** Karats beside a metal that is not gold. */
	| { readonly kind: 'mark-karat-not-gold'; readonly text: string; readonly metal: MetalId }
	| { readonly kind: 'mark-over-whole'; readonly text: string; readonly perMille: string }
	/** Figures that are no usual stamp, with no metal beside them. */
	| { readonly kind: 'mark-figures-unknown'; readonly text: string; readonly figures: string }
	| { readonly kind: 'mark-metal-ambiguous'; readonly text: string; readonly figures: string; readonly choices: readonly string[] }
	| { readonly kind: 'mark-fineness-missing'; readonly text: string; readonly metal: MetalId; readonly choices: readonly string[] }
	| { readonly kind: 'mark-layer-share-missing'; readonly text: string; readonly choices: readonly string[] }
	/** Stamps that say different things, such as 14k and 925: two parts, each to be weighed alone. */
	| { readonly kind: 'mark-two-marks'; readonly text: string; readonly marks: readonly string[] };

type Answer = Result<Mark, MarkProblem>;
const LONGEST = 60;

/**
 * A stamp as people type it: "14k", "K14", "585", ".925", "sterling", "Pt950", "1/20 14K GF", "weighted sterling", "vermeil", "brass".
 * formula: karats / 24; figures as struck in parts per thousand ("916" is 916, never 916.6: see stamps.ts); a filled mark is
 * layer share x karats / 24 of the whole; a coating promises only its base, if the stamp names one.
 * rounding: none; "14k" is 14/24 and "585" is 585, two claims.
 * source: Hallmarking Act 1973 Sch. 2; 16 CFR 23.3 to 23.7; ISO 9202, from memory; words in common practice, no source.
 */
export function parseMark(text: string): Answer {
	const shown = text.trim().replace(/\s+/g, ' ');
	if (shown === '') return fail({ kind: 'mark-missing' });
	if (shown.length > LONGEST) return fail({ kind: 'mark-unknown', text: `${shown.slice(0, LONGEST)}…` });
	const lower = shown.toLowerCase();
	const base = alloyNames.get(lower);
	if (base !== undefined) {
		const contents = base.shares.map(({ metal, share }) => ({ metal, fineness: fromShare(share) }));
		return ok({ text: base.name, kind: 'named', contents });
	}
	const tokens = readTokens(phrases.get(lower)?.toLowerCase() ?? lower);
	if (tokens === null) return fail({ kind: 'mark-unknown', text: shown });
	const has = (words: ReadonlySet<string>) => tokens.words.some((word) => words.has(word));
	if (tokens.fraction !== null || has(filledWords)) return filled(shown, tokens);
	if (has(rolledWords) || tokens.words.some((word) => coatedWords.has(word))) return coated(shown, tokens);
	const several = alloyed(shown, tokens);
	if (several !== null) return several;
	const solid = one(shown, tokens);
	if (!solid.ok || !has(weightedWords)) return solid;
	const [content] = solid.value.contents;
	if (content === undefined || content.metal !== 'Ag') return fail({ kind: 'mark-unknown', text: shown });
	return ok({ text: `weighted ${figuresOf(content.fineness)}`, kind: 'named', contents: [content] });
}

/** "1/20 14k GF": the layer's share of the whole times its fineness. */
function filled(shown: string, tokens: Tokens): Answer {
	const layer = one(shown, { ...tokens, fraction: null, words: tokens.words.filter((word) => !layerWord(word)) });
	if (tokens.fraction === null) {
		const stamp = layer.ok ? layer.value.text : '14 kt';
		return fail({ kind: 'mark-layer-share-missing', text: shown, choices: ['1/20', '1/10', '1/40'].map((share) => `${share} ${stamp}`) });
	}
	const { n, d } = tokens.fraction;
	// a layer above an eighth is believed only with a word that says it is a layer
	if (n < 1n || d < 1n || n >= d || (n * 8n > d && !tokens.words.some(layerWord))) return fail({ kind: 'mark-unknown', text: shown });
	if (!layer.ok) {
		if (layer.problem.kind !== 'mark-fineness-missing' && layer.problem.kind !== 'mark-unknown') return layer;
		if (!tokens.words.some(layerWord)) return fail({ kind: 'mark-unknown', text: shown });
		return fail({
			kind: 'mark-fineness-missing', text: shown, metal: 'Au', choices: ['10', '12', '14', '18'].map((k) => `${n}/${d} ${k} kt`)
		});
	}
	const [content] = layer.value.contents;
	const named = tokens.words.includes('gf') ? 'Au' : tokens.words.includes('sf') ? 'Ag' : content?.metal;
	if (content === undefined || content.metal !== named) return fail({ kind: 'mark-unknown', text: shown });
	const fineness = fromShare(times(ratio(n, d), shareOf(content.fineness)));
	return ok({ text: `${n}/${d} ${layer.value.text}`, kind: 'filled', contents: [{ metal: content.metal, fineness }] });
}

function layerWord(word: string): boolean {
	return filledWords.has(word) || rolledWords.has(word) || word === 'plate' || word === 'plated';
}

/** A coating: its own metal goes by area and thickness (plated.ts); only sterling under gold is counted here. */
function coated(shown: string, tokens: Tokens): Answer {
	const names = tokens.words.flatMap((word) => coatedWords.get(word) ?? []);
	const gold = tokens.metals.includes('Au') || tokens.karats.length > 0;
	const silver = tokens.metals.includes('Ag');
	const onSterling = tokens.words.some((word) => silverNames.get(word) === '925') || tokens.figures.some((figure) => figure.equals(925));
	const sterling: readonly MarkContent[] = [{ metal: 'Ag', fineness: fromPerMille(decimal('925')) }];
	const plated = (text: string, contents: readonly MarkContent[] = []): Answer => ok({ text, kind: 'plated', contents });
	if (names.includes('vermeil')) return plated('vermeil', sterling);
	if (tokens.words.some((word) => rolledWords.has(word))) return plated('rolled gold plate');
	if (names.includes('silver plated')) return plated('silver plated');
	for (const name of ['heavy gold electroplate', 'gold electroplate']) {
		if (!names.includes(name)) continue;
		if (name === 'gold electroplate' && silver && !gold) return plated('silver plated');
		return onSterling ? plated('gold plated 925', sterling) : plated(name);
	}
	if (gold || names.includes('gold plated')) return onSterling ? plated('gold plated 925', sterling) : plated('gold plated');
	if (onSterling) return fail({ kind: 'mark-unknown', text: shown });
	return plated(silver ? 'silver plated' : 'plated');
}

/** "Au 625 Pd 180 Ag 120": as many metals as figures, at least two of each; null when the stamp is not of that form. */
function alloyed(shown: string, { metals, figures, karats, words }: Tokens): Answer | null {
	if (metals.length < 2 || metals.length !== figures.length || karats.length > 0 || words.length > 0) return null;
	if (new Set(metals).size !== metals.length) return fail({ kind: 'mark-unknown', text: shown });
	const whole = figures.reduce((total, figure) => total.plus(figure), decimal('0'));
	if (whole.gt(1000)) return fail({ kind: 'mark-over-whole', text: shown, perMille: whole.toString() });
	const contents = metals.map((metal, index) => ({ metal, fineness: fromPerMille(figures[index]!) }));
	return ok({ text: contents.map(({ metal, fineness }) => `${metal} ${figuresOf(fineness)}`).join(' '), kind: 'millesimal', contents });
}

/** One metal, stamped once or twice; two stamps must agree within 3 ‰ and the lower one is taken. */
function one(shown: string, { metals, figures, karats: struck, words, plumb }: Tokens): Answer {
	if (new Set(metals).size > 1) return fail({ kind: 'mark-unknown', text: shown });
	const metal = metals[0] ?? null;
	const answers: Answer[] = struck.map((karat) => karatMark(shown, karat, metal, plumb));
	for (const word of words) {
		const named = silverNames.get(word);
		if (named !== undefined) answers.push(silverNamed(shown, named, metal));
	}
	answers.push(...figures.map((figure) => millesimal(shown, figure, silverIn(words) ? 'Ag' : metal)));
	if (answers.length === 0) {
		if (metal === null) return fail({ kind: 'mark-unknown', text: shown });
		if (words.some((word) => fineWords.has(word))) {
			const contents = [{ metal, fineness: fromPerMille(decimal('999')) }];
			return ok({ text: `${metal} 999`, kind: 'millesimal', contents });
		}
		const karats = metal === 'Au' ? ['10 kt', '14 kt', '18 kt'] : [];
		const choices = [...karats, ...stampsOf(metal).map((figure) => millesimalText(metal, figure))];
		return fail({ kind: 'mark-fineness-missing', text: shown, metal, choices });
	}
	const marks: Mark[] = [];
	for (const answer of answers) {
		if (!answer.ok) return answer;
		marks.push(answer.value);
	}
	const lowest = marks.reduce((low, mark) => (compareFineness(finenessOf(mark), finenessOf(low)) < 0 ? mark : low));
	const agree = marks.every(
		(mark) =>
			mark.contents[0]!.metal === lowest.contents[0]!.metal &&
			perMilleNumber(finenessOf(mark)) - perMilleNumber(finenessOf(lowest)) <= 3
	);
	return agree ? ok(lowest) : fail({ kind: 'mark-two-marks', text: shown, marks: marks.map((mark) => mark.text) });
}

const finenessOf = (mark: Mark): Fineness => mark.contents[0]!.fineness;
const silverIn = (words: readonly string[]): boolean => words.some((word) => silverNames.has(word));

/** The karats that are struck: whole ones from 6 to 24, and the Portuguese 19.2 (800 ‰) and 21.6 (900 ‰). */
function karatMark(shown: string, karats: Decimal, metal: MetalId | null, plumb: boolean): Answer {
	const written = karats.toString();
	if (karats.gt(24)) return fail({ kind: 'mark-karat-over-24', text: shown, karats: written });
	if (metal !== null && metal !== 'Au') return fail({ kind: 'mark-karat-not-gold', text: shown, metal });
	const struck = (karats.isInteger() && karats.gte(6)) || karats.equals(decimal('19.2')) || karats.equals(decimal('21.6'));
	if (!struck) {
		const nearest = karats.lt(6) ? ['6 kt', '8 kt', '9 kt'] : [`${karats.floor().toString()} kt`, `${karats.ceil().toString()} kt`];
		return fail({ kind: 'mark-karat-unknown', text: shown, karats: written, nearest });
	}
	return ok({ text: `${written} kt${plumb ? ' plumb' : ''}`, kind: 'karat', contents: [{ metal: 'Au', fineness: fromKarat(karats) }] });
}

function silverNamed(shown: string, perMille: string, metal: MetalId | null): Answer {
	if (metal !== null && metal !== 'Ag') return fail({ kind: 'mark-unknown', text: shown });
	const text = perMille === '925' ? 'sterling' : perMille === '900' ? 'coin' : 'britannia';
	return ok({ text, kind: 'named', contents: [{ metal: 'Ag', fineness: fromPerMille(decimal(perMille)) }] });
}

function millesimal(shown: string, figure: Decimal, metal: MetalId | null): Answer {
	const figures = figure.toString();
	if (figure.gt(1000)) return fail({ kind: 'mark-over-whole', text: shown, perMille: figures });
	const usual = metalsOfStamp(figures);
	if (metal === null) {
		if (usual === null) return fail({ kind: 'mark-figures-unknown', text: shown, figures });
		if (usual.length > 1) {
			return fail({ kind: 'mark-metal-ambiguous', text: shown, figures, choices: usual.map((of) => millesimalText(of, figures)) });
		}
	}
	// a metal beside it makes any fineness a claim, but "Au 14" is more likely karats than 14 ‰
	const of = metal ?? usual?.[0];
	if (of === undefined || figure.lt(100)) return fail({ kind: 'mark-figures-unknown', text: shown, figures });
	return ok({ text: millesimalText(of, figures), kind: 'millesimal', contents: [{ metal: of, fineness: fromPerMille(figure) }] });
}

/** Figures alone where they mean gold or silver and nothing else; otherwise the metal before them. */
function millesimalText(metal: MetalId, figures: string): string {
	const usual = metalsOfStamp(figures);
	const plain = usual?.length === 1 && usual[0] === metal && (metal === 'Au' || metal === 'Ag');
	return plain ? figures : `${metal} ${figures}`;
}

function figuresOf(fineness: Fineness): string {
	const { n, d } = fineness.perMille;
	return decimal(n.toString()).div(decimal(d.toString())).toString();
}
