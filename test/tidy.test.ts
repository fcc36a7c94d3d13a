import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { root } from './tools/machine.js';
import { allSources, blank, lineAt, sourcesIn, topNames, type Source } from './tools/sources.ts';

/** Everything that may stand at the top of the repository. */
const TOP = [
	'.ci',
	'.gitignore',
	'.npmrc',
	'DEVELOPERS.md',
	'LICENSE',
	'README.md',
	'package-lock.json',
	'package.json',
	'service-worker',
	'src',
	'static',
	'svelte.config.js',
	'test',
	'tsconfig.json',
	'vite.config.ts'
];

/** Lines that a file under src may have, and the files that may have more: none. */
const MOST_LINES = 250;
const LONGER: readonly string[] = [];

/** Words that have no place in this repository, each in two pieces so that this file does not hold them. */
const WORDS = [
	['lec', 'ture'],
	['trans', 'cript'],
	['seed ', 'document'],
	['/wo', 'rk/'],
	['.lib', 'rary/'],
	['trade-comp', 'utation.md'],
	['published-', 'checks.md'],
	['/tmp', '/'],
	['registry.', 'npmjs'],
	['to', 'do:'],
	['fix', 'me'],
	['not im', 'plemented']
].map((pieces) => pieces.join(''));

/** Comments that silence a tool instead of heeding it. */
const SILENCERS = [
	['@ts-', 'ignore'],
	['@ts-', 'nocheck'],
	['eslint-', 'disable'],
	['svelte-', 'ignore'],
	['prettier-', 'ignore'],
	['istanbul ', 'ignore'],
	['v8 ', 'ignore']
].map((pieces) => pieces.join(''));
const EXPECTED_ERROR = ['@ts-', 'expect-error'].join('');

const isCode = ({ path }: Source) => /\.(ts|js|svelte)$/.test(path);

function strangersAtTop(names: readonly string[]): string[] {
	return names.filter((name) => !TOP.includes(name)).map((name) => `${name} stands at the top, where only ${TOP.join(', ')} belong.`);
}

function tooLong(sources: readonly Source[]): string[] {
	return sources
		.filter(({ path, text }) => isCode({ path, text }) && !LONGER.includes(path) && lineCount(text) > MOST_LINES)
		.map(({ path, text }) => `${path} has ${lineCount(text)} lines; ${MOST_LINES} are the most: one file is one concept.`);
}

const lineCount = (text: string) => text.replace(/\n$/, '').split('\n').length;

function forbiddenWords(sources: readonly Source[]): string[] {
	return sources.flatMap(({ path, text }) =>
		WORDS.flatMap((word) => {
			const at = text.toLowerCase().indexOf(word);
			return at === -1 ? [] : [`${path}:${lineAt(text, at)} says "${word}".`];
		})
	);
}

function silencers(sources: readonly Source[]): string[] {
	return sources.flatMap(({ path, text }) => {
		const words = path === 'test/types.test-d.ts' ? SILENCERS : [...SILENCERS, EXPECTED_ERROR];
		return words.flatMap((word) => {
			const at = text.indexOf(word);
			return at === -1 ? [] : [`${path}:${lineAt(text, at)} silences a tool with ${word}.`];
		});
	});
}

