import { describe, expect, it } from 'vitest';
import { parseLine } from '../../../src/trade/lot/line.ts';
import { subjectOf, usualBuild } from '../../../src/trade/piece/subject.ts';

function of(line: string, parts: object = {}) {
	const read = parseLine(line, { mark: 'dot' });
	if (!read.ok) throw new Error(JSON.stringify(read.problem));
	return subjectOf({ ...read.value, ...parts });
}

describe('what a piece claims to be', () => {
	it('follows mark, law and article', () => {
		expect(of('14k ring 5.2g')).toEqual({ metal: 'Au', claimed: 1750 / 3, legal: 1750 / 3 - 3, origin: 'us-modern', build: 'solid', coin: null });
		expect(of('14k chain 12.4g')).toMatchObject({ legal: 1750 / 3 - 7, build: 'jointed' });
		// half a karat, and one karat with solder, before October 1981
		expect(of('14k ring 5.2g', { origin: 'us-before-1981' })).toMatchObject({ legal: 562.5 });
		expect((of('14k chain 5.2g', { origin: 'us-before-1981' }) as { legal: number }).legal).toBeCloseTo(1750 / 3 - 1000 / 24, 9);
		expect(of('sterling forks 316.90 g x6', { origin: 'us-modern' })).toMatchObject({ metal: 'Ag', claimed: 925, legal: 921 });
		expect(of('585 chain 12.4 g')).toMatchObject({ claimed: 585, legal: 585, origin: 'uncontrolled' });
	});

	it('is the gold of a piece of several metals, and the metal that was taken', () => {
		expect(of('dental Au 625 Pd 180 Ag 120 4.12 g')).toMatchObject({ metal: 'Au', claimed: 625, build: 'jointed' });
		expect(of('Pt 950 ring 6 g')).toMatchObject({ metal: 'Pt', claimed: 950 });
	});

	it('is no claim without a mark, and a coin claims what its law says', () => {
		expect(of('14k ring 5.2g', { mark: '', origin: 'unmarked' })).toMatchObject({ metal: 'Au', claimed: null, legal: null });
		expect(of('sovereign x2')).toMatchObject({ metal: 'Au', coin: 'sovereign', build: 'solid' });
		expect((of('sovereign x2') as { claimed: number }).claimed).toBeCloseTo(916.667, 3);
	});

	it('is nothing to test where the mark itself says layer, or nothing precious is taken', () => {
		expect(of('1/20 14k gf 9.1g')).toBe('a-layer-by-its-mark');
		expect(of('weighted sterling candlestick 400 g')).toBe('a-layer-by-its-mark');
		expect(of('brass fitting 120 g')).toBe('no-precious-metal');
	});

	it('is hollow when its name says so, or the buyer', () => {
		expect(usualBuild('hollow rope chain')).toBe('hollow');
		expect(usualBuild('signet ring')).toBe('solid');
		expect(of('14k chain 12.4g', { evidence: { build: 'hollow', findings: [], belief: null, taking: null } })).toMatchObject({ build: 'hollow' });
	});
});
