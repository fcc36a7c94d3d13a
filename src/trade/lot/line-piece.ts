import { decimal, type Decimal } from '../number/decimal.ts';
import { reduce } from '../number/exact.ts';
import { fail, ok, type Result } from '../number/result.ts';
import type { Mass } from '../mass/mass.ts';
import { toMass } from '../mass/units.ts';
import { massOf, weighing, type Weighing } from '../mass/weighing.ts';
import type { Coin } from '../metal/coins.ts';
import type { Mark } from '../metal/mark.ts';
import { metals } from '../metal/metals.ts';
import type { Origin } from '../evidence/origin.ts';
import { articleClass } from '../piece/class.ts';
import { fillerByDefault, statedDeduction, type Deduction } from '../piece/deduction.ts';
import { lossClassFor } from '../piece/loss-class.ts';
import { checkPiece, type Content, type Piece } from '../piece/piece.ts';
import { endingFraction, readNumber, type Amount } from './line-amounts.ts';
import type { Count } from './line-count.ts';
import { splitLine } from './line-tokens.ts';
import type { LineOptions, LineProblem, Place } from './line-problem.ts';

/** Everything that was found in a line, before it is a piece. */
export type Findings = {
	readonly line: string;
	readonly article: string;
	readonly amounts: readonly Amount[];
	readonly counts: readonly Count[];
	readonly unsure: Place | null;
	readonly mark: Mark | null;
	readonly coin: { readonly coin: Coin; readonly place: Place } | null;
	readonly options: LineOptions;
};

/** What the note says when coins were counted and not weighed. */
export const LEGAL_MASS_NOTE = 'legal mass, not weighed';

const PERCENT = decimal('100');
/** A coin with its mount, or another count than said, is further off than any wear. */
const COIN_TOLERANCE = decimal('0.06');

export function makePiece(found: Findings): Result<Piece, LineProblem> {
	const { line, mark, coin, options } = found;
	if (mark === null && coin === null) return fail({ kind: 'line-mark-missing', words: found.article });
	const count = readCount(found);
	if (!count.ok) return count;
	const gross = readGross(found, count.value);
	if (!gross.ok) return gross;
	const deductions = readDeductions(found, massOf(gross.value), mark);
	if (!deductions.ok) return deductions;
	const { origin, note } = splitLine(line);
	const contents = contentsOf(mark, coin?.coin ?? null);
	const noted = [note, coin !== null && gross.value.scale === null && !weighed(found) ? LEGAL_MASS_NOTE : ''];
	const stonesOff = deductions.value.some(({ what }) => what === 'stones');
	const piece = checkPiece({
		article: found.article,
		count: count.value,
		weighing: gross.value,
		mark: origin === 'unmarked' ? '' : (mark?.text ?? ''),
		origin: origin ?? options.origin ?? usualOrigin(mark, found.article),
		contents,
		deductions: deductions.value,
		lossClass: lossClassFor(found.article, contents, stonesOff),
		moreThanMelt: false,
		note: noted.filter((text) => text !== '').join('; '),
		photos: []
	});
	return piece.ok ? piece : fail({ kind: 'line-piece', problem: piece.problem });
}

/** In lowest terms, so that a piece reads back as the same from any text. */
export function contentsOf(mark: Mark | null, coin: Coin | null): Content[] {
	return (mark ?? coin)?.contents.map(({ metal, fineness }) => ({ metal, taken: { perMille: reduce(fineness.perMille) } })) ?? [];
}

/**
 * Where a piece is taken to come from when nobody says: a karat or named mark a modern US stamp, figures a market without
 * control, a coin from its mint, a bar from a stranger, and metal without a stamp unmarked.
 * source: common practice, no source (a working default).
 */
export function usualOrigin(mark: Mark | null, article: string): Origin {
	const kind = articleClass(article);
	if (mark === null || kind === 'coin') return 'hallmarked';
	if (kind === 'bar') return 'stranger-bar';
	if (!mark.contents.some(({ metal }) => metals[metal].precious) && mark.kind === 'named') return 'unmarked';
	if (mark.contents.length > 1 || kind === 'dental' || kind === 'lemel') return 'unmarked';
	return mark.kind === 'millesimal' ? 'uncontrolled' : 'us-modern';
}

