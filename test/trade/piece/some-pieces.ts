import fc from 'fast-check';
import { decimal } from '../../../src/trade/number/decimal.ts';
import { ratio } from '../../../src/trade/number/exact.ts';
import { massUnits, type MassUnitId } from '../../../src/trade/mass/units.ts';
import { metalIds, type MetalId } from '../../../src/trade/metal/metals.ts';
import { origins } from '../../../src/trade/evidence/origin.ts';
import { deductionKinds, type Deduction } from '../../../src/trade/piece/deduction.ts';
import { lossClasses } from '../../../src/trade/piece/loss-class.ts';
import { checkPiece, type Piece } from '../../../src/trade/piece/piece.ts';
import { parseLine } from '../../../src/trade/lot/line.ts';
import { stoneCuts, type StoneSize } from '../../../src/trade/piece/stones.ts';

/** The piece of a typed line, for tests that need a real one. */
export function pieceOf(line: string): Piece {
	const piece = parseLine(line);
	if (!piece.ok) throw new Error(`${line}: ${piece.problem.kind}`);
	return piece.value;
}

const digits = (most: number, places: number) =>
	fc.tuple(fc.bigInt(1n, BigInt(most)), fc.integer({ min: 0, max: places })).map(([n, p]) => {
		const text = n.toString().padStart(p + 1, '0');
		return decimal(p === 0 ? text : `${text.slice(0, -p)}.${text.slice(-p)}`);
	});

/** Words as people and mischief write them: quotes, line breaks, formulas, separators, other scripts. */
const word = fc.oneof(
	fc.constantFrom('ring', 'gold chain', '=1+1', '+7', '-3', '@x', "'", "'=", '\t', '\r', 'a,b', 'x;y', '"', '""', ' a ', 'a\nb', 'Ring "A"', '環', '金の指輪 🙂'),
	fc.string({ maxLength: 8 })
);

const stones: fc.Arbitrary<StoneSize> = fc.record({
	cut: fc.constantFrom(...stoneCuts),
	count: fc.integer({ min: 1, max: 50 }),
	length: digits(20_000, 3),
	width: digits(20_000, 3),
	depth: digits(20_000, 3),
	gravity: fc.constant(decimal('3.52'))
});

const deduction: fc.Arbitrary<Deduction> = fc
	.tuple(
		fc.record({
			what: fc.constantFrom(...deductionKinds),
			mass: digits(3_000, 6).map((grams) => ({ grams: grams.div(1_000) })),
			u: fc.double({ min: 0, max: 5, noNaN: true }).map((u) => u + 0),
			how: word
		}),
		fc.option(stones, { nil: undefined })
	)
	.map(([plain, size]) => (size === undefined ? plain : { ...plain, stones: size }));

const contents = fc
	.uniqueArray(fc.tuple(fc.constantFrom<MetalId>(...metalIds), fc.integer({ min: 0, max: 5_000 }), fc.constantFrom(1n, 3n, 10n, 24n)), {
		selector: ([metal]) => metal,
		maxLength: 4
	})
	.map((list) =>
		list.map(([metal, n, d]) => ({ metal, taken: { perMille: ratio(BigInt(n % (240 * Number(d) + 1)), d) } }))
	)
	.map((list) => list.map(({ metal, taken }) => ({ metal, taken: { perMille: lowest(taken.perMille.n, taken.perMille.d) } })));

/** Lowest terms, as stored text reads back. */
function lowest(n: bigint, d: bigint): { n: bigint; d: bigint } {
	let [a, b] = [n, d];
	while (b !== 0n) [a, b] = [b, a % b];
	return n === 0n ? { n: 0n, d: 1n } : { n: n / a, d: d / a };
}

/** Any piece that may be kept. */
export const anyPiece: fc.Arbitrary<Piece> = fc
	.record({
		article: word,
		count: fc.integer({ min: 1, max: 1_000 }),
		weighing: fc.record({
			typed: fc.oneof(fc.constantFrom('12.30', '12,30', "1'000"), word),
			reading: digits(99_999_999, 4),
			unit: fc.constantFrom<MassUnitId>(...(Object.keys(massUnits) as MassUnitId[])),
			division: fc.option(fc.constantFrom('0.01', '0.1', '1', '0.002').map((text) => decimal(text))),
			scale: fc.option(fc.string({ minLength: 1, maxLength: 8 })),
			repeats: fc.array(digits(99_999_999, 4), { maxLength: 3 }),
			tare: fc.option(digits(99, 4))
		}),
		mark: fc.constantFrom('14 kt', '585', '925', 'weighted 925', '1/20 14 kt', '', 'Au 625 Pd 180 Ag 120'),
		origin: fc.constantFrom(...origins),
		contents,
		deductions: fc.array(deduction, { maxLength: 3 }),
		lossClass: fc.constantFrom(...lossClasses),
		moreThanMelt: fc.boolean(),
		note: word,
		photos: fc.array(fc.string({ minLength: 1, maxLength: 10 }), { maxLength: 2 })
	})
	.filter((piece) => checkPiece(piece).ok);

const perMille = fc.integer({ min: 0, max: 1_000_000 }).map((n) => n / 1000);

