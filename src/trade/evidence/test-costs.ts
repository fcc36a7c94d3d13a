import { decimal, type Decimal } from '../number/decimal.ts';
import type { FindingKind } from './finding.ts';

/** What the buyer says a test costs, in the book's currency. */
export type TestCosts = Partial<Readonly<Record<FindingKind, Decimal>>>;

/**
 * What a test costs in time and damage, in units of the book's currency, until the buyer has said otherwise: working
 * defaults, common practice, no source.
 */
export const defaultTestCosts: Readonly<Record<FindingKind, Decimal>> = {
	magnet: decimal('0.2'),
	coin: decimal('0.5'),
	touch: decimal('1'),
	water: decimal('2'),
	fluorescence: decimal('2'),
	core: decimal('12'),
	assay: decimal('60')
};

/** The cost of one test: the buyer's own figure, or the working default. */
export function testCost(kind: FindingKind, own: TestCosts = {}): Decimal {
	return own[kind] ?? defaultTestCosts[kind];
}
