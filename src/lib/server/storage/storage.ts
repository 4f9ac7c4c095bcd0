/** What a stored content is called: 32 hexadecimal digits of our own, and which form of it this is. */
export const STORAGE_KEY = /^[0-9a-f]{32}\.[a-z]{1,12}$/;

export interface StoredContent {
	key: string;
	/** When it was put there. */
	putAt: Date;
}

/** Where contents are kept, whatever keeps them. What a content is, and whose, is not known here. */
export interface Storage {
	/** Keeps a content, whole or not at all. */
	put(key: string, content: Uint8Array): Promise<void>;
	/** Keeps a file that has come in by moving it: however large it is, nothing of it is held. */
	putFile(key: string, path: string): Promise<void>;
	/** A content piece by piece; null where nothing is kept under the key. */
	readPieces(key: string): Promise<AsyncIterable<Uint8Array> | null>;
	/** Null where nothing is kept under the key. */
	read(key: string): Promise<Buffer | null>;
	/** To remove what is not there is no fault. */
	remove(key: string): Promise<void>;
	list(): AsyncIterable<StoredContent>;
}
