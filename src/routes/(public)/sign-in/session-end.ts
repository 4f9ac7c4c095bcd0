import { SESSION_IDLE_MINUTES, SESSION_MOST_HOURS, type SessionEnd } from '$lib/schemas/people';

/** What somebody reads who comes with a session that is over. */
export const SESSION_END_WORDS: Readonly<Record<SessionEnd, { title: string; words: string }>> = {
	'role-changed': {
		title: 'Your role was changed',
		words: 'Whatever was open under the old one is closed. Sign in to go on with the new one.'
	},
	left: {
		title: 'You were signed out',
		words: 'Your access to the workshop was ended. Ask a manager of it if that surprises you.'
	},
	'factor-reset': {
		title: 'You were signed out',
		words: 'Your second factor was reset. Sign in, and set it up again.'
	},
	'too-old': {
		title: 'You were signed out',
		words: `A session ends after ${SESSION_MOST_HOURS} hours. Sign in to go on.`
	},
	idle: {
		title: 'You were signed out',
		words: `It had not been used for ${SESSION_IDLE_MINUTES} minutes. Sign in to go on.`
	},
	'signed-out': { title: 'You were signed out', words: 'Sign in to go on.' }
};
