import { posix } from 'node:path';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { lineAt, scriptOf, sourcesIn, type Source } from './tools/sources.ts';

/** Inside trade, each room may import itself and the rooms above it in this list. */
const TRADE = [
	'number',
	'uncertainty',
	'mass',
	'metal',
	'evidence',
	'piece',
	'price',
	'lot',
	'melt',
	'refiner',
	'settlement',
	'learning',
	'stock',
	'record'
];

/** Who may import whom; a house not named here does not exist. */
const HOUSES: Readonly<Record<string, readonly string[]>> = {
	'service-worker': ['service-worker'],
	'src/trade': ['src/trade'],
	'src/storage': ['src/storage', 'src/trade'],
	'src/ui': ['src/ui', 'src/trade'],
	'src/routes': ['src/routes', 'src/ui', 'src/storage', 'src/trade']
};

/** Every package that what is shipped may import, and the only places that may. */
const PACKAGES: Readonly<Record<string, readonly string[]>> = {
	'decimal.js': ['src/trade/number'],
	dexie: ['src/storage'],
	'fft.js': ['src/trade/lot'],
	'workbox-window': ['src/ui/update'],
	'workbox-precaching': ['service-worker'],
	'workbox-routing': ['service-worker'],
	'$service-worker': ['service-worker/index.ts'],
	'd3-scale': ['src/ui'],
	'd3-shape': ['src/ui'],
	$app: ['src/routes', 'src/ui'],
	svelte: ['src/routes', 'src/ui'],
	'@sveltejs/kit': ['src/routes'],
	'@fontsource-variable/atkinson-hyperlegible-next': ['src/routes', 'src/ui']
};

const ALIASES: Readonly<Record<string, string>> = { $trade: 'src/trade', $storage: 'src/storage', $ui: 'src/ui' };

/** Types that SvelteKit writes beside each route. */
const GENERATED = /(^|\/)\$types(\.js)?$/;

type Import = {
	readonly from: string;
	readonly line: number;
	readonly name: string;
	/** Only for its types: gone when the code runs. The direction holds for it too, but it makes no ring. */
	readonly erased: boolean;
};

function importsOf(source: Source): Import[] {
	const script = scriptOf(source);
	const erased = erasedPositions(script);
	const found = ts.preProcessFile(script, true, true).importedFiles.map(({ fileName, pos }) => ({
		from: source.path,
		line: lineAt(script, pos),
		name: fileName,
		erased: erased.some(([from, to]) => pos >= from && pos < to)
	}));
	if (!source.path.endsWith('.svelte')) return found;
	// a page may also import inside its markup: {#await import('...')}
	for (const match of source.text.matchAll(/\bimport\(\s*['"]([^'"]+)['"]\s*\)/g)) {
		const line = lineAt(source.text, match.index);
		const name = match[1]!;
		if (!found.some((known) => known.name === name)) found.push({ from: source.path, line, name, erased: false });
	}
	return found;
}

/** Where `import type`, `export type` and `import('...')` as a type stand. */
function erasedPositions(script: string): [number, number][] {
	const found: [number, number][] = [];
	const visit = (node: ts.Node) => {
		const gone =
			(ts.isImportDeclaration(node) && node.importClause?.phaseModifier === ts.SyntaxKind.TypeKeyword) ||
			(ts.isExportDeclaration(node) && node.isTypeOnly) ||
			ts.isImportTypeNode(node);
		if (gone) found.push([node.getStart(), node.end]);
		else ts.forEachChild(node, visit);
	};
	visit(ts.createSourceFile('script.ts', script, ts.ScriptTarget.Latest, true));
	return found;
}

/** The path inside the house that an import names, or null when it names a package. */
function pathOf({ from, name }: Import): string | null {
	if (name.startsWith('.')) return posix.normalize(posix.join(posix.dirname(from), name));
	const [first = '', ...rest] = name.split('/');
	const alias = ALIASES[first];
	return alias === undefined ? null : posix.join(alias, ...rest);
}

function packageOf(name: string): string {
	const [first = '', second = ''] = name.split('/');
	return first.startsWith('@') ? `${first}/${second}` : first;
}

function within(path: string, place: string): boolean {
	return path === place || path.startsWith(`${place}/`) || path.startsWith(`${place}.`);
}

function houseOf(path: string): string | undefined {
	return Object.keys(HOUSES).find((house) => within(path, house));
}

