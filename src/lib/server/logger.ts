import pino from 'pino';

/** One line of JSON an event. Passwords, tokens and cookies are never logged. */
export const logger = pino({
	level: process.env.LOG_LEVEL ?? 'info',
	base: null,
	redact: { paths: ['password', 'token', 'cookie', '*.password', '*.token', '*.cookie'], censor: '[hidden]' }
});
