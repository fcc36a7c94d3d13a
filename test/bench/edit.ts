// A lot of 1 000 / 10 000 / 100 000 pieces in six metals: the mass of one piece is typed anew, the totals by metal and the value are read.
import { addPiece, addPieces, emptySums, removePiece } from '../../src/trade/lot/sums.ts';
import { toNumber } from '../../src/trade/number/exact.ts';
import { valueOf } from '../../src/trade/price/value.ts';
import { drawLot, rowOf, SHEET, withMass } from './shared/lot.ts';
import { decimalPerPiece, floatLoop, spreadsheet, sql } from './shared/peers.ts';
import { interleave, print, row, type BenchRow } from './shared/table.ts';

const MASSES = Array.from({ length: 997 }, (_, n) => (1 + n / 20).toFixed(2));
const grams = (n: number) => MASSES[n % MASSES.length]!;
const rows: BenchRow[] = [];
const own = new Map<number, number>();

for (const many of [1_000, 10_000, 100_000]) {
	const lot = drawLot(many);
	const given = lot.map(rowOf);
	// always the same piece, in the middle, so that every side holds the same lot after the same edit
	const place = many / 2;
	const { key } = lot[place]!;
	let { piece } = lot[place]!;
	let sums = addPieces(emptySums(), lot);
	const ours = {
		name: 'ours',
		run: (n: number) => {
			const after = withMass(piece, grams(n));
			sums = addPiece(removePiece(sums, piece, key), after, key);
			piece = after;
			return toNumber(valueOf(sums.fine, SHEET).total);
		}
	};
	const peers = [floatLoop(given), decimalPerPiece(given), await sql(given), spreadsheet(given)];
	const times = interleave(
		[ours, ...peers.map(({ name, setMass }) => ({ name, run: (n: number) => setMass(place, grams(n)) }))],
		many > 10_000 ? 5 : 9
	);
	own.set(many, times.get('ours')!);
	for (const { name } of peers) rows.push(row('edit', `${many} pieces, one mass`, times.get('ours')!, 'µs', name, times.get(name)!));
}
rows.push(row('edit', '100000 pieces beside 1000', own.get(100_000)!, 'µs', 'ours at 1000 pieces', own.get(1_000)!));
print(rows);
