// A Svelte file as the TypeScript that its checker sees: the script blocks, then every expression of the markup in the
// blocks it stands in, so that names bound by #each, #snippet and @const have their types.
import { parse } from 'svelte/compiler';
import { scriptOf, type Source } from './sources.ts';

type Node = { readonly type: string; readonly start: number; readonly end: number } & Readonly<Record<string, unknown>>;

export function typescriptOf(source: Source): string {
	if (!source.path.endsWith('.svelte')) return source.text;
	const { fragment } = parse(source.text, { modern: true });
	const body = emit(fragment as unknown as Node, source.text);
	return `${scriptOf(source)}\ndeclare function __each<T>(list: Iterable<T> | ArrayLike<T>): Iterable<T>;\nexport async function __markup() {\n${body}\n}\n`;
}

function isNode(value: unknown): value is Node {
	return typeof value === 'object' && value !== null && typeof (value as { type?: unknown }).type === 'string';
}

const EXPRESSION = /(Expression|Literal|Identifier)$/;

function emit(value: unknown, text: string): string {
	if (Array.isArray(value)) return value.map((one) => emit(one, text)).join('');
	if (!isNode(value)) return '';
	const slice = (node: unknown) => (isNode(node) ? text.slice(node.start, node.end) : '');
	const parts = (...keys: string[]) => keys.map((key) => emit(value[key], text)).join('');
	if (EXPRESSION.test(value.type)) return `void (${slice(value)});\n`;
	switch (value.type) {
		case 'IfBlock':
			return `if (${slice(value['test'])}) {\n${parts('consequent')}} else {\n${parts('alternate')}}\n`;
		case 'EachBlock': {
			const index = typeof value['index'] === 'string' ? `let ${value['index']} = 0; void ${value['index']};\n` : '';
			const name = value['context'] === null ? '__one' : slice(value['context']);
			return `for (const ${name} of __each(${slice(value['expression'])})) {\n${index}${parts('key', 'body')}}\n${parts('fallback')}`;
		}
		case 'SnippetBlock': {
			const names = Array.isArray(value['parameters']) ? value['parameters'].map(slice).join(', ') : '';
			return `function ${slice(value['expression'])}(${names}) {\n${parts('body')}}\n`;
		}
		case 'AwaitBlock': {
			const name = isNode(value['value']) ? `const ${slice(value['value'])} = await (${slice(value['expression'])});\n` : '';
			return `{\n${parts('pending')}}\n{\n${name}${parts('then')}}\n{\n${parts('catch')}}\n`;
		}
		case 'ConstTag':
			return `${slice(value['declaration'])};\n`;
		case 'Comment':
		case 'Text':
			return '';
		default:
			return Object.entries(value)
				.filter(([key]) => !['type', 'start', 'end', 'name', 'name_loc', 'loc', 'metadata', 'modifiers'].includes(key))
				.map(([, child]) => emit(child, text))
				.join('');
	}
}
