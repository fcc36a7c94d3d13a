import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { sourcesIn, type Source } from '../tools/sources.ts';

/** The kinds that a file's switch statements name. */
function casesOf(source: Source): string[] {
	return collect(source, (node) => (ts.isCaseClause(node) && ts.isStringLiteral(node.expression) ? [node.expression.text] : []));
}

/** The kinds in the types whose names end in Problem: `{ kind: 'mass-changed'; ... }`. */
function declaredKinds(source: Source): string[] {
	const ofType = (node: ts.Node): string[] => {
		if (ts.isPropertySignature(node) && node.name.getText() === 'kind' && node.type !== undefined) return literals(node.type);
		const found: string[] = [];
		node.forEachChild((child) => void found.push(...ofType(child)));
		return found;
	};
	return collect(source, (node) => (ts.isTypeAliasDeclaration(node) && /Problem$/.test(node.name.text) ? ofType(node.type) : []));
}

function literals(type: ts.TypeNode): string[] {
	if (ts.isUnionTypeNode(type)) return type.types.flatMap(literals);
	return ts.isLiteralTypeNode(type) && ts.isStringLiteral(type.literal) ? [type.literal.text] : [];
}

/** Every text in a file's code, comments aside. */
function textsOf(source: Source): string[] {
	return collect(source, (node) => (ts.isStringLiteral(node) || ts.isNoSubstitutionTemplateLiteral(node) ? [node.text] : []));
}

function collect({ path, text }: Source, take: (node: ts.Node) => string[]): string[] {
	const found: string[] = [];
	const visit = (node: ts.Node) => {
		found.push(...take(node));
		ts.forEachChild(node, visit);
	};
	visit(ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true));
	return found;
}

/** A sentence for each kind of problem that lacks its sentence or its reproduction. */
function gaps(code: readonly Source[], catalogue: readonly Source[], reproductions: readonly Source[]): string[] {
	const spoken = new Set(catalogue.flatMap(casesOf));
	const reproduced = new Set(reproductions.flatMap(textsOf));
	const declared = code.flatMap((source) => declaredKinds(source).map((kind) => ({ kind, path: source.path })));
	return [
		...declared.filter(({ kind }) => !spoken.has(kind)).map(({ kind, path }) => `${path} has the problem ${kind}, which has no sentence in src/ui/sentences.ts.`),
		...[...spoken].filter((kind) => !reproduced.has(kind)).map((kind) => `The problem ${kind} has a sentence, but nothing under test/problems produces it.`)
	];
}

describe('every problem that a person can cause', () => {
	const code = sourcesIn('src/trade', 'src/storage').filter(({ path }) => path.endsWith('.ts'));
	const catalogue = sourcesIn('src/ui/sentences.ts');
	const reproductions = sourcesIn('test/problems').filter(({ path }) => path !== 'test/problems/coverage.test.ts');

	it('has a sentence, and a reproduction', () => {
		expect(catalogue.flatMap(casesOf).length).toBeGreaterThan(20);
		expect(gaps(code, catalogue, reproductions)).toEqual([]);
	});
});

describe('planted breaches', () => {
	const file = (path: string, text: string): Source => ({ path, text });
	const code = file('src/trade/mass/a.ts', "export type AProblem = { kind: 'a-one'; x: 1 } | { readonly kind: 'a-two' | 'a-three' };\ntype Other = { kind: 'b' };");
	const catalogue = (...kinds: string[]) =>
		file('src/ui/sentences.ts', `switch (p.kind) { ${kinds.map((kind) => `case '${kind}': return 'x';`).join(' ')} }`);
	const tests = (text: string) => file('test/problems/a.test.ts', text);

	it('nothing is said when each kind has both', () => {
		expect(gaps([code], [catalogue('a-one', 'a-two', 'a-three')], [tests("['a-one', 'a-two']; expect(k).toBe(`a-three`)")])).toEqual([]);
	});
	it('finds a kind without a sentence', () => {
		expect(gaps([code], [catalogue('a-one', 'a-two')], [tests("['a-one', 'a-two', 'a-three']")])).toEqual([
			'src/trade/mass/a.ts has the problem a-three, which has no sentence in src/ui/sentences.ts.'
		]);
	});
	it('finds a kind without a reproduction, also when a comment names it', () => {
		expect(gaps([code], [catalogue('a-one', 'a-two', 'a-three')], [tests("['a-one', 'a-two']; // 'a-three'")])).toEqual([
			'The problem a-three has a sentence, but nothing under test/problems produces it.'
		]);
	});
});
