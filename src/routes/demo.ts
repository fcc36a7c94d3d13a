import type { Change } from '$storage/append.ts';
import type { Book } from '$storage/book.ts';
import type { StorageProblem } from '$storage/problem.ts';
import type { Finding } from '$trade/evidence/finding.ts';
import type { Tester } from '$trade/evidence/tester.ts';
import { readingU, testerDefaults } from '$trade/evidence/tester-figures.ts';
import { parseLine } from '$trade/lot/line.ts';
import { addPieces, emptySums } from '$trade/lot/sums.ts';
import type { Scale } from '$trade/mass/scale.ts';
import { weighing } from '$trade/mass/weighing.ts';
import { fromKarat } from '$trade/metal/fineness.ts';
import { isMetalId, metals } from '$trade/metal/metals.ts';
import { assert, decimal } from '$trade/number/decimal.ts';
import { ok, type Result } from '$trade/number/result.ts';
import { round } from '$trade/number/rounding.ts';
import type { Piece } from '$trade/piece/piece.ts';
import { offerFor, tiers } from '$trade/price/offer.ts';
import { parseQuote, priceSheet, type PriceSheet } from '$trade/price/price-sheet.ts';
import { valueOf } from '$trade/price/value.ts';
import { defaultSettings } from '$trade/record/kinds/settings.ts';
import { typedNumber } from '$ui/format/typed-text.ts';
import {
	demoLots, demoOpenLot, demoScale, demoSheets, demoTesters, demoTests, demoTiers, demoUnits, type DemoLot
} from './demo-scenario.ts';
import { withEvidence } from './piece-evidence.ts';

type Sheet = { readonly subject: string; readonly body: PriceSheet };

const CURRENCY = 'USD';
const MINUTE = 60_000;

/** Fills an empty demo book with the invented story, in one act: it is there whole or not at all. */
export async function fillDemo(book: Book, now: number): Promise<Result<null, StorageProblem>> {
	const written = await book.append(demoChanges(now));
	// another tab was quicker with the same story
	if (!written.ok && written.problem.kind !== 'storage-changed-since') return written;
	return ok(null);
}

/** The story as it would have been written, with its dates counted back from `now`. The same moment gives the same changes. */
export function demoChanges(now: number): readonly Change[] {
	const scale = scaleOf(now);
	const sheets = demoSheets.map(({ daysAgo, hour, quotes }, index): Sheet => {
		const at = daysAgo === 0 ? now - 14 * MINUTE : back(now, daysAgo, hour);
		return { subject: `demo-prices-${index + 1}`, body: sheetOf(quotes, at) };
	});
	const found = tiers(demoTiers.map(({ from, share }) => ({ from: decimal(from), share: decimal(share) })));
	assert(found.ok, 'the demo book has tiers that are none');
	const settings = { ...defaultSettings(), currency: CURRENCY, scale: scale.id, tiers: found.value } as const;
	return [
		{ kind: 'scale', subject: scale.id, body: scale, replaces: null },
		...testersOf(now).map((body): Change => ({ kind: 'tester', subject: body.id, body, replaces: null })),
		{ kind: 'settings', subject: 'settings', body: settings, replaces: null },
		...sheets.map(({ subject, body }): Change => ({ kind: 'prices', subject, body, replaces: null })),
		...demoLots.flatMap((lot, index) => boughtLot(lot, index + 1, now, scale, sheets, settings.tiers)),
		...openLot(now, scale, sheets)
	];
}

function boughtLot(
	lot: DemoLot,
	count: number,
	now: number,
	scale: Scale,
	sheets: readonly Sheet[],
	list: Parameters<typeof offerFor>[2]
): readonly Change[] {
	const [subject, purchase] = [`demo-lot-${count}`, `demo-purchase-${count}`];
	const boughtAt = back(now, lot.daysAgo, lot.hour);
	const openedAt = boughtAt - 25 * MINUTE;
	const sheet = sheets.findLast(({ body }) => body.at <= boughtAt);
	assert(sheet !== undefined, 'the demo book buys before it has prices');
	const pieces = piecesOf(lot.lines, scale);
	const sums = addPieces(
		emptySums(),
		pieces.map((piece, index) => ({ piece, key: `${subject}-${index + 1}`, scale }))
	);
	const value = valueOf(sums.fine, sheet.body).total;
	const { share, offer } = offerFor(value, CURRENCY, list);
	const paid = lot.roundedUpTo === '' ? offer.amount : round(offer.amount, decimal(lot.roundedUpTo), 'up');
	const { gross, net, fine, entries } = sums;
	return [
		{
			kind: 'lot',
			subject,
			body: { name: lot.name, note: '', state: 'bought', purchase, sheet: sheet.subject, openedAt, ask: null },
			replaces: null
		},
		...pieceChanges(subject, pieces),
		{
			kind: 'purchase',
			subject: purchase,
			body: {
				number: null,
				lot: subject,
				boughtAt,
				seller: { name: lot.seller, document: `invented card ${String(7_000 + 37 * count)}`, note: lot.note },
				paid: { amount: paid, currency: CURRENCY },
				means: lot.means,
				offer,
				share,
				sheet: sheet.subject,
				prices: sheet.body,
				totals: { gross, net, fine, value },
				second: lot.again ? weighedAgain(typedNumber(round(gross, scale.division, 'half-even'), 'dot', 2), scale) : null,
				entries,
				pieces: sums.pieces
			},
			replaces: null
		}
	];
}

