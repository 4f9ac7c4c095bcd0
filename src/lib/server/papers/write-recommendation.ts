import type { TDocumentDefinitions } from 'pdfmake/interfaces';
import { makePdf, type PaperMeta } from './make-pdf';
import { layOutRecommendation, FIRST_PAGE_END, type PageScales } from './recommendation-layout';
import type { RecommendationPaper } from './recommendation';

/** From the usual size down to what can still be read at arm's length. */
const SCALES = [1, 0.95, 0.9, 0.85, 0.8, 0.76, 0.72];

interface Layout {
	pdf: Buffer;
	/** On which page the first one ended. */
	firstEnd: number;
	pages: number;
}

async function tryScales(paper: RecommendationPaper, scales: PageScales, meta: PaperMeta): Promise<Layout> {
	let firstEnd = 0;
	let pages = 0;
	const definition: TDocumentDefinitions = {
		...layOutRecommendation(paper, scales),
		pageBreakBefore: ({ id, pageNumbers, pages: all }) => {
			if (id === FIRST_PAGE_END) firstEnd = pageNumbers[0]!;
			pages = all;
			return false;
		}
	};
	return { pdf: await makePdf(definition, meta), firstEnd, pages };
}

const smaller = (scale: number): number => SCALES[SCALES.indexOf(scale) + 1] ?? scale;

/** The recommendation as a document of two pages: what has much to say is set smaller, each page for itself. */
export async function writeRecommendation(paper: RecommendationPaper): Promise<Buffer> {
	const { id, jobNumber, createdAt } = paper.recommendation;
	const meta = {
		title: `Recommendation ${id}, job ${jobNumber}`,
		...{ author: paper.workshop.name, madeAt: new Date(createdAt) }
	};
	let scales: PageScales = { first: 1, second: 1 };
	for (;;) {
		const { pdf, firstEnd, pages } = await tryScales(paper, scales, meta);
		const next = {
			first: firstEnd > 1 ? smaller(scales.first) : scales.first,
			second: pages > firstEnd + 1 ? smaller(scales.second) : scales.second
		};
		if (next.first === scales.first && next.second === scales.second) return pdf;
		scales = next;
	}
}
