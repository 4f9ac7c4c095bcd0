import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { readPdf } from '../../../../tests/support/documents';
import { FITTED, makeFitted } from '../../../../tests/support/fitted';
import { AGM_BATTERY } from '../../../../tests/support/records';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { listCautions } from '$lib/format/cautions';
import { asIncoming, telephonePhoto } from '../../../../tests/support/pictures';
import { Job, Mount } from '../db/models';
import { assessJob } from './assessments';
import { createBattery } from './batteries';
import { updateCustomer } from './customers';
import { addFieldNote } from './field-notes';
import { addFile, changeFile } from './files';
import { saveFitting } from './fittings';
import { getJob } from './jobs';
import { writeMountPaper, writeRecommendationPdf } from './papers';
import { makeRecommendation } from './recommendations';

useTestDatabase();

const LONG_MS = 90_000;
const INSPECTION = {
	kind: 'inspection',
	notedOn: '2026-03-01',
	words: 'A strap was loose; tightened.'
} as const;
const CAPACITY = {
	...({ kind: 'capacity-test', notedOn: '2026-03-02', capacityAh: 96 } as const),
	...{ currentA: 5, cutOffV: 10.8, tempC: 25 }
};
/** As it stands on paper: lines break where the column ends. */
const inOneLine = (text: string): string => text.replace(/\s+/g, ' ');

describe('a recommendation as a document', () => {
	it(
		'says on two pages what was recommended, with picture and cautions, in our typeface, and the same each time',
		{ timeout: LONG_MS },
		async () => {
			const { installer } = await makeCrew();
			const { installer: neighbour } = await makeCrew();
			const { jobId } = await makeAssessableJob(installer);
			const [, ofCool] = await assessJob(installer, jobId);
			const { id, jobNumber } = await makeRecommendation(installer, { assessmentId: ofCool!.id });
			const pdf = await writeRecommendationPdf(installer, id);
			const { pages, text, fonts, inkShares } = await readPdf(pdf);
			expect(pages).toBe(2);
			expect(text).toContain('Rides it out');
			expect(text).toContain(`Recommendation 1, job ${jobNumber}`);
			expect(text).toContain('goes dark at 75 °C');
			for (const { title } of listCautions('lithium-iron-phosphate')) expect(text).toContain(`${title}.`);
			expect(new Set(fonts)).toEqual(new Set(['RobotoFlex-Regular']));
			for (const share of inkShares) expect(share).toBeGreaterThan(0.01);
			expect((await writeRecommendationPdf(installer, id)).equals(pdf)).toBe(true);
			await expect(writeRecommendationPdf(neighbour, id)).rejects.toMatchObject({ code: 'not_found' });
		}
	);

	it(
		'of many legs and a long reason still holds on two pages, with every word of the reason',
		{ timeout: LONG_MS },
		async () => {
			const { installer } = await makeCrew();
			const { jobId } = await makeAssessableJob(installer);
			const [ofHot] = await assessJob(installer, jobId);
			const reason = Array.from({ length: 140 }, (_, index) => `word${index}`)
				.join(' ')
				.slice(0, 1_000);
			const why = { decidedBy: 'Ilse Tarn', reason };
			const { id } = await makeRecommendation(installer, { assessmentId: ofHot!.id, ...why });
			const { pages, text } = await readPdf(await writeRecommendationPdf(installer, id));
			expect(pages).toBe(2);
			expect(text).toContain('Decided by Ilse Tarn');
			for (const word of reason.split(' ')) expect(text).toContain(word);
		}
	);

	it(
		'shows after its two pages what was photographed before it was issued, and nothing of later',
		{ timeout: LONG_MS },
		async () => {
			const { installer } = await makeCrew();
			const { jobId } = await makeAssessableJob(installer);
			const [, ofCool] = await assessJob(installer, jobId);
			const { mountId } = ofCool!;
			const add = async (change: { caption: string; isMountPicture?: boolean }, place = {}) => {
				const { id, version } = await asIncoming('a.jpg', await telephonePhoto(), (file) =>
					addFile(installer, mountId, file, place)
				);
				return changeFile(installer, id, { version, ...change });
			};
			await add({ caption: 'Beside the guard' }, { questionKey: 'fuse' });
			await add({ caption: 'From the left', isMountPicture: true });
			const { id } = await makeRecommendation(installer, { assessmentId: ofCool!.id });
			await add({ caption: 'Long after' });
			const { pages, text, inkShares } = await readPdf(await writeRecommendationPdf(installer, id));
			expect(pages).toBe(3);
			expect(inkShares[2]).toBeGreaterThan(0.05);
			const told = inOneLine(text);
			expect(told).toContain('The mount: From the left');
			expect(told).toContain('Before drilling, fuse: Beside the guard');
			expect(told).not.toContain('Long after');
		}
	);

	async function readPaperFor(name: string) {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		const { customer } = await getJob(installer, jobId);
		const { phone, email, version } = customer;
		await updateCustomer(installer, customer.id, { name, phone, email, version });
		const [, ofCool] = await assessJob(installer, jobId);
		const { id } = await makeRecommendation(installer, { assessmentId: ofCool!.id });
		const { pages, text } = await readPdf(await writeRecommendationPdf(installer, id));
		return { pages, text: inOneLine(text).normalize('NFC') };
	}
	const LACKS = 'stands for a letter that this paper’s typeface does not have';

	it('spells names in the letters of their own script', { timeout: LONG_MS }, async () => {
		const name = 'Łucja Παπαδάκη Дмитрий Nguyễn';
		const { text } = await readPaperFor(name);
		expect(text).toContain(name);
		expect(text).not.toContain(LACKS);
	});

	it('shows where its typeface lacks a letter, and says so on each page', { timeout: LONG_MS }, async () => {
		const { pages, text } = await readPaperFor('Ilse 漢字');
		expect(pages).toBe(2);
		expect(text).toContain('Ilse ??');
		expect(text.split(LACKS)).toHaveLength(3);
	});
});

