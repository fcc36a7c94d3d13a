import { assess, prudentFineness, type Assessment } from '$trade/evidence/assess.ts';
import { beliefOf } from '$trade/evidence/belief-of.ts';
import type { Evidence } from '$trade/evidence/belief.ts';
import { contradictions, type Contradiction } from '$trade/evidence/contradiction.ts';
import { findingKinds, type FindingKind } from '$trade/evidence/finding.ts';
import { nextTests, type Possible, type Stake, type TestValue } from '$trade/evidence/next-test.ts';
import { observeAll } from '$trade/evidence/observe.ts';
import { pooledDensities, type Density } from '$trade/evidence/pool.ts';
import { startOf, type Start } from '$trade/evidence/start.ts';
import { testCost } from '$trade/evidence/test-costs.ts';
import type { Tester } from '$trade/evidence/tester.ts';
import { readingU } from '$trade/evidence/tester-figures.ts';
import { unseenCores } from '$trade/evidence/unseen.ts';
import { usefulDensity } from '$trade/evidence/water-reading.ts';
import { densityByWater } from '$trade/evidence/water-weighing.ts';
import { divisionOf, massOf } from '$trade/mass/weighing.ts';
import { toMass } from '$trade/mass/units.ts';
import { fromPerMille, type Fineness } from '$trade/metal/fineness.ts';
import { parseMark } from '$trade/metal/mark.ts';
import { lookAlike, type LookAlikeId } from '$trade/metal/look-alikes.ts';
import { decimal, type Decimal } from '$trade/number/decimal.ts';
import { compareExact, exact, reduce, times, toNumber } from '$trade/number/exact.ts';
import { netOf, type Content, type Piece } from '$trade/piece/piece.ts';
import { subjectOf, type NoSubject } from '$trade/piece/subject.ts';
import { shareFor } from '$trade/price/offer.ts';
import { pricePerGram, type PriceSheet } from '$trade/price/price-sheet.ts';
import { standardUncertainty } from '$trade/uncertainty/uncertain.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import { readersOf } from '$ui/evidence/readers.ts';

export const NO_EVIDENCE: Evidence = { build: null, findings: [], belief: null, taking: null };

/** All that the page of a piece shows of what it is. */
export type View = {
	readonly start: Start;
	readonly found: Assessment;
	readonly clashes: readonly Contradiction[];
	readonly unseen: readonly LookAlikeId[];
	/** Together, the odds of what no test has seen. */
	readonly unseenOdds: number;
	/** Some finding says something: not one that was too light for its scale. */
	readonly tested: boolean;
	readonly prudent: number;
	readonly densities: readonly Density[];
};

export function viewOf(piece: Piece, { priors, prudence }: SettingsBody): View | NoSubject {
	const subject = subjectOf(piece);
	if (typeof subject === 'string') return subject;
	const findings = piece.evidence?.findings ?? [];
	const start = startOf(subject, priors);
	const found = assess(start, findings);
	const unseen = unseenCores(found);
	return {
		start,
		found,
		clashes: contradictions(start, findings),
		unseen,
		unseenOdds: found.cores.reduce((sum, { core, odds }) => sum + (unseen.includes(core) ? odds : 0), 0),
		tested: observeAll(start, findings).length > 0,
		prudent: prudentFineness(found, prudence),
		densities: pooledDensities(findings.flatMap((finding) => (finding.kind === 'water' ? (usefulDensity(finding) ?? []) : [])))
	};
}

/** The piece with other evidence, and the belief that follows; nothing is left where nothing was tested. */
export function withEvidence(piece: Piece, part: Partial<Evidence>, { priors }: Pick<SettingsBody, 'priors'>): Piece {
	const { evidence = NO_EVIDENCE, ...rest } = piece;
	const next = { ...evidence, ...part };
	const subject = subjectOf({ ...piece, evidence: next });
	const known = next.findings.length > 0 && typeof subject !== 'string';
	const ids = new Set(next.findings.map(({ id }) => id));
	const taking = next.taking?.rests.every((id) => ids.has(id)) === true ? next.taking : null;
	if (next.findings.length === 0 && next.build === null && taking === null) return rest;
	return { ...rest, evidence: { ...next, taking, belief: known ? beliefOf(subject, next.findings, priors) : null } };
}

