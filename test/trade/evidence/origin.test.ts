import { describe, expect, it } from 'vitest';
import { isOrigin, origins } from '../../../src/trade/evidence/origin.ts';

describe('the origin of a piece', () => {
	it('is one of a closed list', () => {
		expect(origins.every(isOrigin)).toBe(true);
		expect(isOrigin('moon')).toBe(false);
	});
});
