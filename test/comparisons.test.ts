import { join } from 'node:path';
import ts from 'typescript';
import { beforeAll, describe, expect, it } from 'vitest';
import { root } from './tools/machine.js';
import { typescriptOf } from './tools/markup.ts';
import { sourcesIn, type Source } from './tools/sources.ts';

/**
 * `new Decimal('10') < new Decimal('9')` compiles and is true, and two equal quantities are two objects. So quantities are
 * compared by their own functions, and written out by ui/format.ts alone.
 */
const QUANTITIES = new Set(['Decimal', 'Exact', 'Mass', 'Money', 'Fineness', 'FineMass', 'Uncertain', 'Weighing', 'Quote']);

/** Fields that make an object a quantity, whatever its type is called. */
const SHAPES = [['grams'], ['perMille'], ['amount', 'currency'], ['n', 'd'], ['value', 'contributions']];

const ORDER = new Set([
	ts.SyntaxKind.LessThanToken,
	ts.SyntaxKind.GreaterThanToken,
	ts.SyntaxKind.LessThanEqualsToken,
	ts.SyntaxKind.GreaterThanEqualsToken
]);
const EQUALITY = new Set([
	ts.SyntaxKind.EqualsEqualsToken,
	ts.SyntaxKind.EqualsEqualsEqualsToken,
	ts.SyntaxKind.ExclamationEqualsToken,
	ts.SyntaxKind.ExclamationEqualsEqualsToken
]);
const TO_TEXT = /^(toFixed|toString|toPrecision|toExponential|toJSON|valueOf)$/;

/** The one place that writes a quantity for a person. */
const isFormat = (path: string) => path === 'src/ui/format.ts' || path.startsWith('src/ui/format/');
const isPage = (path: string) => path.startsWith('src/ui/') || path.startsWith('src/routes/');

