import type { FactorReach } from '../schemas/second-factor';
import { joinWords } from './join-words';

type Others = FactorReach['others'];

const nameAll = (others: Others): string => joinWords(others.map(({ name, role }) => `${name} (${role})`));

/** What happens, and to whom, once a second factor is asked for: said before somebody asks. */
export function sayFactorReach(others: Others): string {
	if (others.length === 0) return 'All managers and engineers have theirs: nobody is held up.';
	return `Who has none can then open nothing but the page that sets it up, from their next step on, even if they are signed in. Today that is ${nameAll(others)}.`;
}

/** Whom the rule holds up while it is in force. */
export const sayFactorWaiting = (others: Others): string =>
	others.length === 0 ? 'All of them have it.' : `Not set up yet: ${nameAll(others)}.`;
