import { z } from 'zod';
import type { Verdict } from './verdicts';
import { email, idSchema, words } from './fields';

/** The customer's page, word for word as it was sent; its hash is what an acknowledgement is tied to. */
export interface SheetContent {
	workshop: { name: string; address: string; phone: string; email: string };
	jobNumber: number;
	customerName: string;
	vehicle: string;
	battery: string;
	mountName: string;
	placeName: string;
	verdict: Verdict;
	headline: string;
	paragraphs: string[];
	figures: { label: string; value: string }[];
	/** Said when the shop goes ahead against the verdict. */
	override: { decidedBy: string; reason: string } | null;
	cautions: string[];
	preparedOn: string;
	assessmentId: number;
}

export const sendSheetSchema = z.object({ recommendationId: idSchema, sendTo: email('Send to') });

export const acknowledgeSchema = z.object({
	name: words('Your name', 120),
	understood: z
		.literal(true, { error: 'Tick the box to say that you have read the sheet.' })
		.meta({ label: 'I have read this' }),
	contentSha256: z.string().regex(/^[0-9a-f]{64}$/)
});

export const sheetStatusSchema = z.object({
	id: z.number().int(),
	sentTo: z.string(),
	createdAt: z.iso.datetime(),
	mail: z.enum(['waiting', 'sent', 'failed']),
	firstOpenedAt: z.iso.datetime().nullable(),
	withdrawnAt: z.iso.datetime().nullable(),
	acknowledgedAt: z.iso.datetime().nullable(),
	acknowledgedBy: z.string().nullable()
});
export type SheetStatus = z.infer<typeof sheetStatusSchema>;