/** Sentences about comparisons and texts made of quantities, by file. */
function read(sources: readonly Source[]): { breaches: string[]; comparisons: number } {
	const texts = new Map(sources.map((source) => [join(root, virtualPath(source.path)), { ...source, text: typescriptOf(source) }]));
	const options: ts.CompilerOptions = {
		target: ts.ScriptTarget.ES2023,
		lib: ['lib.es2023.d.ts', 'lib.dom.d.ts', 'lib.dom.iterable.d.ts'],
		module: ts.ModuleKind.ESNext,
		moduleResolution: ts.ModuleResolutionKind.Bundler,
		allowImportingTsExtensions: true,
		noEmit: true,
		strict: true,
		skipLibCheck: true,
		types: [],
		paths: Object.fromEntries(['trade', 'storage', 'ui'].map((house) => [`$${house}/*`, [join(root, 'src', house, '*')]]))
	};
	const disk = ts.createCompilerHost(options);
	const compilerHost: ts.CompilerHost = {
		...disk,
		fileExists: (path) => texts.has(path) || disk.fileExists(path),
		readFile: (path) => texts.get(path)?.text ?? disk.readFile(path),
		getSourceFile(path, language) {
			const text = texts.get(path)?.text;
			return text === undefined ? disk.getSourceFile(path, language) : ts.createSourceFile(path, text, language, true);
		}
	};
	const ambient = ['svelte/types/ambient.d.ts', 'svelte/types/index.d.ts', '@sveltejs/kit/types/index.d.ts'];
	const roots = [...texts.keys(), ...ambient.map((path) => join(root, 'node_modules', path)).filter((path) => disk.fileExists(path))];
	const program = ts.createProgram(roots, options, compilerHost);
	const checker = program.getTypeChecker();
	const breaches: string[] = [];
	let comparisons = 0;
	for (const [file, { path }] of texts) {
		const source = program.getSourceFile(file);
		if (source === undefined) throw new Error(`${path} was not read`);
		const visit = (node: ts.Node) => {
			const say = (what: string) => breaches.push(`${path}: ${shown(node, source)} ${what}`);
			if (ts.isBinaryExpression(node)) {
				const kind = node.operatorToken.kind;
				const sides = [checker.getTypeAtLocation(node.left), checker.getTypeAtLocation(node.right)];
				if (ORDER.has(kind) || EQUALITY.has(kind)) comparisons += 1;
				const found = sides.map((side) => (ORDER.has(kind) ? objectName(side) : quantityName(side)));
				if (ORDER.has(kind) && found.some((name) => name !== null)) {
					say(`orders objects (${name(found)}): use .lt, .gt or compareExact.`);
				}
				// beside null or undefined only the presence is asked
				if (EQUALITY.has(kind) && found.every((name) => name !== null)) say(`compares two objects (${name(found)}): use .equals or compareExact.`);
				if (kind === ts.SyntaxKind.PlusToken && sides.some((side) => quantityName(side) !== null)) {
					say(`joins a quantity to text or another (${name(sides.map(quantityName))}): use plus, or ui/format.`);
				}
			}
			if (isPage(path) && !isFormat(path)) {
				const text = textOf(node);
				const quantity = text === null ? null : quantityName(checker.getTypeAtLocation(text));
				if (quantity !== null) say(`writes a ${quantity} as text: only ui/format does.`);
			}
			ts.forEachChild(node, visit);
		};
		visit(source);
	}
	return { breaches, comparisons };

	/** The expression that this node turns into text, if it does. */
	function textOf(node: ts.Node): ts.Expression | null {
		if (ts.isTemplateSpan(node)) return node.expression;
		if (!ts.isCallExpression(node)) return null;
		if (ts.isPropertyAccessExpression(node.expression) && TO_TEXT.test(node.expression.name.text)) return node.expression.expression;
		return ts.isIdentifier(node.expression) && node.expression.text === 'String' ? (node.arguments[0] ?? null) : null;
	}

	function members(type: ts.Type): ts.Type[] {
		return type.isUnion() ? type.types.flatMap(members) : [type];
	}

	function objectName(type: ts.Type): string | null {
		const object = members(type).find((one) => (one.flags & (ts.TypeFlags.Object | ts.TypeFlags.Intersection)) !== 0);
		return object === undefined ? null : nameOf(object);
	}

	function quantityName(type: ts.Type): string | null {
		const quantity = members(type).find((one) => {
			if ((one.flags & (ts.TypeFlags.Object | ts.TypeFlags.Intersection)) === 0) return false;
			const keys = one.getProperties().map((property) => property.name);
			return QUANTITIES.has(nameOf(one)) || SHAPES.some((shape) => shape.length <= keys.length && shape.every((key) => keys.includes(key)));
		});
		return quantity === undefined ? null : nameOf(quantity);
	}
}

function shown(node: ts.Node, source: ts.SourceFile): string {
	// the node of a template's part begins after its opening bracket
	return (ts.isTemplateSpan(node) ? '${' : '') + node.getText(source).replace(/\s+/g, ' ');
}

function name(found: readonly (string | null)[]): string {
	return found.filter((one) => one !== null).join(', ');
}

function nameOf(type: ts.Type): string {
	return type.aliasSymbol?.name ?? type.symbol?.name ?? 'object';
}

function virtualPath(path: string): string {
	return path.endsWith('.svelte') ? `${path}.markup.ts` : path;
}

