import { describe, expect, it } from 'vitest';
import { metalIds } from '../../../src/trade/metal/metals.ts';
import { metalsOfStamp, metalWords, stampsOf } from '../../../src/trade/metal/stamps.ts';

describe('figures without a metal', () => {
	it('mean gold, silver or platinum alone where only one is usual', () => {
		for (const gold of ['333', '375', '417', '583', '585', '750', '916']) expect(metalsOfStamp(gold)).toEqual(['Au']);
		for (const silver of ['800', '830', '835', '925', '958']) expect(metalsOfStamp(silver)).toEqual(['Ag']);
		expect(metalsOfStamp('850')).toEqual(['Pt']);
	});

	it('are open between metals where several are usual, and unknown otherwise', () => {
		for (const open of ['500', '900', '950', '999']) expect(metalsOfStamp(open)!.length).toBeGreaterThan(1);
		for (const text of ['586', '14', '', 'toString']) expect(metalsOfStamp(text)).toBeNull();
	});

	it('offer each metal the stamps that name it', () => {
		expect(stampsOf('Pd')).toEqual(['500', '950', '999', '999.5']);
		expect(stampsOf('Cu')).toEqual([]);
	});

	it('know words only for metals of the table', () => {
		for (const metal of metalWords.values()) expect(metalIds).toContain(metal);
		for (const word of metalWords.keys()) expect(word).toBe(word.toLowerCase());
	});
});
