// npm run bench [-- NAME] [--json]: each file directly in test/bench is one bench, run by itself so that none warms up another.
// What benches share stands in folders below.
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { requireNode, requirePackages, root, runTool } from './machine.js';

async function main() {
	requireNode();
	await requirePackages();
	const args = process.argv.slice(2);
	const options = args.filter((arg) => arg.startsWith('-'));
	const names = args.filter((arg) => !arg.startsWith('-'));
	const all = readdirSync(join(root, 'test', 'bench'))
		.filter((name) => name.endsWith('.ts'))
		.map((name) => name.replace(/\.ts$/, ''))
		.sort();
	const unknown = names.filter((name) => !all.includes(name));
	if (unknown.length > 0) throw new Error(`There is no bench named ${unknown.join(', ')}. There are: ${all.join(', ')}.`);
	for (const name of names.length > 0 ? names : all) {
		const exit = await runTool('tsx/dist/cli.mjs', [join('test', 'bench', `${name}.ts`), ...options]);
		if (exit !== 0) throw new Error(`The bench ${name} failed.`);
	}
}

main().catch((error) => {
	console.error(error.message);
	process.exitCode = 1;
});
