import type { CautionLine } from './caution-texts';
import type { ReportLine } from './reports';
import type { LogoView, WorkshopHead } from './shop';

/** One part of a paper: the same in print and as a document. */
export type PaperBlock =
	| { kind: 'words'; title?: string; sentences: string[]; strong?: string }
	| { kind: 'lines'; title: string; lines: ReportLine[] }
	| { kind: 'figures'; title: string; lines: ReportLine[] }
	| { kind: 'table'; title: string; heads: string[]; rows: string[][]; empty: string }
	| { kind: 'picture'; title: string; svg: string; caption: string }
	| { kind: 'photos'; title: string; photos: PaperPhoto[] }
	| { kind: 'cautions'; cautions: CautionLine[] }
	| { kind: 'signatures'; who: string[] };

/** A photo by the number of its file. */
export interface PaperPhoto {
	fileId: number;
	caption: string;
}

/** A paper of several pages about one mount, in the order in which one reads it. */
export interface Paper {
	title: string;
	under: string;
	shop: WorkshopHead;
	logo: LogoView | null;
	/** When what it says was last changed, as an ISO date and time. */
	madeAt: string;
	blocks: PaperBlock[];
}

/** The papers about a fitted mount, by their name in an address. */
export type MountPaper = 'handover' | 'warranty-file';
