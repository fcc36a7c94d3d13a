import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { origins } from '../../../src/trade/evidence/origin.ts';
import { articleClass, classKey } from '../../../src/trade/piece/class.ts';

describe('the class of a piece', () => {
	it.each([
		['Gold rings', 'ring'], ['curb chain', 'chain'], ['necklace', 'chain'], ['6 forks', 'flatware'], ['dishes', 'other'], ['brooches', 'brooch'],
		['crosses', 'pendant'], ['dental crown', 'dental'], ['watch case', 'watch'], ['sovereign', 'coin'], ['krugerrand', 'coin'], ['', 'other'], ['constructor', 'other']
	])('%s is %s', (article, name) => expect(articleClass(article)).toBe(name));

	it('is stamp, article and origin', () => {
		expect(classKey({ stamp: '14 KT', article: 'Gold chains', origin: 'us-modern' })).toBe('14 kt|chain|us-modern');
		expect(classKey({ stamp: ' ', article: 'thing', origin: 'unmarked' })).toBe('no mark|other|unmarked');
	});

	it('has three parts whatever is typed, so that no text can be mistaken for another class', () => {
		fc.assert(
			fc.property(fc.string(), fc.string(), fc.constantFrom(...origins), (stamp, article, origin) => {
				expect(classKey({ stamp, article, origin }).split('|').length).toBe(3);
			}),
			{ numRuns: 1_000 }
		);
	});
});
