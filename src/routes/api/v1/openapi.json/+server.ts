import { json } from '@sveltejs/kit';
import { env } from '$lib/server/env';
import { openApiDocument } from '$lib/server/http/openapi';
import { OPERATIONS } from '$lib/server/http/operations';

export const GET = (): Response => json(openApiDocument(OPERATIONS, env().ORIGIN));
