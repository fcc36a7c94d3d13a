// Counts from vitest's report: a test that did not run has not passed.

/** @typedef {{ passed: number, failed: number, notes: string[] }} Count */

/**
 * @param {string | null} report the JSON that vitest wrote; null when it wrote none
 * @param {number} exit vitest's exit code
 * @returns {Count}
 */
export function countTests(report, exit) {
	/** @type {Count} */
	const count = { passed: 0, failed: 0, notes: [] };
	/** @type {{ testResults?: { name: string, status: string, message?: string, assertionResults: { fullName: string, status: string }[] }[] }} */
	let read;
	try {
		read = JSON.parse(report ?? '');
	} catch {
		return { passed: 0, failed: 1, notes: [`vitest left no report (exit code ${exit})`] };
	}
	for (const file of read.testResults ?? []) {
		for (const test of file.assertionResults) {
			if (test.status === 'passed') {
				count.passed += 1;
				continue;
			}
			count.failed += 1;
			count.notes.push(test.status === 'failed' ? `failed: ${test.fullName}` : `${test.status}, which counts as failed: ${test.fullName}`);
		}
		if (file.assertionResults.length === 0) {
			count.failed += 1;
			count.notes.push(`${file.name}: no test ran${file.message ? ` (${file.message.split('\n')[0]})` : ''}`);
		}
	}
	if (count.passed + count.failed === 0) {
		count.failed += 1;
		count.notes.push('no test ran');
	}
	if (exit !== 0 && count.failed === 0) {
		count.failed += 1;
		count.notes.push(`vitest ended with exit code ${exit} although no test failed (an error outside of a test)`);
	}
	return count;
}
