import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { makeRecommended } from '../../../../tests/support/fitted';
import { post } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { CAUTIONS } from '$lib/format/cautions';
import { connection } from '../db/connection';
import { AuditEntry, Customer, OutgoingMail, Recommendation, SecondFactor, WorkshopLogo } from '../db/models';
import { listPictures } from '../mail/letterhead';
import { getCautionText, listIssuedCautions, saveCautionText } from './caution-texts';
import { getRecommendationDocument } from './recommendations';
import { addMonths, today } from './days';
import { getRetention, saveRetention } from './retention';
import { makeLogo } from './logo-picture';
import { getShop, removeLogo, saveFactorRule, saveLogo, saveShop } from './shop';

useTestDatabase();

const DETAILS = {
	...{ name: 'Quiet Creek Electrics', address: '1 Invented Lane', phone: '00 0000 0303' },
	...{ email: 'bench@quiet-creek.example', web: 'quiet-creek.example', businessNumber: 'BN 12 345' }
};

const picture = (width: number, height: number) =>
	sharp({ create: { width, height, channels: 3, background: '#1f1b16' } });

describe('the details of the shop', () => {
	it('are kept, recorded, and refused from an old page', async () => {
		const { manager, engineer, workshopId } = await makeCrew();
		expect(await saveShop(manager, { ...DETAILS, version: 0 })).toMatchObject({ ...DETAILS, version: 1 });
		expect(await getShop(manager)).toMatchObject(DETAILS);
		const late = saveShop(manager, { ...DETAILS, version: 0 });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		await expect(getShop(engineer)).rejects.toMatchObject({ code: 'not_allowed' });
		expect(await AuditEntry.count({ where: { workshopId, action: 'shop.changed' } })).toBe(1);
	});

	it('hold the rule of the second factor, which nobody sets who has none', async () => {
		const { manager } = await makeCrew();
		await expect(saveFactorRule(manager, { requiresSecondFactor: true, version: 0 })).rejects.toMatchObject({
			code: 'conflict',
			message: 'Set up your own second factor before you ask others for theirs.'
		});
		expect(await getShop(manager)).toMatchObject({ requiresSecondFactor: false, version: 0 });
		await SecondFactor.create({ personId: manager.id, lockedKey: 'locked', confirmedAt: new Date() });
		const { version } = await saveFactorRule(manager, { requiresSecondFactor: true, version: 0 });
		expect(await saveFactorRule(manager, { requiresSecondFactor: false, version })).toMatchObject({
			requiresSecondFactor: false
		});
	});

	it('stand on what is printed, with the logo', async () => {
		const { manager } = await makeCrew();
		const { recommendation } = await makeRecommended(manager);
		await saveShop(manager, { ...DETAILS, version: 0 });
		const { version } = await saveLogo(manager, await picture(300, 90).png().toBuffer());
		const document = await getRecommendationDocument(manager, recommendation.id);
		expect(document.workshop).toMatchObject(DETAILS);
		expect(document.logo).toMatchObject({ widthPx: 300, heightPx: 90 });
		await removeLogo(manager, version);
		expect((await getRecommendationDocument(manager, recommendation.id)).logo).toBeNull();
	});
});

describe('a logo', () => {
	it('is made anew as a PNG of at most 600 × 200 px, without what was hidden in it', async () => {
		const { manager, workshopId } = await makeCrew();
		const sent = await picture(2400, 600)
			.withExif({ IFD0: { Copyright: 'Somebody' } })
			.jpeg()
			.toBuffer();
		expect(sent.includes('Somebody')).toBe(true);
		const { logo } = await saveLogo(manager, sent);
		expect(logo).toMatchObject({ widthPx: 600, heightPx: 150 });
		const row = await WorkshopLogo.findOne({ where: { workshopId } });
		expect((await sharp(row!.png).metadata()).format).toBe('png');
		expect(row!.png.includes('Somebody')).toBe(false);
	});

	it('comes along with the details or not at all', async () => {
		const { manager } = await makeCrew();
		const logo = await makeLogo(await picture(90, 30).png().toBuffer());
		expect(await saveShop(manager, { ...DETAILS, version: 0 }, logo)).toMatchObject({
			...DETAILS,
			...{ logo: { widthPx: 90, heightPx: 30 }, version: 2 }
		});
		const other = await makeLogo(await picture(60, 30).png().toBuffer());
		const late = saveShop(manager, { ...DETAILS, version: 0 }, other);
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		expect((await getShop(manager)).logo).toMatchObject({ widthPx: 90 });
	});

	it.each([
		[
			'an SVG',
			() => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><rect width="9" height="9"/></svg>')
		],
		['words', () => Buffer.from('not a picture at all')],
		['a GIF', () => picture(10, 10).gif().toBuffer()],
		['a PNG that breaks off', async () => (await picture(400, 400).png().toBuffer()).subarray(0, 200)],
		['a picture of too many pixels', () => picture(9000, 9000).png().toBuffer()]
	])('is not %s', async (_what, make) => {
		const { manager } = await makeCrew();
		const refused = saveLogo(manager, await make());
		await expect(refused).rejects.toMatchObject({ code: 'invalid_input', problems: [{ path: 'file' }] });
		expect((await getShop(manager)).logo).toBeNull();
	});

	it.each([
		[1, 1, '1 × 1 px'],
		[90, 23, '90 × 23 px'],
		[6000, 30, '600 × 3 px']
	])('of %i × %i px is too small, and told so', async (width, height, size) => {
		const { manager } = await makeCrew();
		await expect(saveLogo(manager, await picture(width, height).png().toBuffer())).rejects.toMatchObject({
			code: 'invalid_input',
			message: `The logo must be at least 24 px wide and 24 px high: this one would be ${size}.`
		});
		expect((await getShop(manager)).logo).toBeNull();
		expect(await makeLogo(await picture(24, 24).png().toBuffer())).toMatchObject({ heightPx: 24 });
	});

	it('goes along with letters as a picture of their own', async () => {
		const { manager, workshopId } = await makeCrew();
		const plain = await post(workshopId, 'before@travellers.example');
		expect(await listPictures(plain.htmlBody)).toEqual([]);
		await saveLogo(manager, await picture(120, 40).png().toBuffer());
		const letter = await post(workshopId, 'after@travellers.example', 'Hello.', '<body><p>Hello.</p></body>');
		const [logo] = await listPictures((await OutgoingMail.findByPk(letter.id))!.htmlBody);
		expect(letter.htmlBody).toContain(`src="cid:${logo!.cid}"`);
		expect((await sharp(logo!.content).metadata()).width).toBe(120);
	});
});

