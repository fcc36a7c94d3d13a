import { describe, expect, it } from 'vitest';
import { parseLine, type LineProblem } from '$trade/lot/line.ts';
import { readTable } from '$trade/lot/table.ts';
import type { Result } from '$trade/number/result.ts';
import { parseNumber } from '$trade/number/field.ts';
import type { BackupProblem } from '$storage/backup-format.ts';
import type { StorageProblem } from '$storage/problem.ts';
import { Format } from '$ui/format.ts';
import { sentence, type Problem } from '$ui/sentences.ts';

/** Storage is not known to components, so this is where it is held that every one of its problems has a sentence. */
const ofStorage = (problem: StorageProblem | BackupProblem): Problem => problem;

function said(result: Result<unknown, Problem>, language = 'en'): string {
	if (result.ok) throw new Error('no problem where one was wanted');
	return sentence(result.problem, new Format(language)).replaceAll('\u00a0', ' ');
}

describe('sentences', () => {
	it('say what was found and what to do', () => {
		expect(said(parseNumber('12x'))).toBe('“12x” is not a number we can read. Write it like 12.30 or 12,30.');
		expect(said(parseNumber('1,234'))).toBe('“1,234” can be read two ways: a little over 1, or 1234. Which is it?');
		expect(said(parseLine('14k chain'))).toBe('The mass is missing. Write it with its unit, such as 12.4g or 8 dwt.');
	});
	it('speak of a number inside a line as of a number in a field', () => {
		expect(said(parseLine('14k chain 1,234 g'))).toBe('“1,234” can be read two ways: a little over 1, or 1234. Which is it?');
	});
	it('name the column of a table', () => {
		const { refused } = readTable('mark,mass,unit\n14k,12.4,parsec\n');
		expect(refused.map(({ problem }) => sentence(problem))).toEqual([expect.stringMatching(/parsec/)]);
	});
	it('write figures in the language of numbers', () => {
		const over: Problem = { kind: 'piece-contents-over-1000', perMille: { n: 20_005n, d: 10n } };
		expect(sentence(over, new Format('de'))).toContain('2.000,5 parts');
		expect(sentence(over)).toContain('2,000.5 parts');
	});
	it('say of every failed save that what was typed is kept, or that nothing was changed', () => {
		const failures: (StorageProblem | BackupProblem)[] = [
			{ kind: 'storage-quota', reason: 'QuotaExceededError' },
			{ kind: 'storage-failed', reason: 'UnknownError' },
			{ kind: 'storage-lost', reason: 'InvalidStateError' },
			{ kind: 'backup-not-ours' },
			{ kind: 'backup-cancelled' },
			{ kind: 'backup-cut-short', line: 7 },
			{ kind: 'backup-damaged', line: 7, what: 'not a record' }
		];
		for (const problem of failures) expect(sentence(ofStorage(problem))).toMatch(/still here|Nothing was changed/);
	});
	it('never show a raw value of a program', () => {
		const lines = ['', 'x', '14k', '14k 12', '14k 5g 6g', '14k 18k 5g', '99k 5g', '14k ring 5g -9g stones', '3 x 12.4 g 14k', 'sovereign 5g'];
		const problems = lines.map((line) => parseLine(line)).flatMap((read): LineProblem[] => (read.ok ? [] : [read.problem]));
		expect(problems.length).toBeGreaterThan(6);
		for (const problem of problems) expect(sentence(problem)).not.toMatch(/undefined|\[object|NaN|null|Infinity/);
	});
});
