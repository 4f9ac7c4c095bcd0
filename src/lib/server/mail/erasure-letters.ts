import { layOutLetter, sayReach, type LaidOutLetter } from './layout';

interface Shop {
	name: string;
	phone: string;
	email: string;
}

/** Tells the shop that a customer asks for deletion. It names no one: the page behind the link does. */
export function writeErasureAsked(workshop: Shop, href: string): LaidOutLetter {
	return layOutLetter({
		subject: 'A customer asks that their data be deleted',
		from: workshop.name,
		parts: [
			'A customer asks that what is held about them be deleted. A manager grants that, or refuses it with a reason.',
			{ href, words: 'See what it means, and decide' },
			'In many places the law gives you a month to answer.'
		]
	});
}

/** Tells the shop that nothing is to be decided any more. It names no one, as the one before did not. */
export function writeErasureWithdrawn(workshop: Shop, href: string): LaidOutLetter {
	return layOutLetter({
		subject: 'A customer takes back a request for deletion',
		from: workshop.name,
		parts: [
			'A customer who had asked that what is held about them be deleted has taken that back. Nothing is to be decided, and nothing is deleted.',
			{ href, words: 'See the requests' }
		]
	});
}

export function writeErasureRefused(name: string, workshop: Shop, reason: string): LaidOutLetter {
	const reach = sayReach(workshop);
	return layOutLetter({
		subject: `Your request for deletion: ${workshop.name}`,
		from: workshop.name,
		parts: [
			`Hello ${name},`,
			`you asked ${workshop.name} to delete what is held about you. It was refused, for this reason:`,
			{ quote: reason },
			`If you think that wrong, talk to ${workshop.name}${reach === '' ? '' : `: ${reach}`}. You can also complain to the authority for data protection where you live.`
		]
	});
}

/** Names nobody, for by then nobody's name is left. */
export function writeErasureGranted(workshop: Shop): LaidOutLetter {
	return layOutLetter({
		subject: `Your data was deleted: ${workshop.name}`,
		from: workshop.name,
		parts: [
			'Hello,',
			`as you asked, ${workshop.name} has deleted what it held about you: name, e-mail, telephone, registration, your questions, your sign-in and the links to your pages.`,
			'What was measured and worked out about the battery stays, without you. Reminders no longer come: have the battery looked at all the same.',
			'Stop using a battery that is swollen, leaks, smells or got too hot to touch.'
		]
	});
}
