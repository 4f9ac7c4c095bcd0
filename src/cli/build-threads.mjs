// Builds the programs of the application's own threads beside it: each one file, with all that it needs.
import { build } from 'vite';
import { join } from 'node:path';
import { PROJECT } from './lib/folders.mjs';

await build({
	configFile: false,
	root: PROJECT,
	logLevel: 'warn',
	resolve: { alias: { $lib: join(PROJECT, 'src', 'lib') } },
	ssr: { noExternal: true },
	build: {
		ssr: join('src', 'lib', 'server', 'services', 'reruns', 'rerun-worker.ts'),
		outDir: join('build', 'threads'),
		emptyOutDir: true
	}
});
