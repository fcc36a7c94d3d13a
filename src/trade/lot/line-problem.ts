import type { Decimal } from '../number/decimal.ts';
import type { DecimalMark, NumberProblem } from '../number/field.ts';
import type { Scale } from '../mass/scale.ts';
import type { MassUnitId, UnitProblem } from '../mass/units.ts';
import type { CoinProblem } from '../metal/coins.ts';
import type { MarkProblem } from '../metal/mark.ts';
import type { Origin } from '../evidence/origin.ts';
import type { PieceProblem } from '../piece/piece.ts';

/** Where in the typed line something stands (offsets as in String.slice), and what stands there. */
export type Place = { readonly start: number; readonly end: number; readonly found: string };

/** What can be wrong with a typed line: what was found, where, or what is missing. */
export type LineProblem =
	| { readonly kind: 'line-empty' }
	| { readonly kind: 'line-too-long'; readonly length: number; readonly most: number }
	| ({ readonly kind: 'line-number'; readonly problem: NumberProblem } & Place)
	| ({ readonly kind: 'line-unit'; readonly problem: UnitProblem } & Place)
	| ({ readonly kind: 'line-mark'; readonly problem: MarkProblem } & Place)
	| ({ readonly kind: 'line-coin'; readonly problem: CoinProblem } & Place)
	/** A coin that does not weigh what its name says: a mounted one, or another count. Grams. */
	| ({
			readonly kind: 'line-coin-mass';
			readonly coin: string;
			readonly count: number;
			readonly legal: Decimal;
			readonly given: Decimal;
	  } & Place)
	/** No mass; `unsure` is a number that could be meant as one. */
	| { readonly kind: 'line-mass-missing'; readonly unsure: Place | null }
	| { readonly kind: 'line-mark-missing'; readonly words: string }
	| { readonly kind: 'line-two-masses'; readonly first: Place; readonly second: Place }
	| { readonly kind: 'line-two-counts'; readonly first: Place; readonly second: Place }
	/** "3 x 12.4 g": each or together? */
	| ({ readonly kind: 'line-times-unclear' } & Place)
	| ({ readonly kind: 'line-each' } & Place)
	/** "0.5 ct" that is neither clearly karats nor clearly stones. */
	| ({ readonly kind: 'line-carat-unclear' } & Place)
	| ({ readonly kind: 'line-shares-unclear' } & Place)
	/** "1 234.5 g": one number in groups, or two numbers? */
	| ({ readonly kind: 'line-grouping-unclear'; readonly together: string } & Place)
	| ({ readonly kind: 'line-unexplained' } & Place)
	| { readonly kind: 'line-piece'; readonly problem: PieceProblem };

export type LineOptions = {
	readonly mark?: DecimalMark | undefined;
	/** The unit of a mass without one; grams if not given. */
	readonly unit?: MassUnitId | undefined;
	/** The scale's step, in that unit. */
	readonly division?: Decimal | null | undefined;
	readonly scale?: Scale | null | undefined;
	/** Where pieces come from when the line does not say. */
	readonly origin?: Origin | undefined;
};