function openLot(now: number, scale: Scale, sheets: readonly Sheet[]): readonly Change[] {
	const subject = 'demo-lot-open';
	const sheet = sheets[sheets.length - 1]?.subject ?? null;
	const { name, hoursAgo, ask, lines } = demoOpenLot;
	const openedAt = now - hoursAgo * 60 * MINUTE;
	const pieces = piecesOf(lines, scale);
	return [
		{ kind: 'lot', subject, body: { name, note: '', state: 'open', purchase: null, sheet, openedAt, ask }, replaces: null },
		...pieceChanges(subject, pieces.map((piece, index) => (index === pieces.length - 1 ? tested(piece, now, scale) : piece)))
	];
}

function pieceChanges(lot: string, pieces: readonly Piece[]): readonly Change[] {
	return pieces.map((piece, index) => ({
		kind: 'piece',
		subject: `${lot}-${index + 1}`,
		body: { lot, order: index + 1, piece },
		replaces: null
	}));
}

function piecesOf(lines: readonly string[], scale: Scale): readonly Piece[] {
	return lines.map((line) => {
		const read = parseLine(line, { mark: 'dot', unit: 'g', scale });
		assert(read.ok, `the demo book has a line that cannot be read: ${line}`);
		return read.value;
	});
}

function weighedAgain(typed: string, scale: Scale) {
	const read = weighing(typed, 'g', { mark: 'dot', scale });
	assert(read.ok, `the demo book has a weighing that cannot be read: ${typed}`);
	return read.value;
}

function sheetOf(quotes: Readonly<Record<string, string>>, at: number): PriceSheet {
	const read = priceSheet({
		currency: CURRENCY,
		quotes: Object.entries(quotes).map(([metal, typed]) => {
			assert(isMetalId(metal), `the demo book prices ${metal}`);
			const quote = parseQuote(metal, typed, metals[metal].precious ? demoUnits.precious : demoUnits.base, 'dot');
			assert(quote.ok, `the demo book has a price that cannot be read: ${typed}`);
			return quote.value;
		}),
		at,
		source: 'invented for the demo book'
	});
	assert(read.ok, 'the demo book has a price sheet that is none');
	return read.value;
}

function testersOf(now: number): readonly Tester[] {
	return demoTesters.map(({ id, name, kind, checkedDaysAgo }) => ({
		id, name, kind, ...testerDefaults[kind], checkedOn: new Date(back(now, checkedDaysAgo, 12)).toISOString().slice(0, 10)
	}));
}

/** A piece with the tests of the story, and the belief that follows from them. */
function tested(piece: Piece, now: number, scale: Scale): Piece {
	const { touch, fluorescence, water } = demoTests;
	const at = (minutes: number) => now - minutes * MINUTE;
	const [reader, acids] = testersOf(now);
	assert(reader !== undefined && acids !== undefined, 'the demo book has no testers');
	const by = ({ id, rows, bias, gross }: Tester, perMille: number) => {
		const u = readingU(rows, 'Au', perMille);
		return { tester: id, u, bias: Math.min(bias, u), gross };
	};
	const findings: readonly Finding[] = [
		{
			kind: 'touch', id: 'demo-touch', at: at(touch.minutesAgo), how: 'rub', ...by(acids, 585),
			holds: fromKarat(decimal(touch.holds)), attackedBy: fromKarat(decimal(touch.attackedBy))
		},
		{
			kind: 'fluorescence', id: 'demo-fluorescence', at: at(fluorescence.minutesAgo), ...by(reader, 588),
			reads: Object.entries(fluorescence.reads).flatMap(([metal, typed]) => (isMetalId(metal) ? [{ metal, perMille: decimal(typed) }] : []))
		},
		{
			kind: 'water', id: 'demo-water', at: at(water.minutesAgo), method: 'suspended', air: decimal(water.air), water: decimal(water.water),
			division: scale.division, temperature: decimal(water.temperature)
		}
	];
	return withEvidence(piece, { findings }, defaultSettings());
}

function scaleOf(now: number): Scale {
	const { name, division, verification, checkedDaysAgo } = demoScale;
	const checked = new Date(back(now, checkedDaysAgo, 12));
	return {
		id: 'demo-scale',
		name,
		unit: 'g',
		division: decimal(division),
		verification: decimal(verification),
		accuracyClass: 'II',
		checkedOn: checked.toISOString().slice(0, 10)
	};
}

/** An hour of the day, so many days before. */
function back(now: number, daysAgo: number, hour: number): number {
	const day = new Date(now);
	return new Date(day.getFullYear(), day.getMonth(), day.getDate() - daysAgo, hour, 5).getTime();
}
