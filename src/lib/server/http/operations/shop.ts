import { z } from 'zod';
import { versionSchema } from '$lib/schemas/fields';
import { cautionTextInputSchema, cautionTextSchema } from '$lib/schemas/caution-texts';
import { retentionInputSchema, retentionSchema } from '$lib/schemas/retention';
import { factorRuleSchema, MOST_LOGO_BYTES, shopDetailsSchema, shopSchema } from '$lib/schemas/shop';
import { defineFileOperation, defineOperation } from '../operation';

export const shopOperations = {
	get: defineOperation({
		id: 'getShop',
		method: 'GET',
		path: '/api/v1/shop',
		action: 'shop.write',
		summary: 'What stands at the head of prints, pages and letters, and the rules of the shop.',
		answer: shopSchema,
		status: 200
	}),
	save: defineOperation({
		id: 'saveShop',
		method: 'PUT',
		path: '/api/v1/shop',
		action: 'shop.write',
		summary: 'Keeps the details of the shop.',
		body: shopDetailsSchema,
		answer: shopSchema,
		status: 200
	}),
	saveLogo: defineFileOperation({
		id: 'saveLogo',
		method: 'POST',
		path: '/api/v1/shop/logo',
		action: 'shop.write',
		summary: 'Takes a PNG or JPEG as logo, made anew at most 600 × 200 px.',
		params: z.object({}),
		query: z.object({}),
		mostFileBytes: MOST_LOGO_BYTES,
		answer: shopSchema,
		status: 200
	}),
	removeLogo: defineOperation({
		id: 'removeLogo',
		method: 'DELETE',
		path: '/api/v1/shop/logo',
		action: 'shop.write',
		summary: 'Goes on without a logo; pages that were sent keep theirs.',
		body: z.object({ version: versionSchema }),
		answer: shopSchema,
		status: 200
	}),
	factorRule: defineOperation({
		id: 'saveSecondFactorRule',
		method: 'PUT',
		path: '/api/v1/shop/second-factor',
		action: 'shop.write',
		summary: 'Whether managers and engineers must have a second factor, from their next request on.',
		body: factorRuleSchema,
		answer: shopSchema,
		status: 200
	}),
	getCautions: defineOperation({
		id: 'getCautionText',
		method: 'GET',
		path: '/api/v1/shop/cautions',
		action: 'shop.write',
		summary: 'What the shop adds to the cautions.',
		answer: cautionTextSchema,
		status: 200
	}),
	saveCautions: defineOperation({
		id: 'saveCautionText',
		method: 'PUT',
		path: '/api/v1/shop/cautions',
		action: 'shop.write',
		summary: 'Region and own sentences for what is issued from now on; nothing of ours is taken away.',
		body: cautionTextInputSchema,
		answer: cautionTextSchema,
		status: 200
	}),
	getRetention: defineOperation({
		id: 'getRetention',
		method: 'GET',
		path: '/api/v1/shop/retention',
		action: 'shop.write',
		summary: 'How long customers’ data are kept, and whose are older.',
		answer: retentionSchema,
		status: 200
	}),
	saveRetention: defineOperation({
		id: 'saveRetention',
		method: 'PUT',
		path: '/api/v1/shop/retention',
		action: 'shop.write',
		summary: 'Keeps how long customers’ data are kept; null keeps them.',
		body: retentionInputSchema,
		answer: retentionSchema,
		status: 200
	})
};
