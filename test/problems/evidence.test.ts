import { describe, expect, it } from 'vitest';
import { densityByWater, type WaterProblem } from '../../src/trade/evidence/water-weighing.ts';
import { decimal } from '../../src/trade/number/decimal.ts';
import { formatFor } from '../../src/ui/format.ts';
import { sentence } from '../../src/ui/sentences.ts';

function hung(air: string, water: string, temperature = '20'): WaterProblem {
	const found = densityByWater({ method: 'suspended', air: decimal(air), water: decimal(water), division: decimal('0.01'), temperature: decimal(temperature) });
	if (found.ok) throw new Error('no problem');
	return found.problem;
}

const reproductions: { readonly [K in WaterProblem['kind']]: () => WaterProblem } = {
	'water-temperature': () => hung('20', '18', '55'),
	'water-mass-not-positive': () => hung('0', '0'),
	'water-no-loss': () => hung('18', '20'),
	'water-density-unlikely': () => hung('20', '19.9')
};

describe('problems of tests', () => {
	it.each(Object.entries(reproductions))('%s is produced and said', (kind, make) => {
		const problem = make();
		expect(problem.kind).toBe(kind);
		expect(sentence(problem, formatFor('en')).length).toBeGreaterThan(30);
	});
	it('name the figures that are wrong', () => {
		expect(sentence(hung('20', '18', '55'), formatFor('en'))).toMatch(/55\s°C.*0 to 40/);
		expect(sentence(hung('20', '19.9'), formatFor('en'))).toMatch(/199.*1 to 25/);
	});
});
