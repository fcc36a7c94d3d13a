import { decimal } from '../number/decimal.ts';
import { ratio } from '../number/exact.ts';
import type { Mass } from '../mass/mass.ts';
import { fromPerMille, fromShare } from './fineness.ts';
import type { MarkContent } from './mark.ts';
import type { MetalId } from './metals.ts';

/** How a coin has lived: bullion was never spent; a circulated coin has lost metal in pockets and tills. */
export type CoinLife = 'bullion' | 'circulated-gold' | 'circulated-silver' | 'circulated-base';

export type Coin = {
	readonly id: string;
	readonly name: string;
	/** What people type, in lower case; a name shared by several coins is asked about. */
	readonly names: readonly string[];
	/** The mass by law or by the mint's specification, new. */
	readonly mass: Mass;
	readonly contents: readonly MarkContent[];
	/** mm; null where it is not known to us. */
	readonly diameter: string | null;
	readonly life: CoinLife;
	readonly source: string;
};

// masses by law in grains or ounces are written so and turned into grams exactly
const g = (text: string) => ({ grams: decimal(text) });
const grains = (text: string) => ({ grams: decimal(text).times(decimal('0.06479891')) });
const ounces = (text: string) => ({ grams: decimal(text).times(decimal('31.1034768')) });
/** One ounce fine in 22/24 gold: the whole is 12/11 of the fine gold, exactly divisible. */
const ouncesAt22 = (text: string) => ({ grams: decimal(text).times(decimal('31.1034768')).times(12).div(11) });

const at = (metal: MetalId, perMille: string): MarkContent => ({ metal, fineness: fromPerMille(decimal(perMille)) });
const share = (metal: MetalId, n: bigint, d: bigint): MarkContent => ({ metal, fineness: fromShare(ratio(n, d)) });
const au22 = [share('Au', 22n, 24n)];
const au900 = [at('Au', '900')];
const ag900 = [at('Ag', '900')];
const ag925 = [at('Ag', '925')];
const ag500 = [at('Ag', '500')];

const COINAGE_ACT = 'Coinage Act 1870 Sch. 1, kept by the Coinage Act 1971 Sch. 1 Part I';
const UK_SILVER = 'Coinage Act 1870 Sch. 1; half silver after the Coinage Act 1920, from memory';
const US_LAW = '31 U.S.C. 5112';
const US_GOLD = 'Act of 18 January 1837 and later Acts: 25.8 grains of 900 ‰ gold a dollar';
const US_DOLLAR = 'Act of 18 January 1837: 412.5 grains of 900 ‰ silver';
const US_1873 = 'Coinage Act of 1873, 17 Stat. 427: half dollar 12.5 g, quarter and dime in proportion; 900 ‰';
const LATIN = 'Latin Monetary Union treaty of 1865 (155 pieces of 20 francs from a kilogram of 900 ‰ gold), from memory';
const MEMORY = 'mint specification, from memory';

function coin(
	id: string,
	name: string,
	names: readonly string[],
	mass: Coin['mass'],
	contents: readonly MarkContent[],
	diameter: string | null,
	life: CoinLife,
	source: string
): Coin {
	return { id, name, names, mass, contents, diameter, life, source };
}

