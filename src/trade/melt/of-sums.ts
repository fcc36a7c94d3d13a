import { toNumber, type Exact } from '../number/exact.ts';
import type { Result } from '../number/result.ts';
import { propagate, uncertain, type Uncertain } from '../uncertainty/uncertain.ts';
import type { MetalId } from '../metal/metals.ts';
import type { ClassSums, LotSums, Quantity } from '../lot/sums.ts';
import type { LossOverrides } from './losses.ts';
import type { MeltParcel } from './spread.ts';
import { meltYield, type MeltProblem, type MeltYield } from './yield.ts';

/**
 * The errors that pieces have for themselves, as independent sources: the first metal's own, then what the next has beside it ...
 * formula: Cholesky factor of the matrix of summed products; "pieces:<quantity>" names each column (grams)
 * rounding: none, an estimate.
 * source: JCGM 100:2008 (GUM) F.1.2.3 (correlated inputs expressed by independent ones); Cholesky factorisation; from memory.
 */
function lotDoubt(sums: LotSums): ReadonlyMap<Quantity, Readonly<Record<string, number>>> {
	const quantities: Quantity[] = [...(Object.keys(sums.fine) as MetalId[]), 'net'];
	const product = (a: Quantity, b: Quantity) => Number(sums.own[a < b ? `${a} ${b}` : `${b} ${a}`] ?? 0n) / 1e18;
	const rows: number[][] = [];
	const byQuantity = new Map<Quantity, Record<string, number>>();
	for (const [i, quantity] of quantities.entries()) {
		const row: number[] = [];
		for (let j = 0; j < i; j += 1) {
			const above = rows[j]!;
			const shared = above.slice(0, j).reduce((total, x, k) => total + x * row[k]!, 0);
			row.push(above[j]! > 0 ? (product(quantity, quantities[j]!) - shared) / above[j]! : 0);
		}
		row.push(Math.sqrt(Math.max(0, product(quantity, quantity) - row.reduce((total, x) => total + x * x, 0))));
		rows.push(row);
		const contributions: Record<string, number> = {};
		row.forEach((u, j) => {
			if (u !== 0) contributions[`pieces:${quantities[j]!}`] = u;
		});
		for (const [source, by] of Object.entries(sums.shared)) {
			const ng = by[quantity];
			if (ng !== undefined) contributions[source] = Number(ng) / 1e9;
		}
		byQuantity.set(quantity, contributions);
	}
	return byQuantity;
}

/**
 * A lot as parcels for the crucible, one for each class and way of melting.
 * formula: a class's own error goes to its parcels, every other error to all, each in proportion to mass (grams)
 * rounding: none of mass and fine mass; the split of the doubts is an estimate, exact when all parcels melt alike.
 * source: common practice, no source.
 */
export function parcelsOf(sums: LotSums): MeltParcel[] {
	const groups = Object.values(sums.byClass);
	const doubts = lotDoubt(sums);
	const amount = (group: ClassSums, quantity: Quantity) =>
		quantity === 'net' ? group.net.toNumber() : toNumber(group.fine[quantity] ?? { n: 0n, d: 1n });
	const doubtOf = (group: ClassSums, quantity: Quantity): Uncertain => {
		const value = amount(group, quantity);
		const parts = Object.entries(doubts.get(quantity) ?? {}).map(([source, u]) => {
			const sharing = source.startsWith('class:') ? groups.filter(({ of }) => source === `class:${of}`) : groups;
			const all = sharing.includes(group) ? sharing.reduce((total, each) => total + amount(each, quantity), 0) : 0;
			return { input: uncertain(0, source, u), sensitivity: all > 0 ? value / all : 0 };
		});
		return propagate(value, parts);
	};
	return groups.map((group) => {
		const fine = Object.entries(group.fine) as [MetalId, Exact][];
		const fineDoubt: Partial<Record<MetalId, Uncertain>> = {};
		for (const [metal] of fine) fineDoubt[metal] = doubtOf(group, metal);
		return { lossClass: group.lossClass, net: group.net, fine: group.fine, netDoubt: doubtOf(group, 'net'), fineDoubt };
	});
}

/**
 * What a lot would be as one bar.
 * formula: as meltYield, over the lot's classes
 * rounding: none of the expected figures; intervals are estimates.
 * source: as meltYield.
 */
export function yieldFromSums(sums: LotSums, own: LossOverrides = {}): Result<MeltYield, MeltProblem> {
	return meltYield(parcelsOf(sums), own);
}
