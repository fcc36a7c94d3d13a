import { fail, ok, type Result } from '../number/result.ts';
import { deductionWord, karatOnly, type Amount } from './line-amounts.ts';
import { isStamp } from './line-mark.ts';
import type { LineProblem } from './line-problem.ts';
import type { Token } from './line-tokens.ts';

/**
 * Tells karats from carats. "18ct ring 5 g": the only such figure of a line, up to 24 and with no other mark, is karats.
 * "14k ring 3 g 0.5 ct diamond": beside a word for stones, or behind a minus, it is carats of stones that are taken off.
 * Everything else is asked about. Returns the amounts without those that are karats.
 */
export function readCarats(tokens: readonly Token[], amounts: readonly Amount[], line: string): Result<Amount[], LineProblem> {
	const carats = amounts.filter(({ unit, off }) => unit === 'ct' && !off);
	if (carats.length === 0) return ok([...amounts]);
	const claimed = new Set(amounts.map(({ start }) => start));
	const otherMark = tokens.some(
		(token, at) =>
			(token.kind === 'number' && !claimed.has(token.start) && isStamp(token.text)) ||
			(token.kind === 'word' && karatOnly.test(token.text) && tokens[at - 1]?.kind === 'number') ||
			(token.kind === 'word' && /^(?:sterling|britannia|au|ag|pt|pd)$/i.test(token.text))
	);
	const karats = (amount: Amount) => Number(amount.typed.replace(',', '.')) <= 24;
	const stones = (amount: Amount): boolean => amount.what === 'stones' || deductionWord(tokens[amount.from - 1]) === 'stones';
	const unclear = ({ start, end }: Amount) =>
		fail<LineProblem>({ kind: 'line-carat-unclear', start, end, found: line.slice(start, end) });
	const [only] = carats;
	if (carats.length === 1 && only !== undefined && !otherMark) {
		return karats(only) ? ok(amounts.filter((amount) => amount !== only)) : unclear(only);
	}
	const loose = carats.filter((amount) => !stones(amount));
	const [karat] = loose;
	if (loose.length > (otherMark ? 0 : 1)) return unclear(loose.at(-1)!);
	if (karat === undefined && !otherMark) return unclear(carats[0]!);
	if (karat !== undefined && !karats(karat)) return unclear(karat);
	return ok(
		amounts
			.filter((amount) => amount !== karat)
			.map((amount) => (carats.includes(amount) ? { ...amount, off: true, what: 'stones' } : amount))
	);
}
