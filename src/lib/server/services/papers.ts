import type { MountPaper, Paper, PaperPhoto } from '$lib/schemas/papers';
import type { SignedInPerson } from '$lib/schemas/people';
import { Installation, Job, Person, Recommendation } from '../db/models';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { layHandover } from '../papers/handover';
import type { MountRecord } from '../papers/mount-record';
import { writePaper } from '../papers/paper-layout';
import { readRecommendation, type RecommendationPaper } from '../papers/recommendation';
import { layWarrantyFile } from '../papers/warranty';
import { writeRecommendation } from '../papers/write-recommendation';
import { listFieldNotes } from './field-notes';
import { listMountFiles, readFileContent } from './files';
import { getFitting } from './fittings';
import { getOutlookReport } from './outlook-reports';
import { getPreDrill } from './pre-drill';
import { getRecommendationDocument } from './recommendations';
import { listSheets } from './sheets';

/** Everything that the paper of a recommendation says. */
export async function getRecommendationPaper(
	person: SignedInPerson,
	recommendationId: number
): Promise<RecommendationPaper> {
	const document = await getRecommendationDocument(person, recommendationId);
	// Without the other mounts, whose years may be worked out later: a reprint says what the first print said.
	return readRecommendation(document, await getOutlookReport(person, document.assessment, []));
}

/** The recommendation as a PDF document. */
export async function writeRecommendationPdf(
	person: SignedInPerson,
	recommendationId: number
): Promise<Buffer> {
	return writeRecommendation(await getRecommendationPaper(person, recommendationId));
}

/** Who of the customer's side has read and acknowledged a recommendation, if anybody. */
async function findAcknowledgement(person: SignedInPerson, { id, jobId }: Recommendation) {
	const sheets = await listSheets(person, jobId);
	const read = sheets.find((sheet) => sheet.recommendationId === id && sheet.acknowledgedAt !== null);
	return read ? { name: read.acknowledgedBy ?? '', acknowledgedAt: read.acknowledgedAt! } : null;
}

/** The photos of a mount, its picture first. */
async function listPhotos(person: SignedInPerson, mountId: number): Promise<PaperPhoto[]> {
	const files = await listMountFiles(person, mountId);
	return files
		.filter(({ kind }) => kind === 'photo')
		.sort((a, b) => Number(b.isMountPicture) - Number(a.isMountPicture) || a.id - b.id)
		.map(({ id, caption }) => ({ fileId: id, caption }));
}

/** What is kept of a fitted battery, from its recommendation to the last note. */
async function readMountRecord(person: SignedInPerson, mountId: number): Promise<MountRecord> {
	const { installation, assessmentId, ...fitting } = await getFitting(person, mountId);
	if (!installation)
		throw new AppError('conflict', 'This mount has not been fitted yet: say first what was.');
	const recommendation = await Recommendation.findOne({
		where: { assessmentId, workshopId: person.workshopId },
		order: [['id', 'DESC']]
	});
	if (!recommendation) throw new AppError('conflict', 'Nothing is agreed for this mount yet.');
	return {
		paper: await getRecommendationPaper(person, recommendation.id),
		fitting: { ...fitting, assessmentId, installation },
		preDrill: await getPreDrill(person, mountId),
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
	return writePaper(paper, async (fileId) => (await readFileContent(person, fileId)).bytes);
}

/** The handover of a customer's own battery, read as the one of the shop reads it who noted the fitting. */
export async function writeMyHandover(person: SignedInPerson, mountId: number): Promise<Buffer> {
	const { workshopId, workshopName, customerId } = allow(person, 'documents.read-own');
	const installation = await Installation.findOne({ where: { mountId, workshopId } });
	const where = { id: installation?.jobId ?? 0, workshopId, customerId: customerId! };
	if (!installation || (await Job.count({ where })) === 0) throw notFound('handover');
	const { id, name, email, role } = (await Person.findByPk(installation.createdBy))!;
	const reader = { id, workshopId, workshopName, customerId: null, name, email, role };
	return writeMountPaper(reader, mountId, 'handover');
}
