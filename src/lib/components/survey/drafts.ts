import { openDB, type DBSchema, type IDBPDatabase } from 'idb';

/** What somebody typed and the workshop has not got yet, on this phone alone. */
export interface Draft<Values = unknown> {
	values: Values;
	/** When it was typed, ISO. */
	at: string;
}

interface Stored extends Draft {
	/** The person's number and the page: two people on one phone see none of each other's. */
	key: string;
	owner: number;
}
interface DraftStore extends DBSchema {
	drafts: { key: string; value: Stored };
}

/** Signing out clears it: the answer to that says so to the browser. */
const DATABASE = 'soakline-drafts';
let opening: Promise<IDBPDatabase<DraftStore>> | undefined;

function store(): Promise<IDBPDatabase<DraftStore>> {
	opening ??= openDB<DraftStore>(DATABASE, 1, {
		upgrade: (database) => {
			database.createObjectStore('drafts', { keyPath: 'key' });
		},
		blocking: () => {
			void opening?.then((database) => database.close());
			opening = undefined;
		}
	});
	return opening;
}

const keyOf = (owner: number, page: string): string => `${owner} ${page}`;

export async function keepDraft(owner: number, page: string, values: unknown): Promise<Draft> {
	const draft = { key: keyOf(owner, page), owner, values, at: new Date().toISOString() };
	await (await store()).put('drafts', draft);
	return draft;
}

/** The draft of one page; whatever other people left on this phone goes. */
export async function readDraft(owner: number, page: string): Promise<Draft | null> {
	const database = await store();
	const known = await database.getAll('drafts');
	const strange = known.filter((draft) => draft.owner !== owner);
	await Promise.all(strange.map((draft) => database.delete('drafts', draft.key)));
	return known.find((draft) => draft.key === keyOf(owner, page)) ?? null;
}

export async function dropDraft(owner: number, page: string): Promise<void> {
	await (await store()).delete('drafts', keyOf(owner, page));
}
