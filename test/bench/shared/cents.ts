import { Decimal, decimal } from '../../../src/trade/number/decimal.ts';
import { toMass, type MassUnitId } from '../../../src/trade/mass/units.ts';
import { fineMass } from '../../../src/trade/metal/fine-mass.ts';
import { fromKarat, type Fineness } from '../../../src/trade/metal/fineness.ts';
import { roundMoney } from '../../../src/trade/price/money.ts';
import type { PriceSheet } from '../../../src/trade/price/price-sheet.ts';
import { valueOf } from '../../../src/trade/price/value.ts';
import { seeded } from './lot.ts';

/** The units that lines are weighed in, with their grams as a float program knows them. */
const UNITS: readonly (readonly [unit: MassUnitId, grams: number])[] = [
	['ozt', 31.1034768],
	['dwt', 1.55517384],
	['g', 1]
];

export type Wrong = { readonly lines: number; readonly ties: number; readonly ours: number; readonly floats: number; readonly decimals: number };

/**
 * Lines of karat gold in ounces, pennyweights and grams at prices per ounce, each to the cent, half to even, by four routes:
 * the house; whole numbers only (the reference); floats; and decimals of 40 digits whose quotients are used again.
 * Many lines end exactly on half a cent, where a quotient that was rounded once already falls to the wrong side.
 */
export function wrongCents(lines: number): Wrong {
	const random = seeded(31_103);
	const whole = (most: number) => 1 + Math.floor(random() * most);
	const karats: readonly { readonly k: number; readonly taken: Fineness; readonly quotient: Decimal }[] = Array.from({ length: 24 }, (_, i) => ({
		k: i + 1,
		taken: fromKarat(decimal(String(i + 1))),
		quotient: new Decimal(i + 1).div(24)
	}));
	const sheets = Array.from({ length: 400 }, () => {
		// prices end in 0, 25, 50 or 75 hundredths
		const cents = 100_000 + whole(20_000) * 25;
		const amount = decimal((cents / 100).toFixed(2));
		const sheet: PriceSheet = { currency: 'USD', quotes: [{ metal: 'Au', amount, per: 'ozt' }], at: 0, source: 'drawn' };
		return { cents: BigInt(cents), price: cents / 100, sheet, perGram: amount.div('31.1034768') };
	});
	let [ties, ours, floats, decimals] = [0, 0, 0, 0];
	for (let line = 0; line < lines; line += 1) {
		const { k, taken, quotient } = karats[whole(24) - 1]!;
		const [unit, grams] = UNITS[line % 10 === 9 ? 2 : line % 2]!;
		const { cents, price, sheet, perGram } = sheets[whole(400) - 1]!;
		const hundredths = whole(4_000);
		const amount = decimal((hundredths / 100).toFixed(2));

		// cents of the line = hundredths x k x cents / (100 x 24) ounces, pennyweights a twentieth, grams by the ounce in grams
		const n = BigInt(hundredths) * BigInt(k) * cents * (unit === 'g' ? 10_000_000n : 1n);
		const d = 2_400n * (unit === 'dwt' ? 20n : unit === 'g' ? 311_034_768n : 1n);
		const [cut, rest] = [n / d, n % d];
		const tie = rest * 2n === d;
		const right = rest * 2n > d || (tie && cut % 2n === 1n) ? cut + 1n : cut;
		if (tie) ties += 1;

		const fine = fineMass(toMass(amount, unit), 'Au', taken).grams;
		const money = roundMoney(valueOf({ Au: fine }, sheet).total, 'USD', 'half-even').amount;
		if (!money.times(100).equals(right.toString())) ours += 1;

		const byFloats = (((hundredths / 100) * grams * k) / 24) * (price / 31.1034768);
		if (BigInt(halfEven(byFloats * 100)) !== right) floats += 1;

		const byDecimals = amount.times(grams.toString()).times(quotient).times(perGram).toDecimalPlaces(2, Decimal.ROUND_HALF_EVEN);
		if (!byDecimals.times(100).equals(right.toString())) decimals += 1;
	}
	return { lines, ties, ours, floats, decimals };
}

function halfEven(value: number): number {
	const floor = Math.floor(value);
	const rest = value - floor;
	if (rest !== 0.5) return rest > 0.5 ? floor + 1 : floor;
	return floor % 2 === 0 ? floor : floor + 1;
}
