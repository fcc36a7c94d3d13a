import { describe, expect, it } from 'vitest';
import { readTokens } from '../../../src/trade/metal/mark-tokens.ts';

const read = (text: string) => {
	const tokens = readTokens(text);
	return tokens === null
		? null
		: {
				karats: tokens.karats.map(String), figures: tokens.figures.map(String), metals: tokens.metals,
				fraction: tokens.fraction === null ? null : `${tokens.fraction.n}/${tokens.fraction.d}`, plumb: tokens.plumb, words: tokens.words
			};
};
const none = { karats: [], figures: [], metals: [], fraction: null, plumb: false, words: [] };

describe('the parts of a stamp', () => {
	it.each([
		['14k', { ...none, karats: ['14'] }],
		['k 14', { ...none, karats: ['14'] }],
		['14kp', { ...none, karats: ['14'], plumb: true }],
		['14kgf', { ...none, karats: ['14'], words: ['gf'] }],
		['1/20 12 kt g.f.', { ...none, karats: ['12'], fraction: '1/20', words: ['gf'] }],
		['925/1000', { ...none, figures: ['925'] }],
		['.925', { ...none, figures: ['925'] }],
		['0,925', { ...none, figures: ['925'] }],
		['99999', { ...none, figures: ['999.99'] }],
		['92.5% silver', { ...none, figures: ['925'], metals: ['Ag'] }],
		['pt950', { ...none, figures: ['950'], metals: ['Pt'] }],
		['950-pt', { ...none, figures: ['950'], metals: ['Pt'] }],
		['14k yellow gold', { ...none, karats: ['14'], metals: ['Au'] }],
		['au 625 pd 180', { ...none, figures: ['625', '180'], metals: ['Au', 'Pd'] }]
	])('are told apart in "%s"', (text, parts) => expect(read(text)).toEqual(parts));

	it.each(['-585', '+14k', 'x', '14k k', 'kt', '14k!', '1e9', '½', '1/20 1/10', '1234567/20', '1234567890123', 'k58%'])(
		'are refused in "%s"',
		(text) => expect(readTokens(text)).toBeNull()
	);
});
