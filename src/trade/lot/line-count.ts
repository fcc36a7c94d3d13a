import { fail, ok, type Result } from '../number/result.ts';
import { isTimes, type Amount } from './line-amounts.ts';
import { isStamp } from './line-mark.ts';
import type { LineProblem } from './line-problem.ts';
import type { Token } from './line-tokens.ts';

/** How many pieces an entry is of, as typed. */
export type Count = {
	readonly start: number;
	readonly end: number;
	readonly typed: string;
	readonly from: number;
	readonly to: number;
};

const PIECES = /^(?:pcs?|pces?|pieces?|items?)$/i;
const QUANTITY = /^(?:qty|quantity|count)$/i;

/**
 * Counts that are said to be one: "x3", "3x", "3 pcs", "qty 3". "3 x 12.4 g" is asked about: each, or together?
 * "12.4 g x 3" is one mass of three pieces.
 */
export function readCounts(
	tokens: readonly Token[],
	free: (at: number) => boolean,
	amounts: readonly Amount[],
	line: string
): Result<Count[], LineProblem> {
	const found: Count[] = [];
	const taken = new Set<number>();
	const number = (at: number) => free(at) && !taken.has(at) && tokens[at]!.kind === 'number';
	const add = (figure: number, from: number, to: number) => {
		const { start, end, text } = tokens[figure]!;
		found.push({ start, end, typed: text, from, to });
		for (let at = from; at <= to; at += 1) taken.add(at);
	};
	for (const [at, token] of tokens.entries()) {
		if (isTimes(token)) {
			// what a mass stands on the right of: "3 x 12.4 g"
			const massAfter = amounts.some(({ start }) => start === tokens[at + 1]?.start);
			const bareAfter = number(at + 1) && !isStamp(tokens[at + 1]!.text) && !karatFollows(tokens, at + 1);
			const whole = (place: number) => number(place) && /^\d+$/.test(tokens[place]!.text);
			if (number(at - 1) && (massAfter || bareAfter)) {
				// "5.2 x 3", "925 x3" and "5 x3" leave no doubt which of the two is the count
				const suffix = !token.glued && tokens[at + 1]!.glued;
				const decimals = bareAfter && whole(at + 1) && (!whole(at - 1) || suffix || isStamp(tokens[at - 1]!.text));
				if (!decimals) {
					const end = massAfter ? amounts.find(({ start }) => start === tokens[at + 1]!.start)!.end : tokens[at + 1]!.end;
					const start = tokens[at - 1]!.start;
					return fail({ kind: 'line-times-unclear', start, end, found: line.slice(start, end) });
				}
				add(at + 1, at, at + 1);
			} else if (number(at - 1) && !amounts.some(({ to }) => to === at - 1)) add(at - 1, at - 1, at);
			else if (number(at + 1)) add(at + 1, at, at + 1);
		} else if (token.kind === 'word' && PIECES.test(token.text) && number(at - 1)) add(at - 1, at - 1, at);
		else if (token.kind === 'word' && QUANTITY.test(token.text) && number(at + 1)) add(at + 1, at, at + 1);
	}
	return ok(found);
}

function karatFollows(tokens: readonly Token[], at: number): boolean {
	const next = tokens[at + 1];
	return next?.kind === 'word' && /^(?:k|ct|karat|carat)/i.test(next.text);
}
