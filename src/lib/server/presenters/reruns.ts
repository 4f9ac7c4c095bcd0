import type { RerunItemState, RerunProgress, RerunView } from '$lib/schemas/reruns';
import type { CoefficientBook, Rerun } from '../db/models';

/** So many items of one re-run in one state, by whether their verdict changed, and how many of them somebody was told of. */
export interface ItemCount {
	state: RerunItemState;
	verdictChanged: number | boolean;
	count: number | string;
	told: number | string;
}

export function presentProgress({ state }: Rerun, counts: readonly ItemCount[]): RerunProgress {
	const sum = (of: (count: ItemCount) => boolean, what: 'count' | 'told' = 'count'): number =>
		counts.filter(of).reduce((total, each) => total + Number(each[what]), 0);
	const changed = sum(({ verdictChanged }) => Boolean(verdictChanged));
	return {
		state,
		total: sum(() => true),
		waiting: sum((each) => each.state === 'waiting'),
		done: sum((each) => each.state === 'done'),
		passedOver: sum((each) => each.state === 'passed-over'),
		failed: sum((each) => each.state === 'failed'),
		changed,
		untold: changed - sum(({ verdictChanged }) => Boolean(verdictChanged), 'told')
	};
}

export function presentRerun(
	{ id, bookId, occasion, createdAt, endedAt }: Rerun,
	progress: RerunProgress,
	{ book, begunBy }: { book: CoefficientBook; begunBy: string }
): RerunView {
	return {
		...progress,
		...{ id, bookId, occasion, begunBy },
		bookNumber: book.number,
		bookName: book.name,
		createdAt: createdAt.toISOString(),
		endedAt: endedAt?.toISOString() ?? null
	};
}