/** A sentence for each import that breaks a rule. */
function breaches(sources: readonly Source[]): string[] {
	const known = new Set(sources.map(({ path }) => path));
	const said: string[] = [];
	const graph = new Map<string, string[]>();
	for (const source of sources) {
		const house = houseOf(source.path);
		if (house === undefined && source.path !== 'src/app.html' && !source.path.startsWith('src/app.')) {
			said.push(`${source.path} stands in none of the rooms: ${Object.keys(HOUSES).join(', ')}.`);
		}
		const to: string[] = [];
		for (const one of importsOf(source)) {
			if (GENERATED.test(one.name)) continue;
			const target = pathOf(one);
			const sentence = target === null ? packageBreach(one) : directionBreach(one, target, house);
			if (sentence !== null) said.push(`${one.from}:${one.line} ${sentence}`);
			if (target === null) continue;
			const file = [target, `${target}.ts`, `${target}.svelte`, `${target}.svelte.ts`, target.replace(/\.js$/, '.ts')].find((path) =>
				known.has(path)
			);
			if (file === undefined) said.push(`${one.from}:${one.line} imports ${one.name}, which is not there.`);
			else if (!one.erased) to.push(file);
		}
		graph.set(source.path, to);
	}
	return [...said, ...cycles(graph)];
}

function packageBreach({ from, name }: Import): string | null {
	const wanted = packageOf(name);
	const places = PACKAGES[wanted];
	if (places === undefined) return `imports the package ${wanted}, which is not in the table of this test.`;
	return places.some((place) => within(from, place)) ? null : `imports ${wanted}, which only ${places.join(' and ')} may.`;
}

function directionBreach({ from, name }: Import, target: string, house: string | undefined): string | null {
	const allowed = HOUSES[house ?? ''] ?? [];
	if (!allowed.some((place) => within(target, place))) {
		return `imports ${target}; ${house ?? 'this place'} may import only ${allowed.join(', ') || 'nothing'}.`;
	}
	if (house !== 'src/trade') return null;
	if (!name.startsWith('.') || !name.endsWith('.ts')) return `imports "${name}"; inside trade an import is relative and ends in .ts.`;
	const mine = from.split('/')[2]!;
	const theirs = target.split('/')[2]!;
	if (!TRADE.includes(mine)) return `stands in trade/${mine}, a room that is not in the table of this test.`;
	if (!TRADE.includes(theirs)) return `imports from trade/${theirs}, a room that is not in the table of this test.`;
	return TRADE.indexOf(theirs) > TRADE.indexOf(mine) ? `imports from trade/${theirs}, which stands below trade/${mine}.` : null;
}

/** A sentence for each ring of files that import one another. */
function cycles(graph: ReadonlyMap<string, readonly string[]>): string[] {
	const said: string[] = [];
	const done = new Set<string>();
	const path: string[] = [];
	const walk = (file: string) => {
		const at = path.indexOf(file);
		if (at !== -1) {
			said.push(`These files import one another in a ring: ${[...path.slice(at), file].join(' -> ')}.`);
			return;
		}
		if (done.has(file)) return;
		path.push(file);
		for (const next of graph.get(file) ?? []) walk(next);
		path.pop();
		done.add(file);
	};
	for (const file of graph.keys()) walk(file);
	return said;
}

const isCode = ({ path }: Source) => /\.(ts|js|svelte|css|json|svg)$/.test(path) && !path.endsWith('tsconfig.json');

describe('the direction of imports', () => {
	it('holds for every file that is shipped', () => {
		const sources = sourcesIn('src', 'service-worker').filter(isCode);
		expect(sources.length).toBeGreaterThan(10);
		expect(breaches(sources)).toEqual([]);
	});

	it('reads imports at all: trade/number uses decimal.js, and rounding uses decimal', () => {
		const sources = sourcesIn('src/trade/number');
		const names = sources.flatMap((source) => importsOf(source)).map(({ from, name }) => `${posix.basename(from)} ${name}`);
		expect(names).toContain('decimal.ts decimal.js');
		expect(names).toContain('rounding.ts ./decimal.ts');
	});
});

