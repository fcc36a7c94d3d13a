/**
 * The demo book's story: the town of Quillhaven, its Spoon Fair and everyone in it are invented. It holds what was typed
 * and nothing that follows from it: pieces, sums, values and offers are worked out by the same functions as everywhere.
 */

/** Prices as typed on a morning, so many days before the book is opened. Invented, like everything here. */
export type DemoSheet = { readonly daysAgo: number; readonly hour: number; readonly quotes: Readonly<Record<string, string>> };

export const demoSheets: readonly DemoSheet[] = [
	{ daysAgo: 37, hour: 8, quotes: { Au: '3962.40', Ag: '47.35', Pd: '1388', Pt: '1566', Cu: '9.64', Zn: '2.88' } },
	{ daysAgo: 30, hour: 8, quotes: { Au: '4018.10', Ag: '48.62', Pd: '1412', Pt: '1581', Cu: '9.71', Zn: '2.91' } },
	{ daysAgo: 23, hour: 9, quotes: { Au: '3987.75', Ag: '48.08', Pd: '1379', Pt: '1549', Cu: '9.58', Zn: '2.86' } },
	{ daysAgo: 16, hour: 8, quotes: { Au: '4071.30', Ag: '50.14', Pd: '1425', Pt: '1597', Cu: '9.80', Zn: '2.95' } },
	{ daysAgo: 9, hour: 7, quotes: { Au: '4124.90', Ag: '51.47', Pd: '1440', Pt: '1612', Cu: '9.92', Zn: '2.97' } },
	{ daysAgo: 3, hour: 8, quotes: { Au: '4158.60', Ag: '51.93', Pd: '1433', Pt: '1604', Cu: '9.88', Zn: '2.94' } },
	{ daysAgo: 0, hour: 0, quotes: { Au: '4186.20', Ag: '52.315', Pd: '1438.50', Pt: '1608', Cu: '9.90', Zn: '2.96' } }
];

/** What precious metals are quoted in, and the others. */
export const demoUnits = { precious: 'ozt', base: 'kg' } as const;

export const demoScale = { name: 'Counter scale, class II', division: '0.01', verification: '0.1', checkedDaysAgo: 58 } as const;

/** From this value of a lot on, this share is paid. */
export const demoTiers = [
	{ from: '0', share: '0.80' },
	{ from: '500', share: '0.85' },
	{ from: '4000', share: '0.90' }
] as const;

export type DemoLot = {
	readonly name: string;
	readonly daysAgo: number;
	readonly hour: number;
	readonly seller: string;
	readonly note: string;
	readonly means: 'cash' | 'bank transfer';
	/** Rounded up to a multiple of this to close the deal; '' paid as offered. */
	readonly roundedUpTo: string;
	/** Weighed again as a whole at the payment. */
	readonly again: boolean;
	readonly lines: readonly string[];
};