const NOT_RUN = /\b(?:it|test|describe|suite|bench|context|ctx|task)\s*\.\s*(?:concurrent\s*\.\s*)?(?:skip|only|todo|fails|skipIf|runIf)\b|\bx(?:it|describe|test)\s*\(/g;

function testsThatDoNotRun(sources: readonly Source[]): string[] {
	return sources
		.filter(({ path }) => path.startsWith('test/') && isCode({ path, text: '' }))
		.flatMap(({ path, text }) =>
			[...text.matchAll(NOT_RUN)].map((match) => `${path}:${lineAt(text, match.index)} has ${match[0].trim()}: every test runs, every time.`)
		);
}

/** A file of types only: nothing in it runs, so nothing in it can be tested but by the compiler. */
function onlyTypes({ path, text }: Source): boolean {
	return ts
		.createSourceFile(path, text, ts.ScriptTarget.Latest)
		.statements.every((one) => ts.isTypeAliasDeclaration(one) || ts.isInterfaceDeclaration(one) || ts.isImportDeclaration(one));
}

function withoutMirror(sources: readonly Source[], tests: readonly string[]): string[] {
	return sources
		.filter((source) => source.path.startsWith('src/trade/') && source.path.endsWith('.ts') && !onlyTypes(source))
		.map(({ path }) => ({ path, wanted: path.replace(/^src\//, 'test/').replace(/\.ts$/, '.test.ts') }))
		.filter(({ wanted }) => !tests.includes(wanted))
		.map(({ path, wanted }) => `${path} has no test: ${wanted} is not there.`);
}

/** Addresses of other hosts in what is shipped, comments aside. XML names its vocabularies by address and never asks there. */
function otherHosts(sources: readonly Source[]): string[] {
	return sources.flatMap(({ path, text }) => {
		const spoken = withoutComments({ path, text });
		return [...spoken.matchAll(/\b(?:https?|wss?):\/\/[^\s'"`<>)]*/g)]
			.filter((match) => !/^http:\/\/www\.w3\.org\//.test(match[0]))
			.map((match) => `${path}:${lineAt(spoken, match.index)} holds the address ${match[0]}; nothing is asked of another host.`);
	});
}

function withoutComments({ path, text }: Source): string {
	let rest = text.replace(/<!--[\s\S]*?-->/g, blank);
	if (/\.(css|svelte|html|svg)$/.test(path)) rest = rest.replace(/\/\*[\s\S]*?\*\//g, blank);
	if (/\.(svelte|html)$/.test(path)) return rest.replace(/(^|\s)\/\/[^\n]*/g, blank);
	if (!/\.(ts|js)$/.test(path)) return rest;
	const file = ts.createSourceFile(path, rest, ts.ScriptTarget.Latest, true);
	const comments = new Map<number, number>();
	const visit = (node: ts.Node) => {
		for (const range of ts.getLeadingCommentRanges(rest, node.pos) ?? []) comments.set(range.pos, range.end);
		for (const range of ts.getTrailingCommentRanges(rest, node.end) ?? []) comments.set(range.pos, range.end);
		ts.forEachChild(node, visit);
	};
	// a position inside a template or JSX text is no place for comments, but forEachChild visits nodes only
	visit(file);
	visit(file.endOfFileToken);
	for (const [from, to] of comments) rest = rest.slice(0, from) + blank(rest.slice(from, to)) + rest.slice(to);
	return rest;
}

function lockProblems(lock: string): string[] {
	const { packages } = JSON.parse(lock) as { packages: Record<string, { resolved?: string; link?: boolean }> };
	return Object.entries(packages)
		.filter(([, entry]) => entry.resolved !== undefined)
		.map(([path, entry]) => `package-lock.json ties ${path} to the address ${entry.resolved}.`);
}

function unusedPackages(manifest: string, sources: readonly Source[]): string[] {
	const { dependencies = {}, devDependencies = {} } = JSON.parse(manifest) as Record<string, Record<string, string>>;
	const text = sources
		.filter(({ path }) => !/^package(-lock)?\.json$/.test(path) && !path.endsWith('.md'))
		.map((source) => source.text)
		.join('\n');
	return [...Object.keys(dependencies), ...Object.keys(devDependencies)]
		.filter((name) => !name.startsWith('@types/') && !new RegExp(`['"]${name.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')}(?:['"/])`).test(text))
		.map((name) => `package.json names ${name}, which nothing uses.`);
}

describe('the house is tidy', () => {
	const all = allSources();
	const shipped = sourcesIn('src', 'service-worker', 'static');

	it('has only the agreed names at the top', () => {
		expect(strangersAtTop(topNames())).toEqual([]);
	});
	it('has no long file', () => {
		expect(tooLong(sourcesIn('src', 'service-worker'))).toEqual([]);
	});
	it('holds no forbidden word', () => {
		expect(all.length).toBeGreaterThan(20);
		expect(forbiddenWords(all)).toEqual([]);
	});
	it('silences no tool', () => {
		expect(silencers(all)).toEqual([]);
	});
	it('has no test that does not run', () => {
		expect(testsThatDoNotRun(all)).toEqual([]);
	});
	it('has a test for every file of trade', () => {
		expect(withoutMirror(all, all.map(({ path }) => path))).toEqual([]);
	});
	it('asks nothing of another host', () => {
		expect(otherHosts(shipped)).toEqual([]);
	});
	it('ties no package to an address', () => {
		expect(lockProblems(readFileSync(join(root, 'package-lock.json'), 'utf8'))).toEqual([]);
	});
	it('has no package that nothing uses', () => {
		expect(unusedPackages(readFileSync(join(root, 'package.json'), 'utf8'), all)).toEqual([]);
	});
});

describe('planted breaches', () => {
	const file = (path: string, text: string): Source => ({ path, text });

	it('finds a stranger at the top', () => {
		expect(strangersAtTop(['src', 'notes.txt'])).toEqual([expect.stringMatching(/^notes\.txt stands at the top/)]);
	});
	it('finds a file of 251 lines and passes one of 250', () => {
		expect(tooLong([file('src/a.ts', 'x\n'.repeat(250)), file('src/b.ts', 'x\n'.repeat(251))])).toEqual([
			'src/b.ts has 251 lines; 250 are the most: one file is one concept.'
		]);
	});
	it.each(WORDS)('finds the word "%s"', (word) => {
		expect(forbiddenWords([file('src/a.ts', `one\n// ${word.toUpperCase()} `)])).toEqual([`src/a.ts:2 says "${word}".`]);
	});
	it.each([...SILENCERS, EXPECTED_ERROR])('finds %s', (word) => {
		expect(silencers([file('src/a.ts', `// ${word}`)])).toEqual([`src/a.ts:1 silences a tool with ${word}.`]);
	});
	it('allows an expected type error in the test of types only', () => {
		expect(silencers([file('test/types.test-d.ts', `// ${EXPECTED_ERROR}`)])).toEqual([]);
	});
	it.each(['it|.skip', 'test|.only', 'describe|.todo', 'it|.concurrent.only', 'test|.skipIf(x)', 'x|it(', 'ctx|.skip()'])('finds %s', (pieces) => {
		const text = pieces.replace('|', '');
		expect(testsThatDoNotRun([file('test/a.test.ts', text)])).toEqual([expect.stringMatching(/^test\/a\.test\.ts:1 has /)]);
	});
	it('finds a file of trade without a test', () => {
		const code = 'export const a = 1;';
		const sources = [
			file('src/trade/mass/a.ts', code),
			file('src/trade/mass/b.ts', code),
			file('src/trade/mass/c.ts', "import type { A } from './a.ts';\nexport type C = A;"),
			file('src/ui/d.ts', code)
		];
		expect(withoutMirror(sources, ['test/trade/mass/a.test.ts'])).toEqual([
			'src/trade/mass/b.ts has no test: test/trade/mass/b.test.ts is not there.'
		]);
	});
	it('finds an address in code, markup and styles, and none in comments', () => {
		const address = ['https:', '//example.org/x'].join('');
		expect(otherHosts([file('src/a.ts', `// ${address}\nconst a = '${address}'; // ${address}`)])).toEqual([
			`src/a.ts:2 holds the address ${address}; nothing is asked of another host.`
		]);
		expect(otherHosts([file('src/a.svelte', `<!-- ${address} -->\n<img src="${address}" alt="">`)])).toHaveLength(1);
		expect(otherHosts([file('src/a.css', `/* ${address} */ a { background: url(${address}) }`)])).toHaveLength(1);
		expect(otherHosts([file('src/a.ts', `const t = \`a \${1 /* ${address} */} ${address}\`;`)])).toHaveLength(1);
		expect(otherHosts([file('static/a.svg', '<svg xmlns="http://www.w3.org/2000/svg"/>')])).toEqual([]);
	});
	it('finds a package tied to an address', () => {
		const lock = JSON.stringify({ packages: { '': {}, 'node_modules/a': { resolved: 'file:a' }, 'node_modules/b': {} } });
		expect(lockProblems(lock)).toEqual(['package-lock.json ties node_modules/a to the address file:a.']);
	});
	it('finds a package that nothing uses', () => {
		const manifest = JSON.stringify({ dependencies: { used: '1' }, devDependencies: { 'not-used': '1', '@types/used': '1' } });
		expect(unusedPackages(manifest, [file('src/a.ts', "import 'used/part'; import 'not-used-either';")])).toEqual([
			'package.json names not-used, which nothing uses.'
		]);
	});
});
