// Estimates pieces in a thread of its own and says how far it is: what the app does with a book of twenty thousand.
import { parentPort, workerData } from 'node:worker_threads';
import { assess } from '../../../src/trade/evidence/assess.ts';
import { startOf } from '../../../src/trade/evidence/start.ts';
import { drawTested } from './tested.ts';

const { rounds, each, step } = workerData as { rounds: number; each: number; step: number };

for (let round = 0; round < rounds; round += 1) {
	const pieces = Array.from({ length: each }, (_, index) => drawTested(round * each + index));
	const begin = process.hrtime.bigint();
	let means = 0;
	pieces.forEach(({ subject, findings }, index) => {
		means += assess(startOf(subject), findings).mean;
		if ((index + 1) % step === 0) parentPort!.postMessage({ done: round * each + index + 1 });
	});
	parentPort!.postMessage({ round, microseconds: Number(process.hrtime.bigint() - begin) / 1_000 / each, mean: means / each });
}
