/** Something that a customer can open about their vehicle. */
export interface CustomerDocument {
	/** Whose history it belongs to. */
	jobId: number;
	title: string;
	/** What it is about, in a few words. */
	about: string;
	at: string;
	href: string;
	/** The paper that is written when it is opened; a page is none. */
	paper?: CustomerPaper;
}

export interface CustomerPaper {
	kind: 'handover' | 'recommendation';
	id: number;
}

export const customerPaperPath = ({ kind, id }: CustomerPaper): string => `/my/${kind}/${id}.pdf`;

/** One thing that happened to a customer's battery, in plain words. */
export interface HistoryEntry {
	jobId: number;
	at: string;
	/** Known to the day alone. */
	isDay: boolean;
	title: string;
	words: string;
}

/** What a reading in the field changed about an estimate. */
export interface FieldLesson {
	jobId: number;
	mountId: number;
	on: string;
	/** What was read. */
	read: string;
	/** What follows from it. */
	sentence: string;
	/** Null where the reading changed nothing. */
	figures: { label: string; before: string; after: string }[] | null;
}

/** One vehicle of a customer with all that is known of its batteries. */
export interface MyVehicle {
	id: number;
	name: string;
	registration: string;
	documents: CustomerDocument[];
	lessons: FieldLesson[];
	/** Newest first. */
	history: HistoryEntry[];
	/** The next looks at the battery, soonest first. */
	due: string[];
}