describe('planted breaches', () => {
	const file = (path: string, text: string): Source => ({ path, text });
	const number = file('src/trade/number/decimal.ts', 'export const a = 1;');
	const cases: readonly [string, readonly Source[], string][] = [
		[
			'a trade room that imports a room below it',
			[file('src/trade/mass/mass.ts', "import { lot } from '../lot/lot.ts';"), file('src/trade/lot/lot.ts', 'export const lot = 1;')],
			'src/trade/mass/mass.ts:1 imports from trade/lot, which stands below trade/mass.'
		],
		[
			'trade that imports storage',
			[file('src/trade/mass/mass.ts', "import { b } from '../../storage/book.ts';"), file('src/storage/book.ts', '')],
			'src/trade/mass/mass.ts:1 imports src/storage/book.ts; src/trade may import only src/trade.'
		],
		[
			'a type that trade takes from ui',
			[file('src/trade/mass/mass.ts', "export type A = import('../../ui/format.ts').B;"), file('src/ui/format.ts', '')],
			'src/trade/mass/mass.ts:1 imports src/ui/format.ts; src/trade may import only src/trade.'
		],
		[
			'storage that imports ui through its alias',
			[file('src/storage/book.ts', "\nimport { b } from '$ui/format';"), file('src/ui/format.ts', '')],
			'src/storage/book.ts:2 imports src/ui/format; src/storage may import only src/storage, src/trade.'
		],
		[
			'a component that imports storage in its script block',
			[file('src/ui/Row.svelte', "<p>row</p>\n<script lang=\"ts\">\nimport { b } from '$storage/book';\n</script>"), file('src/storage/book.ts', '')],
			'src/ui/Row.svelte:3 imports src/storage/book; src/ui may import only src/ui, src/trade.'
		],
		[
			'a component that imports storage in its markup',
			[file('src/ui/Row.svelte', "{#await import('$storage/book') then book}{book}{/await}"), file('src/storage/book.ts', '')],
			'src/ui/Row.svelte:1 imports src/storage/book; src/ui may import only src/ui, src/trade.'
		],
		[
			'the worker that imports the business',
			[file('service-worker/index.ts', "import '../src/trade/number/decimal.ts';"), number],
			'service-worker/index.ts:1 imports src/trade/number/decimal.ts; service-worker may import only service-worker.'
		],
		[
			'decimal.js outside trade/number',
			[file('src/trade/mass/mass.ts', "import { Decimal } from 'decimal.js';")],
			'src/trade/mass/mass.ts:1 imports decimal.js, which only src/trade/number may.'
		],
		[
			'dexie in a page',
			[file('src/routes/+page.svelte', "<script>const d = import('dexie');</script>")],
			'src/routes/+page.svelte:1 imports dexie, which only src/storage may.'
		],
		[
			'workbox-window outside ui/update',
			[file('src/ui/offline.ts', "import { Workbox } from 'workbox-window';")],
			'src/ui/offline.ts:1 imports workbox-window, which only src/ui/update may.'
		],
		[
			'$service-worker in a second file',
			[file('service-worker/pages.ts', "import { build } from '$service-worker';")],
			'service-worker/pages.ts:1 imports $service-worker, which only service-worker/index.ts may.'
		],
		[
			'a package that nobody has decided on',
			[file('src/ui/chart.ts', "export * from '@some/charts/deep';")],
			'src/ui/chart.ts:1 imports the package @some/charts, which is not in the table of this test.'
		],
		[
			'an alias inside trade',
			[file('src/trade/mass/mass.ts', "import { a } from '$trade/number/decimal.ts';"), number],
			'src/trade/mass/mass.ts:1 imports "$trade/number/decimal.ts"; inside trade an import is relative and ends in .ts.'
		],
		[
			'an import without its ending inside trade',
			[file('src/trade/mass/mass.ts', "import { a } from '../number/decimal';"), number],
			'src/trade/mass/mass.ts:1 imports "../number/decimal"; inside trade an import is relative and ends in .ts.'
		],
		[
			'a room of trade that is not in the plan',
			[file('src/trade/helpers/a.ts', "import { a } from '../number/decimal.ts';"), number],
			'src/trade/helpers/a.ts:1 stands in trade/helpers, a room that is not in the table of this test.'
		],
		[
			'a file in a room that does not exist',
			[file('src/lib/a.ts', '')],
			'src/lib/a.ts stands in none of the rooms: service-worker, src/trade, src/storage, src/ui, src/routes.'
		],
		['a file that is not there', [file('src/ui/a.ts', "import './b.ts';")], 'src/ui/a.ts:1 imports ./b.ts, which is not there.'],
		[
			'a ring',
			[
				file('src/ui/a.ts', "import './b.ts';"),
				file('src/ui/b.ts', "import { type C } from './c.ts';"),
				file('src/ui/c.ts', "export { a } from './a.ts';")
			],
			'These files import one another in a ring: src/ui/a.ts -> src/ui/b.ts -> src/ui/c.ts -> src/ui/a.ts.'
		]
	];

	it.each(cases)('finds %s', (_, sources, sentence) => {
		expect(breaches(sources)).toEqual([sentence]);
	});

	it('lets two files take types from one another', () => {
		expect(breaches([file('src/ui/a.ts', "import { b } from './b.ts';"), file('src/ui/b.ts', "import type { A } from './a.ts';")])).toEqual([]);
	});

	it('finds nothing in files that keep the rules', () => {
		expect(
			breaches([
				number,
				file('src/trade/mass/mass.ts', "import { a } from '../number/decimal.ts';"),
				file('src/storage/book.ts', "import Dexie from 'dexie';\nimport { m } from '$trade/mass/mass';"),
				file('src/ui/Row.svelte', "<script lang=\"ts\">import { m } from '$trade/mass/mass.ts';</script>"),
				file('src/routes/+page.svelte', "<script>import Row from '$ui/Row.svelte'; import './$types'; import { goto } from '$app/navigation';</script>")
			])
		).toEqual([]);
	});
});