/** A piece with something believed of it. */
export const anyTestedPiece: fc.Arbitrary<Piece> = fc
	.tuple(
		anyPiece,
		fc.record({
			metal: fc.constantFrom<MetalId>('Au', 'Ag', 'Pt', 'Cu'),
			mean: perMille,
			low: perMille,
			median: perMille,
			high: perMille,
			odds: fc.constant({ honest: 0.5, under: 0.2, other: 0.1, layered: 0.2 }),
			shared: fc.dictionary(fc.constantFrom('x', 'acids'), fc.double({ min: -20, max: 20, noNaN: true })),
			own: fc.double({ min: 0, max: 300, noNaN: true })
		})
	)
	.map(([piece, belief]) => ({
		...piece,
		evidence: { build: null, findings: [{ kind: 'magnet' as const, id: 'm', at: 0, pull: 'none' as const }], belief, taking: null }
	}));

/** What nobody should type, and somebody will. */
const NASTY = [
	'', ' ', '\t', '\u0000', '\ufeff', '\u202e14k', '12,34', '1.234,5', '1,234', '1.234', '1e9', '1E-9', '-3', '\u22123', '+-3', '--3', '0', '-0', '0.0',
	'00012', '.', ',', '..', '.,', '12..5', '12,,5', '1.2.3', '1,2,3', '12,34,56', '1 234', '1\u00a0234,5', "1'234", '١٢٫٥', '१२', '１２', '½', '²', '⑫', 'Ⅻ', '∞',
	'NaN', 'Infinity', '-Infinity', 'null', 'undefined', '[object Object]', '__proto__', 'constructor', 'toString', 'hasOwnProperty', '0x10', '0b11',
	'1_000', '12n', '9'.repeat(15), '9'.repeat(16), '9'.repeat(400), '0.'.padEnd(60, '0'), '1/0', '0/0', '1/3', '1/20', '20/1', '1000/1', '1//2',
	'oz', 'oz oz', 'gg', 'kgg', 'k', 'kk', 'ct', 'ct ct', '5 ct', '24 ct', '25 ct', '14k14k', '14k 18k', '14', '14%', '140%', '1000', '1001', '999999',
	'x', 'xx', 'x x', 'x0', 'x-1', 'x1.5', 'x1e3', '3x3', '3 x 3', '3x3x3', '×', '×3', '*', '**', 'x99999999', '%', '%%', '-%', '5%', '-5%', '-100%', '-101%',
	'🙂', '⚖️', '👩‍🔬', '\ud800', '\udfff', 'e\u0301', '\u200b', '\u200d', '"', '""', '"""', "'", '=1+1', '@A1', '<script>', '&amp;', '%00', '\\', '\\n',
	';', ';;', ',,,', '\n', '\r\n', '#', '# #', '#14k 5g', '14k # 5 g', 'Au', 'Au Au', 'Au 1000 Ag 1000', 'Au 62 Ag 20', 'In 5', 'C', 'W 100', 'gold', 'silver gold',
	'14k 5 g 5 g', '14k 5 g -5 g', '14k 5 g -6 g', '14k -5 g', '14k 5g-', '14k - 5 g', '14k 5 - 4 g', 'less 5 g', 'less less 14k 5g', '14k 5 g less', '5 g 14',
	'sovereign', 'x0 sovereign', '2 2 sovereign', 'eagle', '1/10 oz', 'half half sovereign', 'sovereign 800 g', 'weighted', 'weighted 14k 5 g', '1/20 5 g', 'gf 5 g',
	'brass 14k 5 g', 'stainless stainless 5 g', '14k 5 tael', '14k 5 baht', '14k 5 grs', '14k 5 g dwt', '14k g 5', 'g14k5', '5g14k', '14k5g', '14kx3 5g', 'each 14k 5g',
	'14k 1 234 g', '14k 1 234,5 g', '12 345 g 925', '925 316.90 g', '585 585 g', '750 750', '925 800', '333 333 333', '5,2,18k', '12, 4 g 14k', '14k 12 ,4 g',
	'3x 5 g', '14k 5 x3', '14k 5 x3 g', '5 g 14k x', 'x 14k 5 g', '14k 5 g x x3', '14k 5 g x3 x4', '925 x3 x', 'lot 7 14k 5 g', 'no. 12 14k 5 g', '$5', '€12,40',
	'14k 5 g @ 50', '2024-05-01', '12:30', '14k (5) g', '14k [5 g]', '14k 5 g / 3', '14k 5,2,1 g', '14k 5.2.1 g', '14k .5 g', '14k ,5 g', '14k 5. g', '14k 5, g'
] as const;
export const nasty: readonly string[] = NASTY;

export const hostile: fc.Arbitrary<string> = fc.oneof(
	fc.constantFrom(...NASTY),
	fc.string({ unit: 'binary', maxLength: 30 }),
	fc.array(fc.constantFrom(...NASTY, '14k', '925', '5.2 g', '12,4', '3 dwt', 'ring', 'x3', '-0.3 g stones'), { maxLength: 5 }).map((parts) => parts.join(' ')),
	fc.array(fc.constantFrom('1', '4', 'k', ' ', '.', ',', 'g', 'x', '-', '9', '2', '5', '/', '%', 'd', 'w', 't', 'ct', 'Au', "'"), { maxLength: 14 }).map((parts) => parts.join(''))
);
