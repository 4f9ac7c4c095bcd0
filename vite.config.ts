import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig, type TestProjectInlineConfiguration } from 'vitest/config';

function testProject(name: string, test: Record<string, unknown>): TestProjectInlineConfiguration {
	return { extends: true, test: { name, environment: 'node', expect: { requireAssertions: true }, ...test } };
}

/** One file at a time: they share the database of the run. */
const ON_THE_DATABASE = { fileParallelism: false, testTimeout: 30_000, hookTimeout: 60_000 };

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	worker: { format: 'es' },
	ssr: { external: ['sequelize', 'mariadb'] },
	server: { port: Number(process.env.PORT ?? 4173), strictPort: true },
	test: {
		projects: [
			testProject('unit', {
				isolate: false,
				// A busy machine is not a fault.
				testTimeout: 30_000,
				include: ['src/**/*.test.ts', 'tests/*.test.ts'],
				exclude: ['src/**/*.{component,db,settings}.test.ts']
			}),
			testProject('reference', { isolate: false, include: ['tests/reference/**/*.test.ts'] }),
			testProject('services', { ...ON_THE_DATABASE, isolate: false, include: ['src/**/*.db.test.ts'] }),
			// The process keeps the settings that it read first, so that each file here has one of its own.
			testProject('settings', { ...ON_THE_DATABASE, include: ['src/**/*.settings.test.ts'] }),
			{
				...testProject('components', { environment: 'jsdom', include: ['src/**/*.component.test.ts'] }),
				resolve: { conditions: ['browser'] }
			}
		]
	}
});
