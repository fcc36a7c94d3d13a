// npm start: installs and builds what is missing, then serves the finished site on this machine.
import { join } from 'node:path';
import { buildReason, builds, runBuild } from './build.js';
import { requireNode, requirePackages, root } from './machine.js';
import { host, lanAddresses } from './serve.js';

const USUAL_PORT = 4173;

async function main() {
	requireNode();
	await requirePackages();
	const reason = buildReason(builds.main);
	if (reason !== null) {
		console.log(`Building Meltbook (${reason}) ...`);
		if ((await runBuild(builds.main)) !== 0) throw new Error('The build failed; the reason stands above.');
	}
	const args = process.argv.slice(2);
	const portAt = args.indexOf('--port');
	const port = portAt === -1 ? USUAL_PORT : Number(args[portAt + 1]);
	if (!Number.isInteger(port) || port < 0 || port > 65_535) throw new Error('--port needs a number from 0 to 65535.');
	const lan = args.includes('--host');
	const site = await host({ folder: join(root, builds.main.out), port, lan });
	console.log(`Meltbook is at http://localhost:${site.port}${site.base}/`);
	if (lan) {
		for (const address of lanAddresses()) console.log(`In the local network: http://${address}:${site.port}${site.base}/`);
		console.log('Phones keep a site for offline use only when it comes over HTTPS: see README.md.');
	}
	console.log('Stop with Ctrl+C.');
}

main().catch((error) => {
	console.error(error.message);
	process.exitCode = 1;
});
