import type { CustomerDocument } from '$lib/schemas/my';
import { Installation, Sheet } from '../db/models';
import {
	presentHandoverDocument,
	presentRecommendationDocuments,
	presentSheetDocument
} from '../presenters/my-history';

/**
 * Everything that a customer can open about these jobs of theirs, the newest first. This is the one place to add to:
 * another kind of document is one more list here.
 */
export async function listCustomerDocuments(jobIds: readonly number[]): Promise<CustomerDocument[]> {
	const sheets = await Sheet.findAll({ where: { jobId: [...jobIds], withdrawnAt: null } });
	const installations = await Installation.findAll({ where: { jobId: [...jobIds] } });
	const documents = [
		...sheets.map(presentSheetDocument),
		...presentRecommendationDocuments(sheets),
		...installations.map(presentHandoverDocument)
	];
	return documents.sort((a, b) => b.at.localeCompare(a.at));
}
