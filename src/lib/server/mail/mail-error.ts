/** What the mail library tells of a failed try. */
interface MailFailure {
	code?: string;
	responseCode?: number;
	response?: string;
	message?: string;
}

const UNREACHABLE = new Set(['ECONNECTION', 'ESOCKET', 'ETIMEDOUT', 'EDNS', 'ECONNREFUSED']);
const LONGEST = 300;

/** A reply of the 500s is the server's last word: the same letter will be refused again (RFC 5321, 4.2.1). */
export function isFinalRefusal(error: unknown): boolean {
	const { responseCode = 0 } = error as MailFailure;
	return responseCode >= 500 && responseCode < 600;
}

/** The server answered no, so it does not have the letter; a broken line leaves that open. */
export function isRefusal(error: unknown): boolean {
	const { responseCode = 0 } = error as MailFailure;
	return responseCode >= 400;
}

/** Why a letter did not go out, for the people of the shop. */
export function sayMailError(error: unknown): string {
	const { code = '', response, message = '' } = error as MailFailure;
	const words = response
		? `The mail server answered: ${response}`
		: UNREACHABLE.has(code)
			? 'The mail server cannot be reached.'
			: `The letter could not be handed over: ${message}`;
	return words.replace(/\s+/g, ' ').trim().slice(0, LONGEST);
}
