import type { SheetContent } from '$lib/schemas/sheets';
import { layOutLetter, sayReach, type LaidOutLetter } from './layout';

interface Asked {
	content: Pick<SheetContent, 'workshop' | 'vehicle' | 'jobNumber'>;
	askedBy: string;
	question: string;
}

/** Tells the shop what a customer asks, and where to answer. */
export function writeQuestionLetter({ content, askedBy, question }: Asked, href: string): LaidOutLetter {
	const { workshop, vehicle, jobNumber } = content;
	return layOutLetter({
		subject: `${askedBy} asks about job ${jobNumber}`,
		from: workshop.name,
		parts: [
			`${askedBy} has read the page about the battery in the ${vehicle}, job ${jobNumber}, and asks:`,
			{ quote: question },
			{ href, words: 'Answer on the job’s page' },
			'Your answer goes out by e-mail and stands on the customer’s page. An answer to this letter would not.'
		]
	});
}

interface Answered extends Asked {
	answer: string;
	answeredBy: string;
}

/** Brings a customer the shop's answer, with the question that it answers. */
export function writeAnswerLetter({
	content,
	askedBy,
	question,
	answer,
	answeredBy
}: Answered): LaidOutLetter {
	const { workshop, vehicle, jobNumber } = content;
	const reach = sayReach(workshop);
	return layOutLetter({
		subject: `Your question about job ${jobNumber}, answered: ${workshop.name}`,
		from: workshop.name,
		parts: [
			`Hello ${askedBy},`,
			`you asked about the battery in your ${vehicle}:`,
			{ quote: question },
			`${answeredBy} of ${workshop.name} answers:`,
			{ quote: answer },
			'It stands on your page too, behind the link in our first letter: ask again there.',
			'Before anyone drills or connects anything: the makers’ instructions, local rules and licensed practice come first.',
			...(reach === '' ? [] : [`Or ask ${workshop.name}: ${reach}.`])
		]
	});
}
