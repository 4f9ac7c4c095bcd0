import type { FactorRule, LogoView, ShopDetails, ShopView, WorkshopHead } from '$lib/schemas/shop';
import type { SignedInPerson } from '$lib/schemas/people';
import { hasSecondFactor } from '../auth/second-factor';
import { Workshop, WorkshopLogo } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { sha256 } from '../hash';
import { allow } from '../policies';
import { recordBy, type AuditAction } from './audit';
import { makeLogo, type MadeLogo } from './logo-picture';
import { saveVersioned } from './records';

/** One of a workshop's logos, ready for a page. */
export async function findLogo(
	workshopId: number,
	logoSha256: string | null | undefined
): Promise<LogoView | null> {
	if (!logoSha256) return null;
	const logo = await WorkshopLogo.findOne({ where: { workshopId, sha256: logoSha256 } });
	if (!logo) return null;
	const { widthPx, heightPx, png } = logo;
	return { widthPx, heightPx, dataUri: `data:image/png;base64,${png.toString('base64')}` };
}

/** What stands at the head of a print, a page or a letter. */
export const headOf = (workshop: Workshop): WorkshopHead => {
	const { name, address, phone, email, web, businessNumber, logoSha256 } = workshop;
	return { name, address, phone, email, web, businessNumber, logoSha256: logoSha256 ?? null };
};

async function findWorkshop({ workshopId }: SignedInPerson): Promise<Workshop> {
	const workshop = await Workshop.findByPk(workshopId);
	if (!workshop) throw notFound('workshop');
	return workshop;
}

async function show(workshop: Workshop): Promise<ShopView> {
	const { name, address, phone, email, web, businessNumber, requiresSecondFactor, version } = workshop;
	return {
		...{ name, address, phone, email, web, businessNumber, requiresSecondFactor, version },
		logo: await findLogo(workshop.id, workshop.logoSha256)
	};
}

export async function getShop(person: SignedInPerson): Promise<ShopView> {
	allow(person, 'shop.write');
	return show(await findWorkshop(person));
}

async function changeShop(
	person: SignedInPerson,
	action: AuditAction,
	seenVersion: number | null,
	changes: Partial<
		Pick<Workshop, keyof ShopDetails | 'requiresSecondFactor' | 'logoSha256' | 'retentionYears'>
	>
): Promise<ShopView> {
	allow(person, 'shop.write');
	return inTransaction(async (transaction) => {
		const workshop = await findWorkshop(person);
		await saveVersioned(workshop, 'shop', seenVersion ?? workshop.version, changes, transaction);
		await recordBy(person, action, { type: 'workshop', id: workshop.id }, transaction, { ...changes });
		return show(workshop);
	});
}

/** The details, and the logo that was sent along with them. */
export function saveShop(
	person: SignedInPerson,
	{ version, ...details }: ShopDetails,
	logo: MadeLogo | null = null
): Promise<ShopView> {
	return inTransaction(async () => {
		const shop = await changeShop(person, 'shop.changed', version, details);
		return logo ? keepLogo(person, logo) : shop;
	});
}

/**
 * Whether managers and engineers must have a second factor; from their next request on. Who asks others for it has one:
 * else the page with the way back would be shut to them, too.
 */
export async function saveFactorRule(person: SignedInPerson, rule: FactorRule): Promise<ShopView> {
	allow(person, 'shop.write');
	const { requiresSecondFactor, version } = rule;
	return inTransaction(async () => {
		if (requiresSecondFactor && !(await hasSecondFactor(person.id))) {
			throw new AppError('conflict', 'Set up your own second factor before you ask others for theirs.');
		}
		return changeShop(person, 'shop.second-factor-rule', version, { requiresSecondFactor });
	});
}

/** Takes a logo, made anew from what was sent. Pages that were sent before keep theirs. */
export async function saveLogo(person: SignedInPerson, bytes: Uint8Array): Promise<ShopView> {
	allow(person, 'shop.write');
	return keepLogo(person, await makeLogo(bytes));
}

function keepLogo(person: SignedInPerson, { png, widthPx, heightPx }: MadeLogo): Promise<ShopView> {
	const { workshopId } = person;
	const logoSha256 = sha256(png);
	return inTransaction(async (transaction) => {
		const row = { workshopId, sha256: logoSha256 };
		await WorkshopLogo.findOrCreate({
			where: row,
			defaults: { ...row, png, widthPx, heightPx },
			transaction
		});
		return changeShop(person, 'shop.logo-changed', null, { logoSha256 });
	});
}

export function removeLogo(person: SignedInPerson, version: number): Promise<ShopView> {
	return changeShop(person, 'shop.logo-removed', version, { logoSha256: null });
}
