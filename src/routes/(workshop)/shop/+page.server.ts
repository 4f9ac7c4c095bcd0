import { fail, redirect } from '@sveltejs/kit';
import { versionSchema } from '$lib/schemas/fields';
import {
	factorRuleSchema,
	MOST_LOGO_BYTES,
	shopDetailsSchema,
	shopFormSchema,
	type ShopView
} from '$lib/schemas/shop';
import { AppError } from '$lib/server/errors';
import { doOrSay } from '$lib/server/http/do-or-say';
import { saveEdited } from '$lib/server/http/edit-form';
import { fileOf, readFileForm } from '$lib/server/http/file-upload';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { getShop, removeLogo, saveFactorRule, saveLogo, saveShop } from '$lib/server/services/shop';
import type { Actions, PageServerLoad } from './$types';

const toShopForm = ({ name, address, phone, email, web, businessNumber, version }: ShopView) => ({
	...{ name, address, phone, email, web, businessNumber },
	version: String(version)
});

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	const shop = await orPageError(getShop(person));
	return {
		...{ shop, done: event.url.searchParams.get('done') },
		form: await loadForm(shopFormSchema, toShopForm(shop))
	};
};

export const actions: Actions = {
	details: (event) =>
		saveEdited(event, {
			action: 'shop.write',
			schema: shopFormSchema,
			save: async (person, form) => {
				await saveShop(person, validate(shopDetailsSchema, form));
				return '/shop?done=details';
			},
			newest: async (person) => toShopForm(await getShop(person))
		}),
	logo: async (event) => {
		const person = guard(event, 'shop.write');
		try {
			const file = await fileOf(await readFileForm(event.request, MOST_LOGO_BYTES), MOST_LOGO_BYTES);
			await saveLogo(person, file.bytes);
		} catch (refusal) {
			if (!(refusal instanceof AppError)) throw refusal;
			return fail(refusal.status, { refusal: refusal.message });
		}
		redirect(303, '/shop?done=logo#logo');
	},
	removeLogo: (event) =>
		doOrSay(event, 'shop.write', async (person, sent) => {
			await removeLogo(person, validate(versionSchema, sent.get('version') ?? undefined));
			redirect(303, '/shop?done=noLogo#logo');
		}),
	secondFactor: (event) =>
		doOrSay(event, 'shop.write', async (person, sent) => {
			const version = sent.get('version') ?? undefined;
			const rule = { requiresSecondFactor: sent.get('requires') === 'true', version };
			await saveFactorRule(person, validate(factorRuleSchema, rule));
			redirect(303, '/shop?done=factor#second-factor');
		})
};
