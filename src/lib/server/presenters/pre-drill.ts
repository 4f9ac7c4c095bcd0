import { answerTo, findOpenItems, type PreDrillSnapshot, type PreDrillView } from '$lib/schemas/pre-drill';
import type { PreDrillQuestion } from '$lib/schemas/pre-drill-questions';
import type { PreDrillCheck } from '../db/models';

export function presentSnapshot(
	questions: readonly PreDrillQuestion[],
	check: PreDrillCheck | null
): PreDrillSnapshot {
	return {
		open: findOpenItems(questions, check?.answers ?? {}),
		signedBy: check?.signedBy ?? null,
		signedAt: check?.signedAt?.toISOString() ?? null
	};
}

export function presentPreDrill(
	mountId: number,
	questions: readonly PreDrillQuestion[],
	check: PreDrillCheck | null
): PreDrillView {
	return {
		mountId,
		questions: questions.map((question) => {
			const given = answerTo(question, check?.answers ?? {});
			return { ...question, answer: given?.answer ?? null, note: given?.note ?? '' };
		}),
		...presentSnapshot(questions, check),
		version: check?.version ?? 0
	};
}
