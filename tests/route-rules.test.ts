import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { ROUTE_RULES } from './e2e/route-rules';
import { PROJECT } from './support/source-files';

const ROUTES = join(PROJECT, 'src/routes');
const EXPORTED_METHOD = /export const (GET|POST|PUT|PATCH|DELETE)\b/g;
const ACTIONS = /export const actions[^=]*=\s*\{\n([\s\S]*?)\n\}/;
const ACTION_NAME = /^\t(\w+)(?=\s*[:(,]|$)/gm;

function methodsOf(folder: string, names: string[]): string[] {
	const read = (name: string) => (names.includes(name) ? readFileSync(join(folder, name), 'utf8') : '');
	const endpoint = [...read('+server.ts').matchAll(EXPORTED_METHOD)].map((match) => match[1] ?? '');
	const page = read('+page.server.ts');
	const actions = [...(ACTIONS.exec(page)?.[1] ?? '').matchAll(ACTION_NAME)].map((match) => match[1] ?? '');
	const shows = names.includes('+page.svelte') || page.includes('PageServerLoad');
	return [...endpoint, ...(shows ? ['GET'] : []), ...actions];
}

function listRoutes(folder: string, path: string): Map<string, string[]> {
	const entries = readdirSync(folder, { withFileTypes: true });
	const names = entries.filter((entry) => entry.isFile()).map(({ name }) => name);
	const found = new Map<string, string[]>();
	const methods = methodsOf(folder, names);
	if (methods.length > 0) found.set(path === '' ? '/' : path, methods.sort());
	for (const { name } of entries.filter((entry) => entry.isDirectory())) {
		const below = name.startsWith('(') ? path : `${path}/${name}`;
		for (const [route, all] of listRoutes(join(folder, name), below)) found.set(route, all);
	}
	return found;
}

describe('the rules of who may go where', () => {
	it('name every route, and every method and form action that it takes', () => {
		const routed = listRoutes(ROUTES, '');
		const ruled = new Map(ROUTE_RULES.map(({ route, methods }) => [route, [...methods].sort()]));
		expect(routed.size).toBeGreaterThan(30);
		expect(Object.fromEntries([...ruled].sort())).toEqual(Object.fromEntries([...routed].sort()));
	});

	it('name each route once', () => {
		expect(new Set(ROUTE_RULES.map(({ route }) => route)).size).toBe(ROUTE_RULES.length);
	});

	it('let only sign-in, the pages of a link, the probes and the API’s description go without a person', () => {
		const open = ROUTE_RULES.filter((rule) => rule.for === 'anyone').map(({ route }) => route);
		expect(open).toEqual([
			'/',
			'/healthz',
			'/readyz',
			'/sign-in',
			'/sign-in/link/[token]',
			'/sign-in/second-step',
			'/sign-in/invitation/[token]',
			'/sign-out',
			'/sheet/[token]',
			'/reminders/[stop]',
			'/api/v1/openapi.json'
		]);
	});
});
