import { z } from 'zod';
import { FILE_FIELD, FILE_MEDIA } from './file-upload';
import type { Operation } from './operation';

const problemSchema = z.object({
	type: z.literal('about:blank'),
	title: z.string(),
	status: z.number().int(),
	detail: z.string(),
	code: z.string(),
	id: z.string(),
	problems: z.array(
		z.object({
			path: z.string(),
			message: z.string(),
			code: z.string().optional(),
			value: z.unknown().optional(),
			limit: z.string().optional(),
			line: z.number().int().optional(),
			column: z.object({ number: z.number().int(), name: z.string() }).optional()
		})
	)
});

type JsonSchema = Record<string, unknown>;

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): JsonSchema {
	const { $schema: _dialect, ...json } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as JsonSchema;
	return json;
}

function parametersOf(where: 'path' | 'query', schema: z.ZodObject | undefined): JsonSchema[] {
	if (!schema) return [];
	const json = schemaOf(schema, 'input');
	const required = new Set((json.required as string[] | undefined) ?? []);
	return Object.entries((json.properties as Record<string, JsonSchema> | undefined) ?? {}).map(
		([name, each]) => ({
			name,
			in: where,
			required: where === 'path' || required.has(name),
			schema: each
		})
	);
}

const IDEMPOTENCY_KEY = {
	name: 'Idempotency-Key',
	in: 'header',
	required: false,
	description: 'A repeat with the same key and body gets the first answer again and does nothing twice.',
	schema: { type: 'string', minLength: 1, maxLength: 120 }
};

/** A file, whole as the body or as the field "file" of a form. */
function fileBody(mostBytes: number, media: readonly string[]): JsonSchema {
	const file = { type: 'string', maxLength: mostBytes, description: `At most ${mostBytes} bytes` };
	const form = { type: 'object', required: [FILE_FIELD], properties: { [FILE_FIELD]: file } };
	const plain = media.map((each) => [each, { schema: file }]);
	return {
		required: true,
		content: { 'multipart/form-data': { schema: form }, ...Object.fromEntries(plain) }
	};
}

function bodyOf({ body, mostFileBytes, fileMedia = FILE_MEDIA }: Operation): JsonSchema {
	if (mostFileBytes !== undefined) return { requestBody: fileBody(mostFileBytes, fileMedia) };
	if (!body) return {};
	const content = { 'application/json': { schema: schemaOf(body, 'input') } };
	return { requestBody: { required: true, content } };
}

function answerOf(answer: z.ZodType, media: readonly string[] = ['application/json']): JsonSchema {
	return Object.fromEntries(media.map((each) => [each, { schema: schemaOf(answer, 'output') }]));
}

function describe(operation: Operation): JsonSchema {
	const { id, summary, params, query, answer, answerMedia, status, method } = operation;
	const problem = {
		description: 'A problem, as in RFC 9457',
		content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } }
	};
	return {
		operationId: id,
		summary,
		parameters: [
			...parametersOf('path', params),
			...parametersOf('query', query),
			...(method === 'POST' ? [IDEMPOTENCY_KEY] : [])
		],
		...bodyOf(operation),
		responses: {
			[status]: { description: 'Done', content: answerOf(answer, answerMedia) },
			default: problem
		}
	};
}

/** The OpenAPI 3.1 document of all operations, made from the schemas that check them. */
export function openApiDocument(operations: readonly Operation[], origin: string): JsonSchema {
	const paths: Record<string, JsonSchema> = {};
	for (const operation of operations) {
		const path = operation.path.replace(/\[(\w+)\]/g, '{$1}');
		paths[path] = { ...paths[path], [operation.method.toLowerCase()]: describe(operation) };
	}
	return {
		openapi: '3.1.0',
		info: {
			title: 'Soakline',
			version: '1',
			description:
				'Whether an auxiliary battery will live where it is to be mounted. An estimate, not a certificate: the makers, local rules and licensed practice come first.'
		},
		servers: [{ url: origin }],
		security: [{ session: [] }],
		paths,
		components: {
			schemas: { Problem: schemaOf(problemSchema, 'output') },
			securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'soakline' } }
		}
	};
}
