import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { openApiDocument } from './openapi';
import { OPERATIONS } from './operations';
import { RULES } from '../policies';

const API = join(process.cwd(), 'src/routes/api/v1');
const DOCUMENT_ITSELF = '/api/v1/openapi.json';

/** Every method that a route file under api/v1 exports, as "GET /api/v1/places". */
async function listRoutes(folder: string, path: string): Promise<string[]> {
	const found: string[] = [];
	for (const entry of readdirSync(folder, { withFileTypes: true })) {
		if (entry.isDirectory())
			found.push(...(await listRoutes(join(folder, entry.name), `${path}/${entry.name}`)));
		if (entry.name !== '+server.ts' || path === DOCUMENT_ITSELF) continue;
		const source = await import('node:fs/promises').then(({ readFile }) =>
			readFile(join(folder, entry.name), 'utf8')
		);
		const methods = [...source.matchAll(/export const (GET|POST|PUT|PATCH|DELETE)\b/g)].map(
			(match) => match[1]
		);
		found.push(...methods.map((method) => `${method} ${path}`));
	}
	return found;
}

type Described = Record<
	string,
	{ operationId: string; responses: Record<string, unknown>; requestBody?: unknown }
>;
const document = openApiDocument(OPERATIONS, 'http://localhost:4173') as {
	openapi: string;
	paths: Record<string, Described>;
};

describe('the OpenAPI document', () => {
	it('has every route of the API, and no route that does not exist', async () => {
		const described = OPERATIONS.map(({ method, path }) => `${method} ${path}`);
		const routed = await listRoutes(API, '/api/v1');
		expect(routed.length).toBeGreaterThan(5);
		expect(described.sort()).toEqual(routed.sort());
	});

	it('names each operation once, with an answer and a problem', () => {
		const operations = Object.values(document.paths).flatMap((path) => Object.values(path));
		const ids = operations.map(({ operationId }) => operationId);
		expect(new Set(ids).size).toBe(ids.length);
		expect(ids).toHaveLength(OPERATIONS.length);
		for (const { responses } of operations)
			expect(Object.keys(responses)).toEqual([expect.any(String), 'default']);
	});

	it('writes parameters of a path as OpenAPI does', () => {
		expect(Object.keys(document.paths)).toContain('/api/v1/places/{placeId}');
		expect(document.openapi).toBe('3.1.0');
	});

	it('takes the limits from the schemas that check the input', () => {
		const body = document.paths['/api/v1/places']?.post?.requestBody as {
			content: { 'application/json': { schema: { properties: Record<string, { maximum?: number }> } } };
		};
		expect(body.content['application/json'].schema.properties.hotDayMaxC?.maximum).toBe(60);
	});

	it('gives every operation a rule that exists', () => {
		expect(OPERATIONS.filter(({ action }) => !(action in RULES))).toEqual([]);
		expect(OPERATIONS.length).toBeGreaterThan(0);
	});
});
