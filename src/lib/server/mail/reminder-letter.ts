import { formatDate } from '$lib/format/dates';
import type { Customer, FollowUp, Vehicle, Workshop } from '../db/models';
import { layOutLetter, sayReach, type LaidOutLetter } from './layout';

interface About {
	followUp: Pick<FollowUp, 'afterMonths' | 'dueOn'>;
	customer: Pick<Customer, 'name'>;
	vehicle: Pick<Vehicle, 'make' | 'model'>;
	workshop: Pick<Workshop, 'name' | 'phone' | 'email'>;
	/** Where its reader stops these letters; none when it goes to the shop itself. */
	stopUrl: string;
}

/** The words of the letter that reminds a customer of the next look at their battery. */
export function writeReminder({ followUp, customer, vehicle, workshop, stopUrl }: About): LaidOutLetter {
	const after = followUp.afterMonths === 1 ? 'one month' : `${followUp.afterMonths} months`;
	const reach = sayReach(workshop);
	return layOutLetter({
		subject: `Time to look at your battery: ${workshop.name}`,
		from: workshop.name,
		parts: [
			`Hello ${customer.name},`,
			`the battery in your ${vehicle.make} ${vehicle.model} has been in for ${after}. It is time that ${workshop.name} had a look at it: on ${formatDate(followUp.dueOn)} or thereabouts.`,
			'If a label on the case has turned, or the fridge went dark, tell us: the time and how hot the day was is all we need.',
			'Stop using a battery that is swollen, leaks, smells or got too hot to touch.',
			reach === '' ? `Call on ${workshop.name} for a time.` : `Call ${workshop.name} for a time: ${reach}.`
		],
		foot:
			stopUrl === ''
				? []
				: [
						'You get this because a battery was fitted for you. A battery should be looked at all the same when no letter comes.',
						{ href: stopUrl, words: 'Stop these reminders' }
					]
	});
}
