import type { Invitation } from '../db/models';
import { layOutLetter, type LaidOutLetter } from './layout';

interface About {
	invitation: Pick<Invitation, 'name' | 'role'>;
	invitedBy: string;
	workshopName: string;
	href: string;
	livesHours: number;
}

const ARTICLE = { installer: 'an installer', engineer: 'an engineer', manager: 'a manager' } as const;

/** The words of the letter that asks somebody to join a workshop. */
export function writeInvitation(about: About): LaidOutLetter {
	const { invitation, invitedBy, workshopName, href, livesHours } = about;
	return layOutLetter({
		subject: `Join ${workshopName} in Soakline`,
		from: workshopName,
		parts: [
			`Hello ${invitation.name},`,
			`${invitedBy} asks you to join ${workshopName} in Soakline, as ${ARTICLE[invitation.role]}. Soakline works out whether a second battery will live where it is to be mounted.`,
			`Open the link and choose a password. It works once, within ${livesHours} hours.`,
			{ href, words: 'Choose a password' },
			'If you do not know the shop, leave the letter alone: nothing happens.'
		]
	});
}
