import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces';
import { makePdf, type PaperMeta } from './make-pdf';
import { layPhotos, type ReadPhoto } from './paper-layout';
import { layOutRecommendation, FIRST_PAGE_END, PHOTOS_START, type PageScales } from './recommendation-layout';
import type { RecommendationPaper } from './recommendation';

/** From the usual size down to what can still be read at arm's length. */
const SCALES = [1, 0.95, 0.9, 0.85, 0.8, 0.76, 0.72];

interface Layout {
	pdf: Buffer;
	/** On which page the first one ended. */
	firstEnd: number;
	/** And the second: the last before the photos. */
	secondEnd: number;
}

interface Given {
	paper: RecommendationPaper;
	photos: Content | null;
	meta: PaperMeta;
}

async function tryScales({ paper, photos, meta }: Given, scales: PageScales): Promise<Layout> {
	const pageOf = new Map<string, number>();
	let pages = 0;
	const definition: TDocumentDefinitions = {
		...layOutRecommendation(paper, scales, photos),
		pageBreakBefore: ({ id, pageNumbers, pages: all }) => {
			if (id !== undefined) pageOf.set(id, pageNumbers[0]!);
			pages = all;
			return false;
		}
	};
	const pdf = await makePdf(definition, meta);
	const photosStart = pageOf.get(PHOTOS_START) ?? pages + 1;
	return { pdf, firstEnd: pageOf.get(FIRST_PAGE_END)!, secondEnd: photosStart - 1 };
}

const smaller = (scale: number): number => SCALES[SCALES.indexOf(scale) + 1] ?? scale;

/**
 * The recommendation as a document of two pages, and more for photos: what has much to say is set smaller, each page
 * for itself.
 */
export async function writeRecommendation(paper: RecommendationPaper, readPhoto: ReadPhoto): Promise<Buffer> {
	const { number, jobNumber, createdAt } = paper.recommendation;
	const meta = {
		title: `Recommendation ${number}, job ${jobNumber}`,
		...{ author: paper.workshop.name, madeAt: new Date(createdAt) }
	};
	const photos = paper.photos.length > 0 ? await layPhotos(paper.photos, readPhoto) : null;
	let scales: PageScales = { first: 1, second: 1 };
	for (;;) {
		const { pdf, firstEnd, secondEnd } = await tryScales({ paper, photos, meta }, scales);
		const next = {
			first: firstEnd > 1 ? smaller(scales.first) : scales.first,
			second: secondEnd > firstEnd + 1 ? smaller(scales.second) : scales.second
		};
		if (next.first === scales.first && next.second === scales.second) return pdf;
		scales = next;
	}
}