export const demoLots: readonly DemoLot[] = [
	{
		name: 'House clearance, Tannery Row', daysAgo: 36, hour: 10, seller: 'Orsola Brindlewick', note: 'Aunt’s flat, two visits.',
		means: 'cash', roundedUpTo: '5', again: true,
		lines: ['sterling forks 316.90 g x6', 'sterling spoons 228.45 g x6', 'weighted 925 candlestick 412.30 g x2', '800 cake slice 61.75 g']
	},
	{
		name: 'Broken chains', daysAgo: 34, hour: 15, seller: 'Teodric Vantle', note: '', means: 'cash', roundedUpTo: '', again: true,
		lines: ['14k chain 12.4 g x3', '10k chain 8.15 g x2', '9k bracelet 6.32 g', '14k ring 3.88 g x2']
	},
	{
		name: 'Spoon Fair, first day', daysAgo: 29, hour: 9, seller: 'Mirabeth Sallowfen', note: 'Stall 14.', means: 'cash',
		roundedUpTo: '1', again: true,
		lines: ['925 spoon 24.6 g x2', '925 napkin ring 38.2 g x4', '830 sugar tongs 41.05 g', 'coin silver spoon 18.7 g x2', '925 8 dwt brooch']
	},
	{
		name: 'Spoon Fair, second day', daysAgo: 28, hour: 16, seller: 'Anselm Crookhollow', note: 'Stall 3, sold the tray’s rest.',
		means: 'cash', roundedUpTo: '', again: false,
		lines: ['18k ring 5.20 g - 0.35 g stones', '750 earrings 4.46 g x2', 'Pt 950 ring 6.10 g', '585 chain 22.05 g']
	},
	{
		name: 'Dental, Dr Wenlowe’s drawer', daysAgo: 22, hour: 11, seller: 'Ferrant Wenlowe', note: 'Practice closed, crowns cleaned.',
		means: 'bank transfer', roundedUpTo: '', again: true,
		lines: ['dental Au 625 Pd 180 Ag 120 4.12 g', 'dental Au 770 Pt 90 Ag 80 7.36 g', 'dental Pd 540 Ag 330 5.05 g']
	},
	{
		name: 'Coins from a tin', daysAgo: 20, hour: 14, seller: 'Hesper Quillfeather', note: '', means: 'bank transfer', roundedUpTo: '',
		again: false, lines: ['sovereign x2', 'krugerrand x1', '900 coin silver bracelet 64.4 g']
	},
	{
		name: 'Filled and plated box', daysAgo: 15, hour: 10, seller: 'Corvin Ashpole', note: 'Everything filled was in one bag.',
		means: 'cash', roundedUpTo: '1', again: true,
		lines: ['1/20 14k gf chain 46.1 g x7', '1/10 12k gf watch case 31.4 g - 9.2 g movement', 'gold plated bangle 55 g x3']
	},
	{
		name: 'Workbench sweepings, Ludd & Niece', daysAgo: 13, hour: 17, seller: 'Ludd & Niece, goldsmiths', note: 'Lemel, magnet passed.',
		means: 'bank transfer', roundedUpTo: '', again: true, lines: ['14k lemel 38.64 g', '18k clippings 21.17 g', '925 lemel 140.2 g']
	},
	{
		name: 'Fittings, Copperhithe yard', daysAgo: 8, hour: 9, seller: 'Barnaby Oxlode', note: '', means: 'cash', roundedUpTo: '',
		again: true, lines: ['brass fitting 1.84 kg x22', 'brass door handle 2.31 kg x4']
	},
	{
		name: 'Estate of a watchmaker', daysAgo: 6, hour: 13, seller: 'Isaura Penhallick', note: 'Asked for 24 hours to think, came back.',
		means: 'bank transfer', roundedUpTo: '10', again: true,
		lines: [
			'18k watch case 41.6 g - 18.4 g movement', '14k watch case 29.35 g - 12.1 g movement', '18k chain 33.27 g',
			'585 watch band 48.9 g - 1.2 g springs', '14k ring 4.75 g - 0.4 g stones x2'
		]
	},
	{
		name: 'Two rings', daysAgo: 2, hour: 12, seller: 'Philomel Drake-Osier', note: '', means: 'cash', roundedUpTo: '', again: true,
		lines: ['14k ring 2.94 g', '22k band 5.12 g']
	}
];

/** The lot that lies on the counter. */
export const demoOpenLot = {
	name: 'Spoon Fair, stall 9',
	hoursAgo: 1,
	ask: '2650',
	lines: [
		'14k chain 12.4 g x3',
		'18k ring 5.20 g - 0.35 g stones',
		'sterling forks 316.90 g x6',
		'dental Au 625 Pd 180 Ag 120 4.12 g',
		'1/20 14k gf chain 9.1 g',
		'half sovereign x1',
		'brass fitting 120 g x2',
		'weighted 925 candlestick 188.5 g',
		'14k hollow chain 20.00 g'
	]
} as const;

export const demoTesters = [
	{ id: 'demo-reader', name: 'Pocket reader', kind: 'fluorescence', checkedDaysAgo: 21 },
	{ id: 'demo-acids', name: 'Acids of the fair', kind: 'acids', checkedDaysAgo: 4 }
] as const;

/**
 * What was tested of the last piece on the counter, so many minutes ago: stone and reader believe the mark, the water does not. Nobody has cut it
 * yet: that is for whoever looks at the demo book.
 */
export const demoTests = {
	touch: { minutesAgo: 12, holds: '14', attackedBy: '18' },
	fluorescence: { minutesAgo: 10, reads: { Au: '588', Cu: '300', Ag: '104' } },
	water: { minutesAgo: 6, air: '20', water: '17.72', temperature: '21' }
} as const;
