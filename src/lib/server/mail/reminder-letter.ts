import { formatDate } from '$lib/format/dates';
import type { Customer, FollowUp, Vehicle, Workshop } from '../db/models';
import { lettersHtml } from './html';

interface About {
	followUp: Pick<FollowUp, 'afterMonths' | 'dueOn'>;
	customer: Pick<Customer, 'name'>;
	vehicle: Pick<Vehicle, 'make' | 'model'>;
	workshop: Pick<Workshop, 'name' | 'phone' | 'email'>;
}

/** The words of the letter that reminds a customer of the next look at their battery. */
export function writeReminder({ followUp, customer, vehicle, workshop }: About) {
	const after = followUp.afterMonths === 1 ? 'one month' : `${followUp.afterMonths} months`;
	const reach = [workshop.phone, workshop.email].filter((way) => way !== '').join(' or ');
	const paragraphs = [
		`Hello ${customer.name},`,
		`the battery in your ${vehicle.make} ${vehicle.model} has been in for ${after}. It is time that ${workshop.name} had a look at it: on ${formatDate(followUp.dueOn)} or thereabouts.`,
		'If a label on the case has turned, or the fridge went dark, tell us: the time and how hot the day was is all we need.',
		'Stop using a battery that is swollen, leaks, smells or got too hot to touch.',
		reach === '' ? `Call on ${workshop.name} for a time.` : `Call ${workshop.name} for a time: ${reach}.`
	];
	return {
		subject: `Time to look at your battery: ${workshop.name}`.slice(0, 200),
		textBody: paragraphs.join('\n\n') + '\n',
		htmlBody: lettersHtml(paragraphs.slice(0, 3), null, paragraphs.slice(3))
	};
}
