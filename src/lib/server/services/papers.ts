import type { MountPaper, Paper, PaperPhoto } from '$lib/schemas/papers';
import type { SignedInPerson } from '$lib/schemas/people';
import type { PreDrillCase } from '$lib/schemas/pre-drill-questions';
import { Assessment, Installation, Job, Mount, Person, Recommendation, Sheet } from '../db/models';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { layHandover } from '../papers/handover';
import type { MountRecord } from '../papers/mount-record';
import { writePaper, type ReadPhoto } from '../papers/paper-layout';
import { readRecommendation, type RecommendationPaper } from '../papers/recommendation';
import { layWarrantyFile } from '../papers/warranty';
import { writeRecommendation } from '../papers/write-recommendation';
import { presentPaperPhoto } from '../presenters/files';
import { listFieldNotes } from './field-notes';
import { listMountFiles, readFileContent } from './files';
import { getFitting } from './fittings';
import { getOutlookReport } from './outlook-reports';
import { caseOf, getPreDrillOf } from './pre-drill';
import { findFittedUnder } from './recommendation-history';
import { getRecommendationDocument } from './recommendations';
import { listSheets } from './sheets';

/** Everything that the paper of a recommendation says. */
export async function getRecommendationPaper(
	person: SignedInPerson,
	recommendationId: number
): Promise<RecommendationPaper> {
	const document = await getRecommendationDocument(person, recommendationId);
	const { recommendation, assessment } = document;
	const photos = await listPhotos(person, assessment.mountId, recommendation.createdAt);
	// Without the other mounts, whose years may be worked out later: a reprint says what the first print said.
	return readRecommendation(document, await getOutlookReport(person, assessment, []), photos);
}

const readPhotoAs =
	(person: SignedInPerson): ReadPhoto =>
	async (fileId) =>
		(await readFileContent(person, fileId)).bytes;

/** The recommendation as a PDF document. */
export async function writeRecommendationPdf(
	person: SignedInPerson,
	recommendationId: number
): Promise<Buffer> {
	return writeRecommendation(await getRecommendationPaper(person, recommendationId), readPhotoAs(person));
}

/** Who of the customer's side has read and acknowledged a recommendation, if anybody. */
async function findAcknowledgement(person: SignedInPerson, { id, jobId }: Recommendation) {
	const sheets = await listSheets(person, jobId);
	const read = sheets.find((sheet) => sheet.recommendationId === id && sheet.acknowledgedAt !== null);
	return read ? { name: read.acknowledgedBy ?? '', acknowledgedAt: read.acknowledgedAt! } : null;
}

/** The photos of a mount that stands, its picture first; those that were there at a time, where one is given. */
async function listPhotos(person: SignedInPerson, mountId: number, until?: string): Promise<PaperPhoto[]> {
	const where = { id: mountId, workshopId: person.workshopId, removedAt: null };
	if ((await Mount.count({ where })) === 0) return [];
	const files = await listMountFiles(person, mountId);
	return files
		.filter(({ kind, uploadedAt }) => kind === 'photo' && (until === undefined || uploadedAt <= until))
		.sort((a, b) => Number(b.isMountPicture) - Number(a.isMountPicture) || a.id - b.id)
		.map(presentPaperPhoto);
}

/** What the questions before drilling depended on for what was fitted. */
async function fittedCaseOf(assessmentId: number): Promise<PreDrillCase> {
	const { battery, mount } = (await Assessment.findByPk(assessmentId))!.inputs;
	return caseOf(battery, mount.survey);
}

/** What is kept of a fitted battery, from its recommendation to the last note. */
async function readMountRecord(person: SignedInPerson, mountId: number): Promise<MountRecord> {
	const { installation, assessmentId, ...fitting } = await getFitting(person, mountId);
	const kept = await Installation.findOne({ where: { mountId, workshopId: person.workshopId } });
	if (!installation || !kept)
		throw new AppError('conflict', 'This mount has not been fitted yet: say first what was.');
	const recommendation = await findFittedUnder(kept);
	if (!recommendation) throw new AppError('conflict', 'Nothing is agreed for this mount yet.');
	return {
		paper: await getRecommendationPaper(person, recommendation.id),
		fitting: { ...fitting, assessmentId, installation },
		preDrill: await getPreDrillOf(person, mountId, await fittedCaseOf(assessmentId)),
		notes: await listFieldNotes(person, mountId),
		acknowledgement: await findAcknowledgement(person, recommendation),
		photos: await listPhotos(person, mountId)
	};
}

/** The papers about a fitted mount, by their name in an address. */
const MOUNT_PAPERS: Readonly<Record<MountPaper, (record: MountRecord) => Paper>> = {
	handover: layHandover,
	'warranty-file': layWarrantyFile
};

/** A paper about a fitted mount. */
export async function getMountPaper(
	person: SignedInPerson,
	mountId: number,
	name: MountPaper
): Promise<Paper> {
	return MOUNT_PAPERS[name](await readMountRecord(person, mountId));
}

/** The same as a PDF document. */
export async function writeMountPaper(
	person: SignedInPerson,
	mountId: number,
	name: MountPaper
): Promise<Buffer> {
	const paper = await getMountPaper(person, mountId, name);
	return writePaper(paper, readPhotoAs(person));
}

/** As whoever of the shop made a paper, for its customer: they see what the shop saw, and no more. */
async function readAsMaker(personId: number, reader: SignedInPerson): Promise<SignedInPerson> {
	const { workshopId, workshopName } = reader;
	const { id, name, email, role } = (await Person.findByPk(personId))!;
	return { id, workshopId, workshopName, customerId: null, name, email, role };
}

async function isOwnJob({ workshopId, customerId }: SignedInPerson, jobId: number): Promise<boolean> {
	return (await Job.count({ where: { id: jobId, workshopId, customerId: customerId! } })) > 0;
}

/** The handover of a customer's own battery, read as the one of the shop reads it who noted the fitting. */
export async function writeMyHandover(person: SignedInPerson, mountId: number): Promise<Buffer> {
	const { workshopId } = allow(person, 'documents.read-own');
	const installation = await Installation.findOne({ where: { mountId, workshopId } });
	if (!installation || !(await isOwnJob(person, installation.jobId))) throw notFound('handover');
	return writeMountPaper(await readAsMaker(installation.createdBy, person), mountId, 'handover');
}

/** A recommendation that the customer was sent the page of, read as the one of the shop reads it who made it. */
export async function writeMyRecommendation(
	person: SignedInPerson,
	recommendationId: number
): Promise<Buffer> {
	const { workshopId } = allow(person, 'documents.read-own');
	const where = { recommendationId, workshopId, withdrawnAt: null };
	const sheet = await Sheet.findOne({ where, attributes: ['jobId'] });
	if (!sheet || !(await isOwnJob(person, sheet.jobId))) throw notFound('recommendation');
	const { createdBy } = (await Recommendation.findByPk(recommendationId))!;
	return writeRecommendationPdf(await readAsMaker(createdBy, person), recommendationId);
}
