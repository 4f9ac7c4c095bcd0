// Builds the bench as the application is built, and runs it: what turns TypeScript into JavaScript on the fly wraps each
// inner function, which the engine's small ones would pay for.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build } from 'vite';
import { PROJECT } from './lib/folders.mjs';

const outDir = join(PROJECT, 'node_modules', '.cache', 'soakline-bench');
await build({
	configFile: false,
	root: PROJECT,
	logLevel: 'error',
	resolve: { alias: { $lib: join(PROJECT, 'src', 'lib') } },
	build: {
		ssr: 'src/cli/bench.ts',
		outDir,
		emptyOutDir: true,
		target: 'node20',
		minify: false,
		rollupOptions: { output: { entryFileNames: 'bench.mjs' } }
	}
});
const PARTS = [[join(outDir, 'bench.mjs')], ['--import', 'tsx', join('src', 'cli', 'bench-survey.ts')]];
for (const part of PARTS) {
	const { status } = spawnSync(process.execPath, part, { cwd: PROJECT, stdio: 'inherit' });
	process.exitCode ||= status ?? 1;
}
