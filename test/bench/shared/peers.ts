import { HyperFormula } from 'hyperformula';
import initSql from 'sql.js';
import { Decimal, decimal } from '../../../src/trade/number/decimal.ts';
import { METALS, SHEET, type Row } from './lot.ts';

/** What a person would use instead: it holds the lot, takes a new gold price or mass, and says the value of the lot. */
export type Peer = {
	readonly name: string;
	readonly setGold: (price: string) => number;
	readonly setMass: (row: number, grams: string) => number;
};

const OZT = 31.1034768;
const pricesPerGram = (): number[] => SHEET.quotes.map(({ amount, per }) => amount.toNumber() / (per === 'ozt' ? OZT : 1000));

/** A loop over an object for each piece, in floats. */
export function floatLoop(given: readonly Row[]): Peer {
	const rows = given.map(({ grams, shares }) => ({ grams, Au: shares[0]!, Ag: shares[1]!, Pt: shares[2]!, Pd: shares[3]!, Cu: shares[4]!, Zn: shares[5]! }));
	const prices = pricesPerGram();
	const total = () => {
		const fine = { Au: 0, Ag: 0, Pt: 0, Pd: 0, Cu: 0, Zn: 0 };
		for (const each of rows) for (const metal of METALS) fine[metal] += each.grams * each[metal];
		return METALS.reduce((value, metal, i) => value + fine[metal] * prices[i]!, 0);
	};
	return {
		name: 'float loop over objects',
		setGold: (price) => {
			prices[0] = Number(price) / OZT;
			return total();
		},
		setMass: (row, grams) => {
			rows[row]!.grams = Number(grams);
			return total();
		}
	};
}

/** decimal.js for each piece and metal. */
export function decimalPerPiece(given: readonly Row[]): Peer {
	const rows = given.map(({ grams, shares }) => ({ grams: new Decimal(grams.toFixed(2)), shares: shares.map((share) => new Decimal(share)) }));
	const prices = SHEET.quotes.map(({ amount, per }) => amount.div(per === 'ozt' ? '31.1034768' : '1000'));
	const total = () => {
		let value = decimal('0');
		for (const { grams, shares } of rows) shares.forEach((share, i) => (value = share.isZero() ? value : value.plus(grams.times(share).times(prices[i]!))));
		return value.toNumber();
	};
	return {
		name: 'decimal.js per piece',
		setGold: (price) => {
			prices[0] = decimal(price).div('31.1034768');
			return total();
		},
		setMass: (row, grams) => {
			rows[row]!.grams = decimal(grams);
			return total();
		}
	};
}

/** A general spreadsheet engine: one row a piece, fine grams by metal in six columns and the value of the row in a seventh; sums on a sheet of their own. */
export function spreadsheet(given: readonly Row[]): Peer {
	const prices = pricesPerGram();
	const columns = ['H', 'I', 'J', 'K', 'L', 'M'];
	const shares = ['B', 'C', 'D', 'E', 'F', 'G'];
	const pieces = given.map((row, i) => [
		row.grams,
		...row.shares,
		...shares.map((column) => `=A${i + 1}*${column}${i + 1}`),
		`=${columns.map((column, k) => `${column}${i + 1}*totals!B${k + 1}`).join('+')}`
	]);
	const totals = METALS.map((metal, k) => [metal, prices[k]!, `=SUM(pieces!${columns[k]!}1:${columns[k]!}${given.length})`]);
	const sheets = { pieces, totals: [...totals, ['value', 0, `=SUM(pieces!N1:N${given.length})`]] };
	const engine = HyperFormula.buildFromSheets(sheets, { licenseKey: 'gpl-v3', maxRows: 200_000 });
	const [piecesId, totalsId] = [engine.getSheetId('pieces')!, engine.getSheetId('totals')!];
	const read = () => {
		for (let k = 0; k < METALS.length; k += 1) engine.getCellValue({ sheet: totalsId, row: k, col: 2 });
		return Number(engine.getCellValue({ sheet: totalsId, row: METALS.length, col: 2 }));
	};
	return {
		name: 'hyperformula (spreadsheet engine)',
		setGold: (price) => {
			engine.setCellContents({ sheet: totalsId, row: 0, col: 1 }, Number(price) / OZT);
			return read();
		},
		setMass: (row, grams) => {
			engine.setCellContents({ sheet: piecesId, row, col: 0 }, Number(grams));
			return read();
		}
	};
}

/** SQL in memory: one row a piece, prices in a table, a query for the totals by metal. */
export async function sql(given: readonly Row[]): Promise<Peer> {
	const engine = await initSql();
	const db = new engine.Database();
	db.run('CREATE TABLE piece (id INTEGER PRIMARY KEY, grams REAL, Au REAL, Ag REAL, Pt REAL, Pd REAL, Cu REAL, Zn REAL)');
	db.run('CREATE TABLE price (metal TEXT PRIMARY KEY, per_gram REAL)');
	db.run('BEGIN');
	const insert = db.prepare('INSERT INTO piece VALUES (?, ?, ?, ?, ?, ?, ?, ?)');
	given.forEach(({ grams, shares }, i) => insert.run([i, grams, ...shares]));
	pricesPerGram().forEach((price, i) => db.run('INSERT INTO price VALUES (?, ?)', [METALS[i]!, price]));
	db.run('COMMIT');
	const sums = METALS.map((metal) => `SUM(grams * ${metal})`).join(', ');
	const totals = db.prepare(`SELECT ${sums} FROM piece`);
	const prices = db.prepare('SELECT per_gram FROM price WHERE metal = ?');
	const setPrice = db.prepare('UPDATE price SET per_gram = ? WHERE metal = ?');
	const setGrams = db.prepare('UPDATE piece SET grams = ? WHERE id = ?');
	const read = () => {
		totals.step();
		const fine = totals.get() as number[];
		totals.reset();
		return METALS.reduce((value, metal, i) => {
			prices.bind([metal]);
			prices.step();
			const [price] = prices.get() as number[];
			prices.reset();
			return value + fine[i]! * price!;
		}, 0);
	};
	return {
		name: 'sql.js',
		setGold: (price) => {
			setPrice.run([Number(price) / OZT, 'Au']);
			return read();
		},
		setMass: (row, grams) => {
			setGrams.run([Number(grams), row]);
			return read();
		}
	};
}