const weighed = ({ amounts }: Findings) => amounts.some(({ off }) => !off);

function place(line: string, { start, end }: { start: number; end: number }): Place {
	return { start, end, found: line.slice(start, end) };
}

/** The number of an amount without its unit. */
function figure({ start, typed }: Amount): Place {
	return { start, end: start + typed.length, found: typed };
}

function readCount({ line, counts, options }: Findings): Result<number, LineProblem> {
	const [first, second] = counts;
	if (first === undefined) return ok(1);
	if (second !== undefined) return fail({ kind: 'line-two-counts', first: place(line, first), second: place(line, second) });
	const count = readNumber(first.typed, first.start, first.end, options.mark, true);
	return count.ok ? ok(count.value.toNumber()) : count;
}

function readGross(found: Findings, count: number): Result<Weighing, LineProblem> {
	const { line, coin, options } = found;
	const masses = grossAmounts(found.amounts);
	const [first, second] = masses;
	if (first !== undefined && second !== undefined) {
		return fail({ kind: 'line-two-masses', first: place(line, first), second: place(line, second) });
	}
	if (first === undefined) {
		const [takenOff] = found.amounts;
		if (takenOff !== undefined) return fail({ kind: 'line-mass-missing', unsure: place(line, takenOff) });
		if (coin === null) return fail({ kind: 'line-mass-missing', unsure: found.unsure });
		const total = coin.coin.mass.grams.times(count);
		return ok({ typed: total.toFixed(), reading: total, unit: 'g', division: null, scale: null, repeats: [], tare: null });
	}
	const unit = first.unit ?? options.unit ?? 'g';
	const own = unit === (options.unit ?? 'g');
	const typed = first.typed.includes('/') ? (endingFraction(first.typed) ?? first.typed) : first.typed;
	const read = weighing(typed, unit, {
		mark: options.mark,
		division: own ? options.division : null,
		scale: options.scale?.unit === unit ? options.scale : null
	});
	if (!read.ok) {
		if (read.problem.kind === 'mass-tare-not-less') return fail({ kind: 'line-mass-missing', unsure: place(line, first) });
		return fail({ kind: 'line-number', ...figure(first), problem: read.problem });
	}
	if (coin !== null) {
		const [legal, given] = [coin.coin.mass.grams.times(count), massOf(read.value).grams];
		if (given.minus(legal).abs().gt(legal.times(COIN_TOLERANCE))) {
			return fail({ kind: 'line-coin-mass', ...coin.place, coin: coin.coin.name, count, legal, given });
		}
	}
	return read;
}

/** Without a minus, an amount beside a word for stones and the like is still the mass if it is the only one. */
function grossAmounts(amounts: readonly Amount[]): Amount[] {
	const plain = amounts.filter(({ off }) => !off);
	if (plain.length !== 2) return plain;
	const named = plain.filter(({ what }) => what !== null);
	return named.length === 1 ? plain.filter(({ what }) => what === null) : plain;
}

function readDeductions({ line, amounts, options }: Findings, gross: Mass, mark: Mark | null): Result<Deduction[], LineProblem> {
	const taken = grossAmounts(amounts);
	const deductions: Deduction[] = [];
	for (const amount of amounts.filter((each) => !taken.includes(each))) {
		const number = readNumber(amount.typed, amount.start, figure(amount).end, options.mark);
		if (!number.ok) return number;
		const mass: Mass = amount.unit === null ? share(gross, number.value) : toMass(number.value, amount.unit);
		deductions.push(statedDeduction(amount.what ?? 'other', mass, line.slice(amount.start, amount.end)));
	}
	if (mark?.text.startsWith('weighted') === true && !deductions.some(({ what }) => what === 'filler')) {
		deductions.push(fillerByDefault(gross));
	}
	return ok(deductions);
}

function share(gross: Mass, percent: Decimal): Mass {
	return { grams: gross.grams.times(percent).div(PERCENT) };
}
