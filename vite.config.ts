import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig, type TestProjectInlineConfiguration } from 'vitest/config';

function testProject(name: string, test: Record<string, unknown>): TestProjectInlineConfiguration {
	return { extends: true, test: { name, environment: 'node', expect: { requireAssertions: true }, ...test } };
}

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	worker: { format: 'es' },
	ssr: { external: ['sequelize', 'mariadb'] },
	server: { port: Number(process.env.PORT ?? 4173), strictPort: true },
	test: {
		projects: [
			testProject('unit', {
				include: ['src/**/*.test.ts', 'tests/*.test.ts'],
				exclude: ['src/**/*.component.test.ts', 'src/**/*.db.test.ts']
			}),
			testProject('reference', { include: ['tests/reference/**/*.test.ts'] }),
			testProject('services', {
				include: ['src/**/*.db.test.ts', 'tests/services/**/*.db.test.ts'],
				fileParallelism: false,
				testTimeout: 30_000,
				hookTimeout: 60_000
			}),
			{
				...testProject('components', { environment: 'jsdom', include: ['src/**/*.component.test.ts'] }),
				resolve: { conditions: ['browser'] }
			}
		]
	}
});
