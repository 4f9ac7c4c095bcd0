import type { RequestEvent } from '@sveltejs/kit';
import { versionSchema } from '$lib/schemas/fields';
import { MOST_LOGO_BYTES, shopDetailsSchema, shopFormSchema, type ShopView } from '$lib/schemas/shop';
import type { SignedInPerson } from '$lib/schemas/people';
import { besideForm } from '$lib/server/http/beside-form';
import { saveEdited } from '$lib/server/http/edit-form';
import { bytesOf, readFormAroundFile, type FormAroundFile } from '$lib/server/http/form-around-file';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { makeLogo } from '$lib/server/services/logo-picture';
import { findFactorReach } from '$lib/server/services/second-factor';
import { getShop, removeLogo, saveFactorRule, saveLogo, saveShop } from '$lib/server/services/shop';
import { countWaitingErasures } from '$lib/server/services/waiting-erasures';
import type { Actions, PageServerLoad } from './$types';

const toShopForm = ({ name, address, phone, email, web, businessNumber, version }: ShopView) => ({
	...{ name, address, phone, email, web, businessNumber },
	version: String(version)
});

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	const [shop, waiting, reach] = await orPageError(
		Promise.all([getShop(person), countWaitingErasures(person), findFactorReach(person)])
	);
	return {
		...{ shop, waiting, reach, done: event.url.searchParams.get('done') },
		form: await loadForm(shopFormSchema, toShopForm(shop))
	};
};

/** The details and what stands beside them come as one form, so that none of it costs what was typed in the other. */
const readShopForm = (event: RequestEvent): Promise<FormAroundFile> =>
	orPageError(readFormAroundFile(event.request, MOST_LOGO_BYTES));

async function beside(
	event: RequestEvent,
	done: string,
	work: (person: SignedInPerson, form: FormAroundFile, version: number) => Promise<ShopView>
) {
	const person = guard(event, 'shop.write');
	const form = await readShopForm(event);
	const { sent } = form;
	return besideForm({ sent, schema: shopFormSchema }, async () => {
		const seen = validate(versionSchema, sent.get('version') ?? undefined);
		const { version } = await work(person, form, seen);
		// Where somebody else changed the shop meanwhile, the details must still find out.
		return { done, filled: { version: String(version === seen + 1 ? version : seen) } };
	});
}

export const actions: Actions = {
	details: async (event) => {
		guard(event, 'shop.write');
		const form = await readShopForm(event);
		return saveEdited(event, {
			action: 'shop.write',
			schema: shopFormSchema,
			sent: form.sent,
			prepare: async () => (form.file ? makeLogo(bytesOf(form, MOST_LOGO_BYTES)) : null),
			save: async (person, details, logo) => {
				await saveShop(person, validate(shopDetailsSchema, details), logo);
				return '/shop?done=details';
			},
			newest: async (person) => toShopForm(await getShop(person))
		});
	},
	logo: (event) => beside(event, 'logo', (person, form) => saveLogo(person, bytesOf(form, MOST_LOGO_BYTES))),
	removeLogo: (event) => beside(event, 'noLogo', (person, _form, version) => removeLogo(person, version)),
	secondFactor: (event) =>
		beside(event, 'factor', (person, { sent }, version) => {
			const requiresSecondFactor = sent.get('requires') === 'true';
			return saveFactorRule(person, { requiresSecondFactor, version });
		})
};
