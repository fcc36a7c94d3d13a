import { describe, expect, it } from 'vitest';
import { isMetalId, metalIds, metals } from '../../../src/trade/metal/metals.ts';

describe('the table of metals', () => {
	it('knows every metal under its own symbol, with a name of its own', () => {
		expect(metalIds).toHaveLength(21);
		for (const id of metalIds) expect(metals[id].id).toBe(id);
		expect(new Set(metalIds.map((id) => metals[id].name)).size).toBe(metalIds.length);
	});

	it('has densities with a small spread and melts every metal before it boils', () => {
		for (const id of metalIds) {
			const { density, densityU, melting, boiling, atomicMass } = metals[id];
			expect(density).toBeGreaterThan(2);
			expect(densityU).toBeGreaterThan(0);
			if (id !== 'C') {
				expect(densityU / density).toBeLessThan(0.01);
				expect(boiling).toBeGreaterThan(melting);
			}
			expect(atomicMass).toBeGreaterThan(10);
		}
	});

	it('calls gold, silver and the platinum metals precious and no other', () => {
		expect(metalIds.filter((id) => metals[id].precious).sort()).toEqual(['Ag', 'Au', 'Ir', 'Pd', 'Pt', 'Rh', 'Ru']);
	});

	it('tells symbols from other text', () => {
		expect(isMetalId('Au')).toBe(true);
		for (const text of ['au', 'gold', '', 'toString', '__proto__', 'Hg']) expect(isMetalId(text)).toBe(false);
	});
});
