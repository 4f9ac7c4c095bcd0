import { isDeepStrictEqual } from 'node:util';
import {
	answerTo,
	findOpenItems,
	listAsked,
	type PreDrillSnapshot,
	type PreDrillView
} from '$lib/schemas/pre-drill';
import type { PreDrillQuestion } from '$lib/schemas/pre-drill-questions';
import type { PreDrillCheck } from '../db/models';

interface Signature {
	by: string;
	at: string;
	/** Whether the same is asked now as was then: nobody signed what they were not asked. */
	counts: boolean;
}

function findSignature(
	questions: readonly PreDrillQuestion[],
	check: PreDrillCheck | null
): Signature | null {
	const { signedBy, signedAt, signedFor } = check ?? {};
	if (!signedBy || !signedAt) return null;
	const counts = !signedFor || isDeepStrictEqual(signedFor, listAsked(questions));
	return { by: signedBy, at: signedAt.toISOString(), counts };
}

export function presentSnapshot(
	questions: readonly PreDrillQuestion[],
	check: PreDrillCheck | null
): PreDrillSnapshot {
	const signature = findSignature(questions, check);
	return {
		open: findOpenItems(questions, check?.answers ?? {}),
		signedBy: signature?.counts ? signature.by : null,
		signedAt: signature?.counts ? signature.at : null
	};
}

export function presentPreDrill(
	mountId: number,
	questions: readonly PreDrillQuestion[],
	check: PreDrillCheck | null
): PreDrillView {
	const signature = findSignature(questions, check);
	return {
		mountId,
		questions: questions.map((question) => {
			const given = answerTo(question, check?.answers ?? {});
			return { ...question, answer: given?.answer ?? null, note: given?.note ?? '' };
		}),
		...presentSnapshot(questions, check),
		signedBefore: signature && !signature.counts ? { by: signature.by, at: signature.at } : null,
		version: check?.version ?? 0
	};
}
