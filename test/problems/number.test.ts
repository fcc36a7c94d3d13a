import { describe, expect, it } from 'vitest';
import { parseNumber, type NumberProblem, type NumberRules } from '../../src/trade/number/field.ts';

/** Each kind from what a person would really type. A kind without a row does not compile. */
const reproductions: Record<NumberProblem['kind'], readonly [typed: string, rules?: NumberRules]> = {
	'number-missing': ['  '],
	'number-unreadable': ['12 g'],
	'number-ambiguous': ['1,234'],
	'number-negative': ['-3'],
	'number-not-positive': ['0.00', { positive: true }],
	'number-not-whole': ['2.5', { whole: true }],
	'number-too-large': ['12000', { most: '9999' }],
	'number-too-many-digits': ['0.1234567890123456']
};

describe('problems with a typed number', () => {
	it.each(Object.entries(reproductions))('%s', (kind, [typed, rules]) => {
		const result = parseNumber(typed, rules);
		expect(result.ok ? 'read' : result.problem.kind).toBe(kind);
	});
});
