import { randomBytes } from 'node:crypto';
import { env } from '../env';
import { diskStorage } from './disk';
import type { Storage } from './storage';

export type { Storage, StoredContent } from './storage';
export { clearIncoming, newIncomingPath } from './incoming';

let opened: Storage | undefined;

/** The storage of this process. */
export function storage(): Storage {
	opened ??= diskStorage(env().SOAKLINE_FILES_DIR);
	return opened;
}

/** What a content is called from now on: nothing of what somebody sent is in it. */
export const newContentId = (): string => randomBytes(16).toString('hex');
