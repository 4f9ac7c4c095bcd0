import { z } from 'zod';
import { optionalEmail, optionalPhone, optionalWords, versionSchema, words } from './fields';

/** A picture of a known size, ready for a page. */
export const logoSchema = z.object({
	dataUri: z.string(),
	widthPx: z.number().int(),
	heightPx: z.number().int()
});
export type LogoView = z.infer<typeof logoSchema>;

const details = {
	name: words('Name of the shop', 120),
	address: optionalWords('Address', 240),
	phone: optionalPhone('Telephone'),
	email: optionalEmail('E-mail'),
	web: optionalWords('Web', 200).refine(
		(web) => web === '' || /^(https?:\/\/)?[^\s./]+(\.[^\s./]+)+(\/\S*)?$/.test(web),
		{
			error: 'Web must be an address such as shop.example.'
		}
	),
	businessNumber: optionalWords('Business number', 60)
};

export const shopDetailsSchema = z.object({ ...details, version: versionSchema });
export type ShopDetails = z.infer<typeof shopDetailsSchema>;

export const shopSchema = z.object({
	...details,
	logo: logoSchema.nullable(),
	requiresSecondFactor: z.boolean(),
	version: versionSchema
});
export type ShopView = z.infer<typeof shopSchema>;

export const factorRuleSchema = z.object({ requiresSecondFactor: z.boolean(), version: versionSchema });
export type FactorRule = z.infer<typeof factorRuleSchema>;

export const shopFormSchema = z.object({
	...details,
	version: z.string().default(''),
	/** The box of the logo, for what is wrong with it: the picture itself goes another way. */
	file: z.string().default('')
});

/** Who stands at the head of what is printed or sent; pages from before have no more than the first four. */
export interface WorkshopHead {
	name: string;
	address: string;
	phone: string;
	email: string;
	web?: string;
	businessNumber?: string;
	logoSha256?: string | null;
}

export const MOST_LOGO_BYTES = 5 * 1024 * 1024;
