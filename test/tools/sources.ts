// The files of the house, as the guards read them.
import { readFileSync, readdirSync } from 'node:fs';
import { join, posix } from 'node:path';
import { root } from './machine.js';

/** A file by its path from the top, with forward slashes. */
export type Source = { readonly path: string; readonly text: string };

/** What tools make at the top and git does not keep. */
export const MADE = /^(node_modules|\.git|\.svelte-kit|build|build-.+|coverage|.+\.log)$/;

const TEXT = /\.(ts|js|svelte|html|css|json|md|webmanifest|svg|csv|txt)$|^(\.gitignore|\.npmrc|LICENSE|\.ci\/run)$/;

/** Every text file below a folder or file of the top. */
export function sourcesIn(...tops: readonly string[]): Source[] {
	return tops.flatMap((top) => pathsIn(top)).map((path) => ({ path, text: readFileSync(join(root, path), 'utf8') }));
}

function pathsIn(path: string): string[] {
	let entries;
	try {
		entries = readdirSync(join(root, path), { withFileTypes: true });
	} catch {
		return TEXT.test(path) ? [path] : [];
	}
	return entries
		.map((entry) => ({ path: posix.join(path, entry.name), folder: entry.isDirectory() }))
		.filter((entry) => entry.path !== 'test/browser/shots')
		.flatMap((entry) => (entry.folder ? pathsIn(entry.path) : TEXT.test(entry.path) ? [entry.path] : []))
		.sort();
}

/** The names at the top of the repository, without what tools made. */
export function topNames(): string[] {
	return readdirSync(root).filter((name) => !MADE.test(name));
}

/** Every file that the repository keeps as text. */
export function allSources(): Source[] {
	return sourcesIn(...topNames());
}

/** The TypeScript of a file: all of it, or the script blocks of a Svelte file with everything else blanked out, so that lines agree. */
export function scriptOf({ path, text }: Source): string {
	if (!path.endsWith('.svelte')) return text;
	let script = '';
	let from = 0;
	for (const match of text.matchAll(/(<script\b[^>]*>)([\s\S]*?)<\/script>/g)) {
		const begin = match.index + match[1]!.length;
		script += blank(text.slice(from, begin)) + match[2]!;
		from = begin + match[2]!.length;
	}
	return script + blank(text.slice(from));
}

/** The same lines, empty. */
export function blank(text: string): string {
	return text.replace(/[^\n]/g, ' ');
}

/** The line of a position, counted from one. */
export function lineAt(text: string, position: number): number {
	return text.slice(0, position).split('\n').length;
}
