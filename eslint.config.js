import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

/** Who may not import what, and what to do instead. The same table is held by tests/architecture.test.ts. */
const layers = [
	{
		files: ['src/lib/thermal/**'],
		ignores: ['src/lib/thermal/**/*.test.ts'],
		patterns: [
			{
				regex: '^[^.]',
				message: 'The engine imports only itself, by relative path: pass in what it needs as a value.'
			},
			{
				regex: '(^|/)(schemas|format|components|server|simulation)/',
				message: 'The engine knows nothing above it: move the type or the number into src/lib/thermal.'
			}
		]
	},
	{
		files: ['src/lib/schemas/**', 'src/lib/format/**'],
		patterns: [
			{
				regex: 'lib/(server|components|simulation)(/|$)',
				message:
					'Schemas and formats are shared with the browser: they may use the engine and themselves only.'
			}
		]
	},
	{
		files: ['src/lib/simulation/**'],
		patterns: [
			{
				regex: 'lib/(server|components)(/|$)',
				message: "The simulation folder is the browser's side: take typed data, not services or components."
			}
		]
	},
	{
		files: ['src/lib/components/**'],
		patterns: [
			{
				regex: 'lib/server(/|$)',
				message: 'Components get data as properties: load it in the route and pass it down.'
			}
		]
	},
	{
		files: ['src/lib/server/db/**'],
		patterns: [
			{
				regex: '(lib/server|\\.\\.)/(services|policies|presenters|auth|mail|storage|api)(/|$)',
				message: 'Models know nothing of who uses them: put the rule into a service or a policy.'
			}
		]
	},
	{
		files: ['src/lib/server/policies/**', 'src/lib/server/presenters/**'],
		patterns: [
			{
				regex: '/(services|auth|mail|storage|api)(/|$)',
				message: 'Policies allow and presenters show: they get what they need as arguments.'
			}
		]
	},
	{
		files: ['src/lib/server/papers/**'],
		patterns: [
			{
				regex: '/(services|db|auth|mail|http)(/|$)',
				message: 'Papers set what they are given: a service reads it and passes it in.'
			}
		]
	},
	{
		files: ['src/lib/server/storage/**'],
		patterns: [
			{
				regex: '(lib/|/)(db|services|policies|presenters|auth|mail|http|schemas)(/|$)',
				message: 'The storage knows keys and bytes alone: what they are is known to services.'
			}
		]
	},
	{
		files: ['src/routes/**/*.ts', 'src/hooks.server.ts'],
		patterns: [
			{
				regex: 'lib/server/db(/|$)',
				message: 'Routes never touch models: call a service.',
				allowTypeImports: false
			}
		]
	},
	{
		files: ['src/routes/**/*.svelte'],
		patterns: [
			{
				regex: 'lib/server(/|$)',
				message: 'Pages show their own data: load it in +page.server.ts.'
			}
		]
	}
];

export default ts.config(
	{
		ignores: [
			'src/lib/**/generated/',
			'build/',
			'.svelte-kit/',
			'.soakline/',
			'node_modules/',
			'test-results/',
			'playwright-report/'
		]
	},
	js.configs.recommended,
	...ts.configs.recommended,
	...svelte.configs.recommended,
	prettier,
	...svelte.configs.prettier,
	{
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		rules: {
			'no-undef': 'off',
			'max-lines': ['error', { max: 350, skipBlankLines: true, skipComments: true }],
			'no-console': 'error',
			'@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
			'svelte/no-navigation-without-resolve': 'off'
		}
	},
	{
		files: ['src/**/*.ts', 'tests/**/*.ts'],
		languageOptions: { parserOptions: { projectService: true } },
		rules: { '@typescript-eslint/no-floating-promises': 'error' }
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		// Without types, which are svelte-check's: to build them once more took longer than all the rules together.
		languageOptions: { parserOptions: { parser: ts.parser, svelteConfig } }
	},
	{ files: ['src/cli/**'], rules: { 'no-console': 'off' } },
	...layers.map(({ files, ignores, patterns }) => ({
		files,
		...(ignores ? { ignores } : {}),
		rules: { 'no-restricted-imports': /** @type {['error', object]} */ (['error', { patterns }]) }
	}))
);
