import type { SheetContent } from '$lib/schemas/sheets';
import { layOutLetter, sayReach, type LaidOutLetter } from './layout';

/** The words of the letter that brings a customer their sheet. */
export function writeSheetLetter(content: SheetContent, href: string): LaidOutLetter {
	const { customerName, preparedBy, vehicle, workshop } = content;
	const reach = sayReach(workshop);
	return layOutLetter({
		subject: `Your battery, on one page: job ${content.jobNumber} at ${workshop.name}`,
		from: workshop.name,
		parts: [
			`Hello ${customerName},`,
			`${preparedBy} of ${workshop.name} worked out how a second battery in your ${vehicle} stands a hot day, and wrote it on one page for you. Please read it and tell us on the page that you have.`,
			{ href, words: 'Read your page' },
			'It is an estimate, not a certificate: the makers’ instructions, local rules and licensed practice come first.',
			'The link is yours: whoever has it can read the page, and ask us on it.',
			reach === ''
				? `Questions? Ask them on the page, or ask ${workshop.name}.`
				: `Questions? Ask them on the page, or ask ${workshop.name}: ${reach}.`
		]
	});
}
