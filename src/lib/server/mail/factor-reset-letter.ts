import { layOutLetter, type LaidOutLetter } from './layout';

interface About {
	name: string;
	by: string;
	workshopName: string;
	href: string;
}

/** The words of the letter that tells somebody that their second factor is gone. */
export function writeFactorReset({ name, by, workshopName, href }: About): LaidOutLetter {
	return layOutLetter({
		subject: 'Your second factor for Soakline was reset',
		from: workshopName,
		parts: [
			`Hello ${name},`,
			`${by} has reset your second factor for ${workshopName} in Soakline: signing in asks for the password alone until you set up a new one. Do that next time you sign in.`,
			{ href, words: 'Set up a new one' },
			'If you did not ask for this, tell the shop at once.'
		]
	});
}
