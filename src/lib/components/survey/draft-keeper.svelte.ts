import { dropDraft, keepDraft, readDraft, type Draft } from './drafts';

export interface DraftOwner {
	/** The signed-in person's number. */
	owner: number;
	/** What is being filled in. */
	page: string;
}

/** Keeps what is typed on this phone until the workshop has it, and says so. */
export class DraftKeeper<Values> {
	state = $state<'idle' | 'saved' | 'waiting' | 'problem'>('idle');
	at = $state<string | null>(null);
	/** What was typed before this page was opened and never reached the workshop. */
	restoredAt = $state<string | null>(null);

	/** Writes follow one another, so that the last one typed is the one that stays. */
	private writing: Promise<unknown> = Promise.resolve();

	constructor(private readonly where: DraftOwner) {}

	private then(work: () => Promise<Draft | void>): Promise<void> {
		const next = this.writing.then(work).then(
			(draft) => {
				this.at = draft?.at ?? null;
				this.state = draft ? 'saved' : 'idle';
			},
			() => {
				this.state = 'problem';
			}
		);
		this.writing = next;
		return next;
	}

	keep(values: Values): Promise<void> {
		const { owner, page } = this.where;
		return this.then(() => keepDraft(owner, page, values));
	}

	/** What is on this phone for the page, if it differs from what the workshop has. */
	async restore(isNews: (values: Values) => boolean): Promise<Values | null> {
		const { owner, page } = this.where;
		const draft = await readDraft(owner, page).catch(() => null);
		if (!draft) return null;
		if (!isNews(draft.values as Values)) {
			await this.drop();
			return null;
		}
		this.at = this.restoredAt = draft.at;
		this.state = 'saved';
		return draft.values as Values;
	}

	/** The workshop has it, or the person does not want it. */
	drop(): Promise<void> {
		const { owner, page } = this.where;
		this.restoredAt = null;
		return this.then(() => dropDraft(owner, page));
	}

	/** No answer from the workshop: what was typed waits here. */
	wait(): void {
		this.state = 'waiting';
	}
}