/** Common bullion and circulation coins. */
export const coinTable: readonly Coin[] = [
	coin('sovereign', 'Sovereign', ['gold sovereign', 'full sovereign', 'sov'], g('7.98805'), au22, '22.05', 'circulated-gold', COINAGE_ACT),
	coin('half-sovereign', 'Half sovereign', ['half sov', '1/2 sovereign'], g('3.99402'), au22, '19.30', 'circulated-gold', COINAGE_ACT),
	coin('two-pound-gold', 'Two pounds, gold', ['double sovereign'], g('15.97611'), au22, '28.40', 'circulated-gold', COINAGE_ACT),
	coin('five-pound-gold', 'Five pounds, gold', ['quintuple sovereign'], g('39.94028'), au22, '36.02', 'circulated-gold', COINAGE_ACT),
	coin(
		'krugerrand', 'Krugerrand', ['kruger', '1 oz krugerrand', '1oz krugerrand', 'gold krugerrand'],
		ouncesAt22('1'), au22, '32.77', 'bullion', MEMORY
	),
	coin(
		'krugerrand-half', 'Krugerrand 1/2 oz', ['half krugerrand', '1/2 oz krugerrand', '1/2 krugerrand'],
		ouncesAt22('0.5'), au22, '27.07', 'bullion', MEMORY
	),
	coin(
		'krugerrand-quarter', 'Krugerrand 1/4 oz', ['quarter krugerrand', '1/4 oz krugerrand', '1/4 krugerrand'],
		ouncesAt22('0.25'), au22, '22.06', 'bullion', MEMORY
	),
	coin(
		'krugerrand-tenth', 'Krugerrand 1/10 oz', ['tenth krugerrand', '1/10 oz krugerrand', '1/10 krugerrand'],
		ouncesAt22('0.1'), au22, '16.55', 'bullion', MEMORY
	),
	coin(
		'us-eagle-50', 'US 50 dollars bullion, gold', ['american eagle', 'gold eagle', 'american gold eagle', 'eagle'],
		g('33.931'), au22, '32.7', 'bullion', `${US_LAW}(a)(7)`
	),
	coin(
		'us-eagle-25', 'US 25 dollars bullion, gold', ['half ounce gold eagle', '1/2 oz gold eagle'],
		g('16.966'), au22, '27.0', 'bullion', `${US_LAW}(a)(8)`
	),
	coin(
		'us-eagle-10', 'US 10 dollars bullion, gold', ['quarter ounce gold eagle', '1/4 oz gold eagle'],
		g('8.483'), au22, '22.0', 'bullion', `${US_LAW}(a)(9)`
	),
	coin(
		'us-eagle-5', 'US 5 dollars bullion, gold', ['tenth ounce gold eagle', '1/10 oz gold eagle'],
		g('3.393'), au22, '16.5', 'bullion', `${US_LAW}(a)(10)`
	),
	coin(
		'us-silver-eagle', 'US dollar bullion, silver', ['american eagle', 'silver eagle', 'american silver eagle', 'eagle'],
		g('31.103'), [at('Ag', '999')], '40.6', 'bullion', `${US_LAW}(e)`
	),
	coin(
		'us-buffalo', 'US Buffalo, gold', ['buffalo', 'american buffalo', 'gold buffalo'],
		ounces('1'), [at('Au', '999.9')], '32.7', 'bullion', MEMORY
	),
	coin(
		'maple-gold', 'Maple Leaf, gold', ['maple leaf', 'gold maple', 'gold maple leaf', 'maple'],
		ounces('1'), [at('Au', '999.9')], '30', 'bullion', MEMORY
	),
	coin(
		'maple-silver', 'Maple Leaf, silver', ['maple leaf', 'silver maple', 'silver maple leaf', 'maple'],
		ounces('1'), [at('Ag', '999.9')], '38', 'bullion', MEMORY
	),
	coin(
		'philharmonic-gold', 'Philharmonic, gold', ['philharmonic', 'gold philharmonic'],
		ounces('1'), [at('Au', '999.9')], '37', 'bullion', MEMORY
	),
	coin(
		'philharmonic-silver', 'Philharmonic, silver', ['philharmonic', 'silver philharmonic'],
		ounces('1'), [at('Ag', '999')], '37', 'bullion', MEMORY
	),
	coin(
		'britannia-gold', 'Britannia, gold, 2013 on', ['britannia', 'gold britannia'],
		ounces('1'), [at('Au', '999.9')], '38.61', 'bullion', MEMORY
	),
	coin(
		'britannia-gold-22', 'Britannia, gold, to 2012', ['britannia', 'gold britannia', '22 carat britannia'],
		ouncesAt22('1'), au22, '32.69', 'bullion', MEMORY
	),
	coin(
		'britannia-silver', 'Britannia, silver, 2013 on', ['britannia', 'silver britannia'],
		ounces('1'), [at('Ag', '999')], '38.61', 'bullion', MEMORY
	),
	coin(
		'us-double-eagle', 'US 20 dollars, gold', ['double eagle', 'saint gaudens', 'liberty 20', '$20 gold', 'us $20 gold'],
		grains('516'), au900, '34.1', 'circulated-gold', US_GOLD
	),
	coin(
		'us-10-gold', 'US 10 dollars, gold', ['eagle', '$10 gold', 'us $10 gold', '$10 eagle'],
		grains('258'), au900, '27', 'circulated-gold', US_GOLD
	),
	coin(
		'us-5-gold', 'US 5 dollars, gold', ['half eagle', '$5 gold', 'us $5 gold'],
		grains('129'), au900, '21.6', 'circulated-gold', US_GOLD
	),
	coin(
		'us-2.5-gold', 'US 2.50 dollars, gold', ['quarter eagle', '$2.5 gold', '$2.50 gold'],
		grains('64.5'), au900, '18', 'circulated-gold', US_GOLD
	),
	coin(
		'francs-20', '20 francs, gold', ['20 francs', '20 franc', '20 fr', 'vreneli', 'napoleon', 'rooster', '20 lire'],
		g('6.45161'), au900, '21', 'circulated-gold', LATIN
	),
	coin('francs-10', '10 francs, gold', ['10 francs', '10 franc', '10 fr'], g('3.22580'), au900, '19', 'circulated-gold', LATIN),
	coin(
		'mark-20', '20 marks, gold', ['20 mark', '20 marks', 'german 20 mark'],
		g('7.965'), au900, '22.5', 'circulated-gold', 'German Coinage Act of 1873, from memory'
	),
	coin('ducat', 'Ducat, Austria', ['ducat', 'austrian ducat', '1 ducat'], g('3.4909'), [share('Au', 71n, 72n)], '20', 'bullion', MEMORY),
	coin(
		'ducat-4', 'Four ducats, Austria', ['4 ducat', '4 ducats', 'four ducat'],
		g('13.9636'), [share('Au', 71n, 72n)], '40', 'bullion', MEMORY
	),
	coin('corona-100', '100 corona, Austria', ['100 corona', '100 kronen'], g('33.8753'), au900, '37', 'bullion', MEMORY),
	coin('pesos-50', '50 pesos, Mexico', ['50 pesos', '50 peso', 'centenario'], g('41.6667'), au900, '37', 'bullion', MEMORY),
	coin(
		'us-dollar-silver', 'US silver dollar to 1935', ['silver dollar', 'morgan', 'morgan dollar', 'peace dollar'],
		grains('412.5'), ag900, '38.1', 'circulated-silver', US_DOLLAR
	),
	coin(
		'us-half-90', 'US half dollar to 1964', ['half dollar', '90% half', 'walking liberty', 'franklin half', 'silver half dollar'],
		g('12.5'), ag900, '30.6', 'circulated-silver', US_1873
	),
	coin('us-quarter-90', 'US quarter to 1964', ['silver quarter', '90% quarter'], g('6.25'), ag900, '24.3', 'circulated-silver', US_1873),
	coin(
		'us-dime-90', 'US dime to 1964', ['silver dime', '90% dime', 'mercury dime'],
		g('2.5'), ag900, '17.9', 'circulated-silver', US_1873
	),
	coin(
		'us-half-40', 'US half dollar 1965 to 1970', ['half dollar', '40% half', '40% half dollar'],
		g('11.5'), [at('Ag', '400'), at('Cu', '600')], '30.6', 'circulated-silver', 'Coinage Act of 1965, from memory'
	),
	coin(
		'us-war-nickel', 'US five cents 1942 to 1945', ['war nickel', 'silver nickel'],
		g('5'), [at('Ag', '350'), at('Cu', '560'), at('Mn', '90')], '21.2', 'circulated-silver', 'Act of 27 March 1942, from memory'
	),
	coin('uk-crown-925', 'UK crown to 1919', ['silver crown', 'uk crown'], g('28.27590'), ag925, '38.6', 'circulated-silver', UK_SILVER),
	coin('uk-half-crown-925', 'UK half crown to 1919', ['half crown'], g('14.13795'), ag925, '32.3', 'circulated-silver', UK_SILVER),
	coin('uk-florin-925', 'UK florin to 1919', ['florin'], g('11.31036'), ag925, '28.5', 'circulated-silver', UK_SILVER),
	coin('uk-shilling-925', 'UK shilling to 1919', ['shilling'], g('5.65518'), ag925, '23.6', 'circulated-silver', UK_SILVER),
	coin('uk-sixpence-925', 'UK sixpence to 1919', ['sixpence'], g('2.82759'), ag925, '19.4', 'circulated-silver', UK_SILVER),
	coin('uk-half-crown-500', 'UK half crown 1920 to 1946', ['half crown'], g('14.13795'), ag500, '32.3', 'circulated-silver', UK_SILVER),
	coin('uk-florin-500', 'UK florin 1920 to 1946', ['florin'], g('11.31036'), ag500, '28.5', 'circulated-silver', UK_SILVER),
	coin('uk-shilling-500', 'UK shilling 1920 to 1946', ['shilling'], g('5.65518'), ag500, '23.6', 'circulated-silver', UK_SILVER),
	coin('uk-sixpence-500', 'UK sixpence 1920 to 1946', ['sixpence'], g('2.82759'), ag500, '19.4', 'circulated-silver', UK_SILVER),
	coin(
		'canada-dollar-800', 'Canadian dollar to 1967', ['canadian silver dollar', 'canadian dollar'],
		g('23.3276'), [at('Ag', '800')], '36', 'circulated-silver', MEMORY
	),
	coin(
		'francs-5-silver', '5 francs, silver', ['5 francs', '5 franc', '5 fr'],
		g('25'), ag900, '37', 'circulated-silver', 'Latin Monetary Union treaty of 1865, from memory'
	),
	coin(
		'mark-silver', '1 mark, German Empire', ['silver mark'],
		g('5.5556'), ag900, '24', 'circulated-silver', 'German Coinage Act of 1873, from memory'
	),
	coin(
		'rupee-silver', 'Rupee, silver, to 1939', ['silver rupee', 'rupee'],
		grains('180'), [share('Ag', 11n, 12n)], '30.5', 'circulated-silver',
		'Indian Coinage Act 1906 (180 grains, eleven twelfths), from memory'
	),
	coin(
		'thaler-maria-theresa', 'Maria Theresa thaler', ['maria theresa', 'thaler', 'mtt'],
		g('28.0668'), [share('Ag', 5n, 6n)], '39.5', 'circulated-silver', MEMORY
	),
	coin(
		'us-5-cent', 'US five cents', ['us nickel', 'nickel five cents'],
		g('5'), [at('Cu', '750'), at('Ni', '250')], '21.2', 'circulated-base', `${US_LAW}(a)(5) and (b)`
	),
	coin(
		'us-cent-bronze', 'US cent to 1982', ['copper cent', 'copper penny'],
		g('3.11'), [at('Cu', '950'), at('Zn', '50')], '19.05', 'circulated-base', `${US_LAW}(a)(6); composition from memory`
	)
];
