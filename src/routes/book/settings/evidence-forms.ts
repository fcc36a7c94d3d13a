import type { HypothesisId } from '$trade/evidence/belief.ts';
import { findingKinds, type FindingKind } from '$trade/evidence/finding.ts';
import { checkOdds, type Odds, type OddsProblem } from '$trade/evidence/odds.ts';
import type { Origin } from '$trade/evidence/origin.ts';
import { defaultPriors } from '$trade/evidence/priors.ts';
import { checkPrudence, type PrudenceProblem } from '$trade/evidence/prudence.ts';
import { defaultTestCosts, testCost, type TestCosts } from '$trade/evidence/test-costs.ts';
import type { Decimal } from '$trade/number/decimal.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '$trade/number/field.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import { typedEstimate, typedNumber } from '$ui/format/typed-text.ts';

/** What is typed about tests in the settings, and what it means. */

export type TypedCosts = { readonly [kind in FindingKind]: string };

/** Nobody spends more on the test of one piece. */
export const MOST_COST = '1000000';

export function typedCosts(own: TestCosts, mark: DecimalMark): TypedCosts {
	return Object.fromEntries(findingKinds.map((kind) => [kind, typedNumber(testCost(kind, own), mark, 2)])) as TypedCosts;
}

/** The costs as typed; one that is the default, or left empty, is not kept as the buyer's own. */
export function readCosts(typed: TypedCosts, mark: DecimalMark): Result<TestCosts, { readonly kind: FindingKind; readonly problem: NumberProblem }> {
	const own: { [kind in FindingKind]?: Decimal } = {};
	for (const kind of findingKinds) {
		if (typed[kind].trim() === '') continue;
		const read = parseNumber(typed[kind], { mark, most: MOST_COST });
		if (!read.ok) return fail({ kind, problem: read.problem });
		if (!read.value.equals(defaultTestCosts[kind])) own[kind] = read.value;
	}
	return ok(own);
}

/** Prudence from its percentage. */
export function readPrudence(typed: string, mark: DecimalMark): Result<number, NumberProblem | PrudenceProblem> {
	const read = parseNumber(typed, { mark });
	return read.ok ? checkPrudence(share(read.value)) : read;
}

/** What a piece of an origin can be: without a mark there is nothing to be honest about. */
export function hypothesesOf(origin: Origin): readonly HypothesisId[] {
	return origin === 'unmarked' ? ['other', 'layered'] : ['honest', 'under', 'other', 'layered'];
}

export type TypedOdds = { readonly [id in HypothesisId]: string };

export function typedOdds({ honest, under, other, layered }: Odds, mark: DecimalMark): TypedOdds {
	const typed = (chance: number): string => typedEstimate(chance, mark);
	return { honest: typed(honest), under: typed(under), other: typed(other), layered: typed(layered) };
}

/** What is wrong, and the chance that it is in; null: in all of them together. */
export type OddsFormProblem = { readonly hypothesis: HypothesisId | null; readonly problem: NumberProblem | OddsProblem };

/** The odds of an origin as typed; null when they are the default. */
export function readOdds(origin: Origin, typed: TypedOdds, mark: DecimalMark): Result<Odds | null, OddsFormProblem> {
	const odds = { honest: 0, under: 0, other: 0, layered: 0 };
	for (const hypothesis of hypothesesOf(origin)) {
		const read = parseNumber(typed[hypothesis], { mark, most: '100' });
		if (!read.ok) return fail({ hypothesis, problem: read.problem });
		odds[hypothesis] = share(read.value);
	}
	const checked = checkOdds(odds);
	if (!checked.ok) return fail({ hypothesis: null, problem: checked.problem });
	const usual = defaultPriors[origin];
	return ok(hypothesesOf(origin).every((id) => odds[id] === usual[id]) ? null : odds);
}

/** An estimate as the share that its percentage says. */
function share(percent: Decimal): number {
	return percent.div(100).toNumber();
}
