import type { Tester, TesterKind } from '$trade/evidence/tester.ts';
import { testerDefaults, type TesterFigures } from '$trade/evidence/tester-figures.ts';

/** Who reads a test: a tester of the book, or one that nobody has described, with working defaults. */
export type Reader = TesterFigures & { readonly id: string | null; readonly name: string };

/** The testers of a kind, and last one that is not in the book. */
export function readersOf(kind: TesterKind, testers: readonly Tester[]): Reader[] {
	const own = testers.filter((tester) => tester.kind === kind);
	const other: Reader = { id: null, name: own.length === 0 ? 'working defaults' : 'another, working defaults', ...testerDefaults[kind] };
	return [...own, other];
}
