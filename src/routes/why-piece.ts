import type { MetalId } from '$trade/metal/metals.ts';
import { toNumber, exact, times } from '$trade/number/exact.ts';
import { shareOf } from '$trade/metal/fineness.ts';
import { massOf } from '$trade/mass/weighing.ts';
import { estimate, netOf, type Piece } from '$trade/piece/piece.ts';
import { budget } from '$trade/uncertainty/budget.ts';
import { interval } from '$trade/uncertainty/coverage.ts';
import type { Uncertain } from '$trade/uncertainty/uncertain.ts';
import { metalName } from '$ui/metal-name.ts';
import { pieceFine } from '$ui/piece-words.ts';
import type { Shop } from './shop.svelte.ts';
import { COVERAGE, inWords, sourceWords, type Why } from './why.ts';

/** Why the fine metal of a piece is what it is. */
export function whyPiece(shop: Shop, piece: Piece, key: string): Why {
	const { format, settings } = shop;
	const scale = shop.scales.find(({ id }) => id === piece.weighing.scale);
	const found = estimate(piece, key, scale, settings.spreads);
	const net = netOf(piece).grams;
	const first = piece.contents[0];
	const main: Uncertain = (first === undefined ? undefined : found.fine[first.metal]) ?? found.net;
	const { low, high } = interval(main, COVERAGE);
	const belief = piece.evidence?.belief ?? null;
	const believed = belief !== null && belief.metal === first?.metal;
	const words = (source: string): string => {
		if (source.startsWith('reading:')) return 'the last digit of the reading';
		if (source.startsWith('deduction:')) return 'what is taken off was judged, not weighed';
		if (source.startsWith('piece:')) return believed ? 'what the tests leave open of this piece' : 'this piece by itself, against its class';
		return sourceWords(source, shop);
	};
	return {
		title: 'Fine metal',
		figure: pieceFine(piece, format) || 'none counted',
		uncertainty: `90 % between ${format.interval(Math.max(0, low), high, first === undefined ? 'g' : `g ${first.metal}`)}`,
		inputs: [
			{ name: 'Weighed', value: format.weighing(piece.weighing), how: `${format.mass(massOf(piece.weighing).grams)} gross` },
			...piece.deductions.map(({ what, mass, how }) => ({ name: `less ${what}`, value: `− ${format.mass(mass.grams)}`, how })),
			{ name: 'Net', value: format.mass(net) },
			...piece.contents.map(({ metal, taken }: { metal: MetalId; taken: Piece['contents'][number]['taken'] }) => ({
				name: metalName(metal),
				value: format.fine(metal, times(exact(net), shareOf(taken)), 4),
				how: `net × ${format.fineness(taken, { least: 0, most: 3 })}`
			})),
			...(believed && belief !== null
				? [{ name: 'Expected by its tests', value: `${format.estimate(main.value)}\u00a0g\u00a0${belief.metal}`, how: `net × ${format.estimate(belief.mean, 4)}\u00a0‰ on average` }]
				: [])
		],
		formula: 'Net grams × the fineness taken ÷ 1000, for each metal. Kept as an exact fraction until it is printed.',
		budget: inWords(budget(main), words).map(({ source, u, share }) => ({ source, u: `${format.estimate(u)}\u00a0g`, share })),
		source:
			'Common practice for the formula. Reading: JCGM 100:2008 (GUM) 4.3.7; how far classes run from their marks: working defaults, ' +
			'no source, yours to change.',
		note: [
			toNumber(exact(net)) < 5 ? 'On so small a piece the last digit of the scale matters.' : '',
			believed
				? 'The interval lies about what its tests lead to expect, not about what it is taken at. Where it may be filled, look at the odds and not at ± alone.'
				: 'The mark is taken as true within its class: an honest interval for a filled piece needs a test.',
			'An estimate is not an assay.'
		].filter((part) => part !== '').join(' ')
	};
}
