import { fail, ok, type Result } from '../number/result.ts';
import { uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import { coinTable, type Coin, type CoinLife } from './coin-table.ts';

export type { Coin, CoinLife };

export type CoinProblem =
	| { readonly kind: 'coin-unknown'; readonly text: string }
	| { readonly kind: 'coin-ambiguous'; readonly text: string; readonly choices: readonly string[] };

export const coins: readonly Coin[] = coinTable;

const byName = new Map<string, Coin[]>();
for (const coin of coins) {
	for (const name of new Set([coin.id.replaceAll('-', ' '), coin.name.toLowerCase(), ...coin.names])) {
		byName.set(name, [...(byName.get(name) ?? []), coin]);
	}
}

/** Every word that stands in the name of a coin: most texts hold none of them, and need no closer look. */
const words: ReadonlySet<string> = new Set([...byName.keys()].flatMap((name) => name.split(' ')));
const mayNameCoin = (text: string): boolean => text.split(' ').some((word) => words.has(word) || (word.endsWith('s') && words.has(word.slice(0, -1))));

/** The coin of an id that was stored; null when it is none of ours. */
export function coinById(id: string): Coin | null {
	return coins.find((coin) => coin.id === id) ?? null;
}

/** A coin by what people call it; a year beside it and the word "coin" are left aside, plurals understood. */
export function findCoin(text: string): Result<Coin, CoinProblem> {
	const shown = text.trim().replace(/\s+/g, ' ').slice(0, 60);
	const whole = shown.toLowerCase().replaceAll('-', ' ');
	if (!mayNameCoin(whole)) return fail({ kind: 'coin-unknown', text: shown });
	const plain = whole
		.replace(/\b(?:1[5-9]|20)\d\d\b/g, ' ')
		.replace(/\bcoins?\b/g, ' ')
		.replace(/\s+/g, ' ')
		.trim();
	const found = byName.get(whole) ?? byName.get(plain) ?? byName.get(plain.replace(/s$/, '')) ?? [];
	const [only] = found;
	if (only === undefined) return fail({ kind: 'coin-unknown', text: shown });
	if (found.length > 1) return fail({ kind: 'coin-ambiguous', text: shown, choices: found.map((coin) => coin.name) });
	return ok(only);
}

/** The share of its mass that a coin has lost, with its standard uncertainty: working defaults, to be replaced by weighing. */
export const wear: Readonly<Record<CoinLife, { readonly lost: number; readonly u: number }>> = {
	bullion: { lost: 0, u: 0.0005 },
	'circulated-gold': { lost: 0.003, u: 0.002 },
	'circulated-silver': { lost: 0.015, u: 0.01 },
	'circulated-base': { lost: 0.01, u: 0.01 }
};

/**
 * What coins weigh after their life, in grams, when they are counted and not weighed.
 * formula: count x legal grams x (1 − share lost); the doubt `wear:<life>` is shared by all coins of that life.
 * rounding: none; an estimate.
 * source: the allowance is a working value of ours, from memory; the least current weight of a sovereign is 0.63 % under the new one.
 */
export function wornMass(coin: Coin, count: number): Uncertain {
	const fresh = count * coin.mass.grams.toNumber();
	const { lost, u } = wear[coin.life];
	return uncertain(fresh * (1 - lost), `wear:${coin.life}`, fresh * u);
}