/** The piece taken at a fineness of its main metal, with the findings that this rests on. */
export function takenAt(piece: Piece, metal: Content['metal'], fineness: Fineness, settings: SettingsBody): Piece {
	const taken = { perMille: reduce(fineness.perMille) };
	const others = piece.contents.filter((content) => content.metal !== metal);
	const findings = piece.evidence?.findings ?? [];
	const taking = { metal, taken, rests: findings.map(({ id }) => id), prudence: settings.prudence };
	const contents = piece.contents.some((content) => content.metal === metal)
		? piece.contents.map((content) => (content.metal === metal ? { metal, taken } : content))
		: [{ metal, taken }, ...others];
	return withEvidence({ ...piece, contents }, { taking }, settings);
}

/** What the mark of a piece says of a metal; null where it says nothing. */
export function markedFineness({ mark }: Pick<Piece, 'mark'>, metal: Content['metal']): Fineness | null {
	const read = parseMark(mark);
	return (read.ok ? read.value.contents.find((content) => content.metal === metal)?.fineness : undefined) ?? null;
}

/** Whether the piece is still taken at what was decided on its findings. */
export function stillTaken({ contents, evidence }: Pick<Piece, 'contents' | 'evidence'>): boolean {
	const taking = evidence?.taking ?? null;
	const held = contents.find(({ metal }) => metal === taking?.metal);
	return taking !== null && held !== undefined && compareExact(held.taken.perMille, taking.taken.perMille) === 0;
}

/** What is at stake: the piece as pure metal, and what is offered for what it is taken at; null without a price. */
export function stakeOf(piece: Piece, metal: Content['metal'], sheet: PriceSheet | null, settings: SettingsBody): Stake | null {
	const perGram = sheet === null ? null : pricePerGram(sheet, metal);
	if (perGram === null) return null;
	const whole = times(exact(netOf(piece).grams), perGram);
	const taken = piece.contents.find((content) => content.metal === metal)?.taken ?? fromPerMille(decimal('0'));
	const value = times(whole, { n: taken.perMille.n, d: taken.perMille.d * 1000n });
	return { whole: toNumber(whole), price: toNumber(times(value, exact(shareFor(value, settings.tiers)))) };
}

/** Grams of one step of the scale that the piece was weighed on, as text. */
export function divisionText(piece: Piece): Decimal {
	return toMass(divisionOf(piece.weighing), piece.weighing.unit).grams;
}

/** The tests that this shop can make of this piece now, with how well they would be read. */
export function possibleTests({ start, densities }: View, piece: Piece, testers: readonly Tester[]): Possible[] {
	const { metal, claimed } = start.subject;
	const perMille = claimed ?? 585;
	const best = (kind: Tester['kind']) => {
		const readers = readersOf(kind, testers).map((reader) => ({ u: readingU(reader.rows, metal, perMille), gross: reader.gross }));
		return readers.reduce((least, each) => (each.u < least.u ? each : least));
	};
	const [fluorescence, acids] = [best('fluorescence'), best('acids')];
	const water = waterU(piece, metal);
	return [
		{ kind: 'magnet' },
		{ kind: 'touch', how: 'rub', ...acids },
		{ kind: 'touch', how: 'notch', ...acids },
		{ kind: 'fluorescence', ...fluorescence },
		...(water === null || densities.length > 0 ? [] : [{ kind: 'water' as const, u: water }]),
		{ kind: 'core', ...fluorescence, gross: 0.005 },
		{ kind: 'assay', u: 2, gross: 0.002 }
	];
}

/** How well the density would be known on this scale; null when the piece is too light for it. */
function waterU(piece: Piece, metal: Content['metal']): number | null {
	const grams = massOf(piece.weighing).grams;
	// about what the metal's everyday alloy has
	const density = metal === 'Au' ? 13 : lookAlike('silver').high;
	const lift = grams.div(decimal(String(density)));
	const found = densityByWater({ method: 'beaker', air: grams, water: lift, division: divisionText(piece), temperature: decimal('20') });
	return found.ok && found.value.useful ? standardUncertainty(found.value.density) : null;
}

export function costsOf({ testCosts }: SettingsBody): Record<FindingKind, number> {
	return Object.fromEntries(findingKinds.map((kind) => [kind, testCost(kind, testCosts).toNumber()])) as Record<FindingKind, number>;
}

export function testValues(view: View, piece: Piece, testers: readonly Tester[], stake: Stake, settings: SettingsBody): TestValue[] {
	return nextTests(view.start, piece.evidence?.findings ?? [], possibleTests(view, piece, testers), stake, costsOf(settings));
}

/** The piece after its mark, article, origin or contents were changed by hand: the belief made again, a decision that was overruled dropped. */
export function refreshed(piece: Piece, settings: SettingsBody): Piece {
	if (piece.evidence === undefined) return piece;
	return withEvidence(piece, stillTaken(piece) ? {} : { taking: null }, settings);
}
