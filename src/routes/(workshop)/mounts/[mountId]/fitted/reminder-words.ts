import type { Reminded } from '$lib/schemas/fitting';

const AHEAD = 'A week before each date that is still to come a reminder goes';

/** Who is reminded of the dates, as it will in truth happen. */
const WORDS: Record<Reminded, string> = {
	customer: `${AHEAD} to the customer by e-mail.`,
	workshop: `${AHEAD} to the workshop by e-mail, as no e-mail of the customer is known.`,
	stopped: 'The customer has stopped reminders: none goes out. Agree on the dates with them.',
	erased: 'What was held about the customer is erased: no reminder goes out.',
	nobody: 'No reminder goes out: neither the customer’s e-mail nor the workshop’s is known.'
};

export const sayReminded = (reminded: Reminded, hasOpenDates: boolean): string =>
	hasOpenDates ? WORDS[reminded] : 'Every look is done: no reminder goes out.';
