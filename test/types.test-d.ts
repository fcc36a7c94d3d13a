// What must not compile. svelte-check reads this file: an expected error that is not there fails the check of types.
import { decimal, type Decimal } from '$trade/number/decimal.ts';
import { exact, type Exact } from '$trade/number/exact.ts';
import type { Result } from '$trade/number/result.ts';
import { mass, plusMass } from '$trade/mass/mass.ts';
import { plusFine, type FineMass } from '$trade/metal/fine-mass.ts';
import { fromKarat, type Fineness } from '$trade/metal/fineness.ts';
import { money, plusMoney, type Money } from '$trade/price/money.ts';
import type { Uncertain } from '$trade/uncertainty/uncertain.ts';

declare const gold: FineMass<'Au'>;
declare const silver: FineMass<'Ag'>;
declare const some: FineMass;
declare const fineness: Fineness;
declare const found: Result<Decimal, { readonly kind: 'number-missing' }>;
const grams = mass('12.30');
const euro = money(decimal('10'), 'EUR');
const dollar = money(decimal('10'), 'USD');

// two metals
plusFine(gold, gold);
// @ts-expect-error gold and silver do not add up to anything
plusFine(gold, silver);
// @ts-expect-error a mass that may be of any metal is not gold
plusFine(gold, some);
// @ts-expect-error fine mass of silver is not fine mass of gold
const wrongMetal: FineMass<'Au'> = silver;

// two currencies
plusMoney(euro, euro);
// @ts-expect-error euros and dollars do not add up to anything
plusMoney(euro, dollar);
// @ts-expect-error there is no such currency
const wrongCurrency: Money = money(decimal('10'), 'GRAMS');

// two quantities
plusMass(grams, grams);
// @ts-expect-error money has no mass
plusMass(grams, euro);
// @ts-expect-error a fine mass is an exact fraction and not a mass on a scale
plusMass(grams, gold);
// @ts-expect-error fineness is not a mass
plusMass(grams, fineness);
// @ts-expect-error a mass is not an amount of money
plusMoney(euro, grams);
// @ts-expect-error a fineness is in thousandths and not a bare fraction
const wrongFineness: Fineness = exact(decimal('585'));

// what is paid is built from text, never from a float
decimal('0.1');
// @ts-expect-error 0.1 is not a tenth
decimal(0.1);
// @ts-expect-error a float is not a mass
mass(12.3);
// @ts-expect-error a float is not a fraction
exact(0.585);
// @ts-expect-error karats are typed, not computed in floats
fromKarat(14);
// @ts-expect-error a float is not a decimal
const wrongDecimal: Decimal = 0.1;
// @ts-expect-error a decimal is not a fraction
const wrongExact: Exact = decimal('0.1');
// @ts-expect-error what is estimated is not what is paid
const wrongPaid: Decimal = { value: 1, contributions: {} } satisfies Uncertain;

// quantities do not change
// @ts-expect-error a mass is not changed in place
grams.grams = decimal('1');

// a result is asked before it is used
// @ts-expect-error there may be a problem instead
const unasked: Decimal = found.value;
if (found.ok) {
	const asked: Decimal = found.value;
	void asked;
}

void [wrongMetal, wrongCurrency, wrongFineness, wrongDecimal, wrongExact, wrongPaid, unasked];
