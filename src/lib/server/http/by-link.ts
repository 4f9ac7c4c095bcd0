import type { RequestEvent } from '@sveltejs/kit';
import { giveBack, spend } from '../auth/rate-limit';

const WINDOW_S = 15 * 60;
const MISSES = { name: 'link miss', points: 100, windowS: WINDOW_S };
const WRITES = { name: 'link write', points: 60, windowS: WINDOW_S };

type Addressed = Pick<RequestEvent, 'getClientAddress'>;

/** Opens what a link leads to. A try that finds something is given back: only whoever guesses must soon wait. */
export async function readByLink<T>(event: Addressed, work: () => Promise<T>): Promise<T> {
	const misses = { ...MISSES, key: event.getClientAddress() };
	await spend(misses);
	const found = await work();
	await giveBack(misses);
	return found;
}

/** The same for what somebody sends through a link: every try counts. */
export async function writeByLink<T>(event: Addressed, work: () => Promise<T>): Promise<T> {
	await spend({ ...WRITES, key: event.getClientAddress() });
	return readByLink(event, work);
}
