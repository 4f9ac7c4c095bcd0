import type { SheetContent } from '$lib/schemas/sheets';
import { lettersHtml } from './html';

/** The words of the letter that brings a customer their sheet. */
export function writeSheetLetter(content: SheetContent, href: string) {
	const { customerName, preparedBy, vehicle, workshop } = content;
	const reach = [workshop.phone, workshop.email].filter((way) => way !== '').join(' or ');
	const greeting = [
		`Hello ${customerName},`,
		`${preparedBy} of ${workshop.name} worked out how a second battery in your ${vehicle} stands a hot day, and wrote it on one page for you. Please read it and tell us on the page that you have.`
	];
	const closing = [
		'It is an estimate, not a certificate: the makers’ instructions, local rules and licensed practice come first.',
		'The link is yours: whoever has it can read the page.',
		reach === '' ? `Questions? Ask ${workshop.name}.` : `Questions? Ask ${workshop.name}: ${reach}.`
	];
	return {
		subject: `Your battery, on one page: job ${content.jobNumber} at ${workshop.name}`.slice(0, 200),
		textBody: [...greeting, href, ...closing].join('\n\n') + '\n',
		htmlBody: lettersHtml(greeting, { href, words: 'Read your page' }, closing)
	};
}
