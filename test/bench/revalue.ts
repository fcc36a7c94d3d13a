// A lot of 1 000 / 10 000 / 100 000 pieces in six metals: one price changes, the totals by metal and the value are read.
// Also: how many of a million lines end on a wrong cent.
import { addPieces, emptySums } from '../../src/trade/lot/sums.ts';
import { toNumber } from '../../src/trade/number/exact.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { withQuote } from '../../src/trade/price/price-sheet.ts';
import { valueOf } from '../../src/trade/price/value.ts';
import { wrongCents } from './shared/cents.ts';
import { drawLot, goldPrice, METALS, rowOf, SHEET } from './shared/lot.ts';
import { decimalPerPiece, floatLoop, spreadsheet, sql } from './shared/peers.ts';
import { interleave, print, row, type BenchRow } from './shared/table.ts';

const PRICES = Array.from({ length: 997 }, (_, n) => goldPrice(n).toFixed(2));
const price = (n: number) => PRICES[n % PRICES.length]!;
const rows: BenchRow[] = [];
const own = new Map<number, number>();

for (const many of [1_000, 10_000, 100_000]) {
	const lot = drawLot(many);
	const sums = addPieces(emptySums(), lot);
	if (METALS.some((metal) => sums.fine[metal] === undefined)) throw new Error('the lot does not hold all six metals');
	const given = lot.map(rowOf);
	let sheet = SHEET;
	const ours = {
		name: 'ours',
		run: (n: number) => {
			sheet = withQuote(sheet, { metal: 'Au', amount: decimal(price(n)), per: 'ozt' }, n);
			return toNumber(valueOf(sums.fine, sheet).total);
		}
	};
	const peers = [floatLoop(given), decimalPerPiece(given), await sql(given), spreadsheet(given)];
	const times = interleave([ours, ...peers.map(({ name, setGold }) => ({ name, run: (n: number) => setGold(price(n)) }))], many > 10_000 ? 5 : 9);
	own.set(many, times.get('ours')!);
	for (const { name } of peers) rows.push(row('revalue', `${many} pieces, one price`, times.get('ours')!, 'µs', name, times.get(name)!));
}
rows.push(row('revalue', '100000 pieces beside 1000', own.get(100_000)!, 'µs', 'ours at 1000 pieces', own.get(1_000)!));

const { lines, ties, ours, floats, decimals } = wrongCents(1_000_000);
const name = `wrong cents in ${lines} lines, ${ties} of them ties`;
rows.push(row('revalue', name, ours, 'lines', 'floats', floats));
rows.push(row('revalue', name, ours, 'lines', 'decimals of 40 digits, quotients used again', decimals));
print(rows);
if (ours !== 0 || floats === 0 || decimals === 0) {
	process.stderr.write('Expected no wrong cent of ours, and some of each naive route.\n');
	process.exitCode = 1;
}