describe('the cautions of a shop', () => {
	const TEXT = { region: 'united-kingdom' as const, sentences: ['Ask for our wiring plan.'] };

	it('come beside ours and never in their place', async () => {
		const { manager, workshopId } = await makeCrew();
		const before = await listIssuedCautions(workshopId, 'Shop', 'lithium-iron-phosphate');
		await saveCautionText(manager, { ...TEXT, number: 0 });
		const after = await listIssuedCautions(workshopId, 'Shop', 'lithium-iron-phosphate');
		expect(after.slice(0, before.length)).toEqual(before);
		expect(after.slice(before.length).map(({ title }) => title)).toEqual([
			'Rules in the United Kingdom',
			'From Shop'
		]);
		const always = CAUTIONS.filter(({ when }) => when === 'always').map(({ title }) => title);
		expect(after.map(({ title }) => title)).toEqual(expect.arrayContaining(always));
	});

	it('change by versions, of which a recommendation keeps the one that it was issued with', async () => {
		const { manager } = await makeCrew();
		await saveCautionText(manager, { ...TEXT, number: 0 });
		const { recommendation } = await makeRecommended(manager);
		await saveCautionText(manager, { region: 'north-america', sentences: [], number: 1 });
		expect(await getCautionText(manager)).toMatchObject({ number: 2, region: 'north-america' });
		const row = await Recommendation.findByPk(recommendation.id);
		expect(row!.cautions!.at(-1)).toMatchObject({ text: 'Ask for our wiring plan.' });
		const { recommendation: shown } = await getRecommendationDocument(manager, recommendation.id);
		expect(shown.cautions!.map(({ title }) => title)).toContain('Rules in the United Kingdom');
	});

	it('are not changed from an old page, nor twice at once', async () => {
		const { manager } = await makeCrew();
		const both = await Promise.allSettled([1, 2].map(() => saveCautionText(manager, { ...TEXT, number: 0 })));
		expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
		const late = saveCautionText(manager, { ...TEXT, number: 0 });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
	});
});

describe('how long customers’ data are kept', () => {
	async function makeAged(workshopId: number, name: string, months: number): Promise<number> {
		const { id } = await Customer.create({ workshopId, name });
		const at = `${addMonths(today(), -months)} 12:00:00`;
		await connection().query('UPDATE customers SET updated_at = :at WHERE id = :id', {
			replacements: { at, id }
		});
		return id;
	}

	it('shows whom a rule would reach before it is kept, the oldest first', async () => {
		const { manager, workshopId } = await makeCrew();
		const [old, older] = [await makeAged(workshopId, 'Old', 30), await makeAged(workshopId, 'Older', 70)];
		await makeAged(workshopId, 'New', 20);
		expect((await getRetention(manager)).preview).toEqual({ years: null, total: 0, customers: [] });
		const { years, preview } = await getRetention(manager, 2);
		expect(years).toBeNull();
		expect(preview.customers.map(({ id }) => id)).toEqual([older, old]);
		expect((await getRetention(manager, 5)).preview.customers.map(({ id }) => id)).toEqual([older]);
	});

	it('counts from the last change of the jobs, not from the customer’s own', async () => {
		const { manager, workshopId } = await makeCrew();
		await makeRecommended(manager);
		const at = `${addMonths(today(), -60)} 12:00:00`;
		await connection().query('UPDATE customers SET updated_at = :at WHERE workshop_id = :workshopId', {
			replacements: { at, workshopId }
		});
		const reached = (await getRetention(manager, 2)).preview.customers;
		expect(reached.every(({ jobs }) => jobs === 0)).toBe(true);
	});

	it('is kept and recorded', async () => {
		const { manager, workshopId } = await makeCrew();
		expect(await saveRetention(manager, { years: 5, version: 0 })).toMatchObject({ years: 5, version: 1 });
		expect(await saveRetention(manager, { years: null, version: 1 })).toMatchObject({ years: null });
		expect(await AuditEntry.count({ where: { workshopId, action: 'shop.retention-changed' } })).toBe(2);
	});
});