const PLANTED: readonly Source[] = [
	{
		path: 'src/ui/planted.ts',
		text: `import { decimal, type Decimal } from '$trade/number/decimal.ts';
import { exact, type Exact } from '$trade/number/exact.ts';
const a = decimal('10'), b: Decimal | null = decimal('9'), x: Exact = exact(a);
type Mass = { readonly grams: Decimal };
const m: Mass = { grams: a }, other = { amount: a, currency: 'EUR' };
export const all = [a < b!, a >= b!, a === b, x > x, x !== exact(b!), m === m, other == other, a.toFixed(2), \`\${a} g\`, String(m), 'g' + a, x <= 1n];
export const fine = [a.lt(b!), b === null, 1 < 2, 'a' === 'b', 1n >= 2n, m === null, undefined !== a, (1).toFixed(2), a.toNumber() > 3, \`\${1}\`];
`
	},
	{
		path: 'src/ui/Planted.svelte',
		text: `<script lang="ts">
	import { decimal, type Decimal } from '$trade/number/decimal.ts';
	let { list, one }: { list: { grams: Decimal }[]; one: Decimal } = $props();
	const low = $derived(one < decimal('1'));
</script>
{#if one > decimal('2')}<p class={one === decimal('3') ? 'a' : 'b'}>{low}</p>{/if}
{#each list as row, index (index)}
	{@const mass = row.grams}
	<p title="{row.grams.toFixed(2)} g" onclick={() => mass >= one}>{row === list[0]} {index < 3}</p>
{/each}
{#snippet part(value: Decimal)}{\`\${value}\`}{/snippet}
{@render part(one)}
`
	}
];

describe('quantities', () => {
	let house: ReturnType<typeof read>;
	let planted: string[];
	beforeAll(() => {
		const sources = sourcesIn('src').filter(({ path }) => /\.(ts|svelte)$/.test(path) && !path.endsWith('.d.ts'));
		const both = read([...sources, ...PLANTED]);
		const isPlanted = (sentence: string) => /^src\/ui\/planted/i.test(sentence);
		house = { ...both, breaches: both.breaches.filter((sentence) => !isPlanted(sentence)) };
		planted = both.breaches.filter(isPlanted);
	}, 60_000);

	it('are never compared or joined as objects, nor written out beside ui/format', () => {
		expect(house.comparisons).toBeGreaterThan(50);
		expect(house.breaches).toEqual([]);
	});

	it('planted breaches in a file are found, each of them', () => {
		const found = planted.filter((sentence) => sentence.startsWith('src/ui/planted.ts'));
		expect(found.map((sentence) => sentence.slice('src/ui/planted.ts: '.length))).toEqual([
			'a < b! orders objects (Decimal, Decimal): use .lt, .gt or compareExact.',
			'a >= b! orders objects (Decimal, Decimal): use .lt, .gt or compareExact.',
			'a === b compares two objects (Decimal, Decimal): use .equals or compareExact.',
			'x > x orders objects (Exact, Exact): use .lt, .gt or compareExact.',
			'x !== exact(b!) compares two objects (Exact, Exact): use .equals or compareExact.',
			'm === m compares two objects (Mass, Mass): use .equals or compareExact.',
			'other == other compares two objects (__object, __object): use .equals or compareExact.',
			'a.toFixed(2) writes a Decimal as text: only ui/format does.',
			'${a} g` writes a Decimal as text: only ui/format does.',
			'String(m) writes a Mass as text: only ui/format does.',
			"'g' + a joins a quantity to text or another (Decimal): use plus, or ui/format.",
			'x <= 1n orders objects (Exact): use .lt, .gt or compareExact.'
		]);
	});

	it('planted breaches in the script and the markup of a component are found', () => {
		const found = planted.filter((sentence) => sentence.startsWith('src/ui/Planted.svelte'));
		expect(found.map((sentence) => sentence.slice('src/ui/Planted.svelte: '.length))).toEqual([
			"one < decimal('1') orders objects (Decimal, Decimal): use .lt, .gt or compareExact.",
			"one > decimal('2') orders objects (Decimal, Decimal): use .lt, .gt or compareExact.",
			"one === decimal('3') compares two objects (Decimal, Decimal): use .equals or compareExact.",
			'row.grams.toFixed(2) writes a Decimal as text: only ui/format does.',
			'mass >= one orders objects (Decimal, Decimal): use .lt, .gt or compareExact.',
			'row === list[0] compares two objects (__type, __type): use .equals or compareExact.',
			'${value}` writes a Decimal as text: only ui/format does.'
		]);
	});
});