describe('the papers of a fitted mount', () => {
	async function makeNoted() {
		const { installer } = await makeCrew();
		const { installer: neighbour } = await makeCrew();
		const made = await makeFitted(installer);
		const differences = [{ key: 'fuse' as const, fitted: '80 A, bolted' }];
		await saveFitting(installer, made.mountId, { ...FITTED, differences, version: 0 });
		await addFieldNote(installer, made.mountId, INSPECTION);
		await addFieldNote(installer, made.mountId, CAPACITY);
		return { installer, neighbour, mountId: made.mountId };
	}

	it(
		'hand over what was fitted, what to expect and what to do in the dark',
		{ timeout: LONG_MS },
		async () => {
			const { installer, neighbour, mountId } = await makeNoted();
			const { text, inkShares } = await readPdf(await writeMountPaper(installer, mountId, 'handover'));
			const told = inOneLine(text);
			for (const words of [
				...['Handover', '80 A, bolted', 'One thing is not as agreed.', 'X-1', '31 January 2026, by Ida Fenn'],
				...['When it goes dark', 'Never bridge its protection', '28 February 2026', 'Received by']
			]) {
				expect(told).toContain(words);
			}
			for (const share of inkShares) expect(share).toBeGreaterThan(0.005);
			await expect(writeMountPaper(neighbour, mountId, 'handover')).rejects.toMatchObject({
				code: 'not_found'
			});
		}
	);

	it(
		'ask before drilling what the fitted battery asked, whatever the job has by now',
		{ timeout: LONG_MS },
		async () => {
			const { installer, mountId } = await makeNoted();
			const before = inOneLine(
				(await readPdf(await writeMountPaper(installer, mountId, 'warranty-file'))).text
			);
			const { id } = await createBattery(installer, AGM_BATTERY);
			const { jobId } = (await Mount.findByPk(mountId))!;
			await Job.update({ batteryRecordId: id }, { where: { id: jobId } });
			const after = inOneLine(
				(await readPdf(await writeMountPaper(installer, mountId, 'warranty-file'))).text
			);
			expect(after).toBe(before);
		}
	);

	it('keep for the maker everything that was said, measured and done', { timeout: LONG_MS }, async () => {
		const { installer, mountId } = await makeNoted();
		const { text } = await readPdf(await writeMountPaper(installer, mountId, 'warranty-file'));
		const told = inOneLine(text);
		for (const words of [
			...['Warranty file', 'decided by Ilse Tarn', 'A strap was loose; tightened.', '96 Ah at 5 A'],
			...['Where its capacity goes', 'not by the customer', 'Checked before drilling', 'Hash of the inputs']
		]) {
			expect(told).toContain(words);
		}
	});

	it('are not written before anything was fitted', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		await expect(writeMountPaper(installer, hot.id, 'handover')).rejects.toMatchObject({ code: 'conflict' });
	});
});
