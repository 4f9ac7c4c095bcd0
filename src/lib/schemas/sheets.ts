import { z } from 'zod';
import type { DayLimits } from '../format/heat-limits';
import type { AssessmentResult } from './assessments';
import type { PositionKind } from './survey';
import { email, idSchema, versionSchema, words } from './fields';
import type { FieldLesson } from './my';
import type { Question } from './questions';
import { VERDICTS, type Verdict } from './verdicts';
import type { LogoView, WorkshopHead } from './shop';

/** What the picture is drawn from: kept with the words, so that the page never changes. */
export interface SheetRibbon extends Pick<
	AssessmentResult,
	'curves' | 'legs' | 'darkSpans' | 'chargeSpans' | 'peakCellsC' | 'peakAtHour'
> {
	position: PositionKind;
	limits: DayLimits;
}

/** Fifty equally likely days, each by how hot it gets, with the words and numbers of their picture. */
export interface SheetDots {
	daysC: number[];
	limitC: number;
	/** What happens at the limit. */
	limitWords: string;
	sentence: string;
	figures: { label: string; value: string }[];
}

/** The customer's page, word for word as it was sent; its hash is what an acknowledgement is tied to. */
export interface SheetContent {
	workshop: WorkshopHead;
	preparedBy: string;
	preparedOn: string;
	jobNumber: number;
	customerName: string;
	vehicle: string;
	battery: string;
	/** Of that battery; pages from before there were several have none. */
	chemistry?: string;
	mountName: string;
	placeName: string;
	verdict: Verdict;
	headline: string;
	/** What happens, in one or two sentences. */
	summary: string;
	/** Which day that is, and why it is so. */
	paragraphs: string[];
	/** What the shop would do. */
	advice: string;
	/** Said when the shop goes ahead against the verdict or the maker's word. */
	override: { decidedBy: string; reason: string } | null;
	/** What the check before drilling left open; pages from before that was told have none. */
	beforeDrilling?: string[];
	/** The other positions that were worked out for this job. */
	alternatives: { mountName: string; verdict: Verdict; chemistry?: string }[];
	figures: { label: string; value: string }[];
	/** How often, what would help, how long it lasts; pages from before it was worked out have none. */
	outlook?: { label: string; text: string }[];
	/** Fifty equally likely days against the limit; pages from before it was drawn have none. */
	dots?: SheetDots;
	ribbon: SheetRibbon;
	cautions: { title: string; text: string }[];
	assessmentId: number;
}

export const sendSheetSchema = z.object({ recommendationId: idSchema, sendTo: email('Send to') });
export type SendSheet = z.infer<typeof sendSheetSchema>;

/** The form of the page knows the newest sheet that it was opened beside: its number, or 0 for none. */
export const sendSheetFormSchema = sendSheetSchema.extend({ version: versionSchema });

export const acknowledgeSchema = z.object({
	name: words('Your name', 120),
	understood: z
		.literal(true, { error: 'Tick the box to say that you have read the sheet.' })
		.meta({ label: 'I have read this' }),
	contentSha256: z.string().regex(/^[0-9a-f]{64}$/, { error: 'Open the sheet again, then acknowledge it.' })
});
export type Acknowledge = z.infer<typeof acknowledgeSchema>;

/** Of a battery as it was then: it tells how its verdict is worded. */
const chemistryName = z.string().meta({ description: 'Chemistry of the battery' });

/** unsure: handed to a mail server that did not answer, so that it may have arrived. */
export const MAIL_STATES = ['waiting', 'sent', 'failed', 'unsure'] as const;
export type MailState = (typeof MAIL_STATES)[number];

export const sheetStatusSchema = z.object({
	id: z.number().int(),
	recommendationId: z.number().int(),
	mountName: z.string(),
	verdict: z.enum(VERDICTS),
	chemistry: chemistryName,
	sentTo: z.string(),
	sentBy: z.string(),
	createdAt: z.iso.datetime(),
	mail: z.enum(MAIL_STATES),
	mailAttempts: z.number().int(),
	mailError: z
		.string()
		.meta({ description: 'Why the letter did not go out at the last try; empty when it did' }),
	mailSentAt: z.iso.datetime().nullable(),
	linkFirstOpenedAt: z.iso.datetime().nullable().meta({
		description: 'A mail scanner may open a link before its reader does'
	}),
	withdrawnAt: z.iso.datetime().nullable(),
	acknowledgedAt: z.iso.datetime().nullable(),
	acknowledgedBy: z.string().nullable()
});
export type SheetStatus = z.infer<typeof sheetStatusSchema>;

/** Who acknowledged, and when. */
export interface AcknowledgementView {
	name: string;
	acknowledgedAt: string;
}

/** What the customer's page shows. */
export interface SheetView {
	content: SheetContent;
	contentSha256: string;
	textVersion: string;
	/** Of the shop, as it was when the page was sent. */
	logo: LogoView | null;
	/** When the shop sent this customer a later page for the same job. */
	newerSentAt: string | null;
	acknowledgement: AcknowledgementView | null;
	/** Of the whole job, with what the shop answered. */
	questions: Question[];
	/** What readings in the field taught about the fitted battery since. */
	lessons: FieldLesson[];
}

/** One line of a customer's own list. */
export interface MySheet {
	id: number;
	workshopName: string;
	vehicle: string;
	mountName: string;
	verdict: Verdict;
	chemistry: string;
	sentAt: string;
	acknowledgedAt: string | null;
}
