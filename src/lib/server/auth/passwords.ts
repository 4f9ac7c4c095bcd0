import { hash, verify, type Algorithm } from '@node-rs/argon2';

/** The library's own number for it: its enumeration exists in types only. */
const ARGON2ID: Algorithm.Argon2id = 2;
const OPTIONS = { algorithm: ARGON2ID, memoryCost: 65_536, timeCost: 3, parallelism: 1 };
/** Each hash takes 64 MiB: more than this many at once wait their turn. */
const PARALLEL = 2;

let running = 0;
const waiting: (() => void)[] = [];

/** A place that becomes free goes straight to whoever has waited longest, so that nobody slips in between. */
async function inTurn<T>(work: () => Promise<T>): Promise<T> {
	if (running < PARALLEL) running++;
	else await new Promise<void>((resolve) => waiting.push(resolve));
	try {
		return await work();
	} finally {
		const next = waiting.shift();
		if (next) next();
		else running--;
	}
}

export function hashPassword(password: string): Promise<string> {
	return inTurn(() => hash(password, OPTIONS));
}

let decoy: Promise<string> | undefined;

/** Takes the same time whether or not there is a hash to check against. */
export async function passwordMatches(password: string, stored: string | null): Promise<boolean> {
	decoy ??= hashPassword('nobody has this password, it only takes the time');
	const against = stored ?? (await decoy);
	const matches = await inTurn(() => verify(against, password));
	return matches && stored !== null;
}
