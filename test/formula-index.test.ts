import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { sourcesIn, type Source } from './tools/sources.ts';

const INDEX = 'src/trade/README.md';

/** The lines that the head of a formula carries beside "formula:". */
const WITH_IT = ['rounding:', 'source:'];

type Row = { readonly line: number; readonly file: string; readonly name: string };

/** The rows of the index that name a function, and a sentence for each row that cannot be read. */
function rowsOf(text: string): { rows: Row[]; said: string[] } {
	const rows: Row[] = [];
	const said: string[] = [];
	text.split('\n').forEach((line, index) => {
		if (!line.startsWith('|') || /^\|\s*(quantity\s*\||-)/.test(line)) return;
		const cells = line
			.replace(/^\||\|\s*$/g, '')
			.split(/(?<!\\)\|/)
			.map((cell) => cell.trim());
		const place = /^`?([a-z][\w./-]*\.ts) (\w+)`?$/.exec(cells[2] ?? '');
		if (cells.length !== 4 || cells.some((cell) => cell === '') || place === null) {
			said.push(`${INDEX}:${index + 1} is not "quantity | formula in words | folder/file.ts functionName | source".`);
		} else {
			rows.push({ line: index + 1, file: `src/trade/${place[1]!}`, name: place[2]! });
		}
	});
	return { rows, said };
}

type Head = { readonly name: string; readonly head: string };

/** The functions that a file exports, each with the comment at its head. */
function functionsOf({ path, text }: Source): Head[] {
	const file = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true);
	return file.statements.flatMap((statement): Head[] => {
		if (!ts.canHaveModifiers(statement)) return [];
		if (ts.getModifiers(statement)?.some((modifier) => modifier.kind === ts.SyntaxKind.ExportKeyword) !== true) return [];
		const head = (ts.getLeadingCommentRanges(text, statement.pos) ?? [])
			.slice(-1)
			.map(({ pos, end }) => text.slice(pos, end))
			.join('');
		if (ts.isFunctionDeclaration(statement)) return statement.name === undefined ? [] : [{ name: statement.name.text, head }];
		if (!ts.isVariableStatement(statement)) return [];
		return statement.declarationList.declarations
			.filter(({ initializer }) => initializer !== undefined && (ts.isArrowFunction(initializer) || ts.isFunctionExpression(initializer)))
			.map((declaration) => ({ name: declaration.name.getText(file), head }));
	});
}

/** A sentence for each place where the index and the code disagree. */
function disagreements(index: string, sources: readonly Source[]): string[] {
	const { rows, said } = rowsOf(index);
	const functions = new Map(sources.map((source) => [source.path, functionsOf(source)]));
	for (const { line, file, name } of rows) {
		const inFile = functions.get(file);
		if (inFile === undefined) said.push(`${INDEX}:${line} names ${file}, which is not there.`);
		else if (!inFile.some((one) => one.name === name)) said.push(`${INDEX}:${line} names ${name}, which ${file} does not export.`);
	}
	const seen = new Set<string>();
	for (const { line, file, name } of rows) {
		if (seen.has(`${file} ${name}`)) said.push(`${INDEX}:${line} names ${name} of ${file} a second time.`);
		seen.add(`${file} ${name}`);
	}
	for (const [file, heads] of functions) {
		for (const { name, head } of heads) {
			if (!/^\s*\*?\s*(\/\*\*\s*)?formula:/m.test(head)) continue;
			if (!seen.has(`${file} ${name}`)) said.push(`${file} exports the formula ${name}, which is not in ${INDEX}.`);
			for (const part of WITH_IT) if (!head.includes(part)) said.push(`${file}: the head of ${name} has a formula but no line "${part}".`);
		}
	}
	return said;
}

describe('the formula index', () => {
	const index = sourcesIn(INDEX)[0]?.text ?? '';
	const sources = sourcesIn('src/trade').filter(({ path }) => path.endsWith('.ts'));

	it('has rows', () => {
		expect(rowsOf(index).rows.length).toBeGreaterThan(20);
	});
	it('and the code agree', () => {
		expect(disagreements(index, sources)).toEqual([]);
	});
});

describe('planted breaches', () => {
	const head = '/**\n * What it is.\n * formula: a + b\n * rounding: none.\n * source: common practice, no source\n */\n';
	const file: Source = { path: 'src/trade/mass/a.ts', text: `${head}export function plus() {}\nexport const three = 3;\nfunction hidden() {}\n` };
	const table = '| quantity | formula in words | function | source |\n|---|---|---|---|\n';
	const row = (place: string) => `| sum | a \\| b | ${place} | common practice, no source |\n`;

	it('nothing is said when both agree', () => {
		expect(disagreements(table + row('`mass/a.ts plus`'), [file])).toEqual([]);
		expect(disagreements(table + row('mass/a.ts plus'), [file])).toEqual([]);
	});
	it.each([
		['a file that is not there', row('`mass/b.ts plus`'), `${INDEX}:4 names src/trade/mass/b.ts, which is not there.`],
		['a function that is not there', row('`mass/a.ts minus`'), `${INDEX}:4 names minus, which src/trade/mass/a.ts does not export.`],
		['a function that is not exported', row('`mass/a.ts hidden`'), `${INDEX}:4 names hidden, which src/trade/mass/a.ts does not export.`],
		['a value that is no function', row('`mass/a.ts three`'), `${INDEX}:4 names three, which src/trade/mass/a.ts does not export.`],
		['a row twice', row('`mass/a.ts plus`'), `${INDEX}:4 names plus of src/trade/mass/a.ts a second time.`],
		['a row without a source', '| sum | a + b | `mass/a.ts plus` |\n', expect.stringMatching(/README\.md:4 is not "quantity/)],
		['a row without a place', row('somewhere'), expect.stringMatching(/README\.md:4 is not "quantity/)]
	])('finds %s', (_, more, sentence) => {
		expect(disagreements(table + row('`mass/a.ts plus`') + more, [file])).toEqual([sentence]);
	});
	it('finds a formula that is not in the index', () => {
		expect(disagreements(table, [file])).toEqual([`src/trade/mass/a.ts exports the formula plus, which is not in ${INDEX}.`]);
		const arrow: Source = { ...file, text: `${head}export const times = (a: number) => a;\n` };
		expect(disagreements(table, [arrow])).toEqual([`src/trade/mass/a.ts exports the formula times, which is not in ${INDEX}.`]);
	});
	it('finds a formula without its rounding or its source', () => {
		const bare: Source = { ...file, text: '/**\n * formula: a + b\n */\nexport function plus() {}\n' };
		expect(disagreements(table + row('`mass/a.ts plus`'), [bare])).toEqual([
			'src/trade/mass/a.ts: the head of plus has a formula but no line "rounding:".',
			'src/trade/mass/a.ts: the head of plus has a formula but no line "source:".'
		]);
	});
});
