import { describe, expect, it } from 'vitest';
import { pooled, pooledDensities } from '../../../src/trade/evidence/pool.ts';
import { core, karat, magnet, reading, touch } from './some-findings.ts';

describe('one test made again', () => {
	it('is one reading, the mean, by the same tester', () => {
		const found = pooled([reading(580), reading(590), reading(588, { tester: 'y' }), core(580)], 'Au');
		expect(found.map(({ kind }) => kind)).toEqual(['fluorescence', 'fluorescence', 'core']);
		const [own, other] = found;
		expect(own?.kind === 'fluorescence' && own.reads[0]!.perMille.toNumber()).toBe(585);
		expect(other?.kind === 'fluorescence' && other.reads[0]!.perMille.toNumber()).toBe(588);
		expect(own?.kind === 'fluorescence' && own.u).toBe(16);
	});
	it('is two readings when they are far apart', () => {
		expect(pooled([reading(580), reading(417)], 'Au')).toHaveLength(2);
	});
	it('is one streak between the same acids', () => {
		expect(pooled([touch(), touch(), touch({ how: 'notch' }), touch({ holds: karat(10) }), touch({ tester: 'z' })], 'Au')).toHaveLength(4);
	});
	it('leaves the rest as it is', () => {
		const found = [magnet('none'), magnet('weak')];
		expect(pooled(found, 'Au')).toEqual(found);
	});
	it('joins densities that agree, in any order', () => {
		const [a, b, c] = [{ density: 13.2, u: 0.05 }, { density: 13.26, u: 0.04 }, { density: 8.7, u: 0.05 }];
		const joined = pooledDensities([a, b, c]);
		expect(joined).toHaveLength(2);
		expect(joined[1]!.density).toBeCloseTo(13.23, 9);
		expect(joined[1]!.u).toBe(0.04);
		expect(pooledDensities([c, b, a])).toEqual(joined);
	});
});
