import { describe, expect, it } from 'vitest';
import { countTests } from './count.js';

const report = (...files: { name: string; message?: string; tests: [string, string][] }[]) =>
	JSON.stringify({
		testResults: files.map(({ name, message, tests }) => ({
			name,
			message,
			status: 'passed',
			assertionResults: tests.map(([fullName, status]) => ({ fullName, status }))
		}))
	});

describe('the count of tests', () => {
	it('counts what passed', () => {
		expect(countTests(report({ name: 'a', tests: [['x', 'passed'], ['y', 'passed']] }), 0)).toEqual({ passed: 2, failed: 0, notes: [] });
	});
	it.each(['failed', 'skipped', 'pending', 'todo'])('counts a test that %s as failed', (status) => {
		const count = countTests(report({ name: 'a', tests: [['x', 'passed'], ['y', status]] }), 0);
		expect(count).toMatchObject({ passed: 1, failed: 1 });
		expect(count.notes).toEqual([expect.stringContaining('y')]);
	});
	it('counts a file that could not be read as failed, with the reason', () => {
		const count = countTests(report({ name: 'a', message: 'no such module\n  at line 1', tests: [] }, { name: 'b', tests: [['x', 'passed']] }), 1);
		expect(count).toEqual({ passed: 1, failed: 1, notes: ['a: no test ran (no such module)'] });
	});
	it('counts a crash, a missing report and an empty run as failed', () => {
		expect(countTests(null, 139)).toEqual({ passed: 0, failed: 1, notes: ['vitest left no report (exit code 139)'] });
		expect(countTests('{', 1).failed).toBe(1);
		expect(countTests(report(), 0)).toEqual({ passed: 0, failed: 1, notes: ['no test ran'] });
		expect(countTests(report({ name: 'a', tests: [['x', 'passed']] }), 1)).toMatchObject({ passed: 1, failed: 1 });
	});
});
