import { sayVerdict } from '$lib/format/verdict';
import type { Verdict } from '$lib/schemas/verdicts';
import { VERDICTS } from '$lib/schemas/verdicts';
import { layOutLetter, sayReach, type LaidOutLetter } from './layout';

interface About {
	customerName: string;
	vehicle: string;
	mountName: string;
	chemistry: string;
	before: Verdict;
	after: Verdict;
	isFitted: boolean;
	workshop: { name: string; phone: string; email: string };
	/** Whose name stands under it. */
	by: string;
}

const isWorse = ({ before, after }: About): boolean => VERDICTS.indexOf(after) > VERDICTS.indexOf(before);

function sayWhatNext(about: About): string {
	if (!isWorse(about)) {
		return about.after === 'rides-it-out'
			? 'That is better than we thought. What we advised for hot days stays as it was.'
			: 'That is better than we thought, but still close: on some hot days the heat can win all the same. What we advised stays as it was, and we would like to talk with you about what can be done about the heat.';
	}
	return about.isFitted
		? 'Please talk to us before your next hot trip: we would like to look at the mount with you, and at what can be done about the heat.'
		: 'Please talk to us before anything is drilled or fitted there.';
}

/** What could be written to a customer whose verdict changed: a draft, for somebody to change and to send. */
export function draftVerdictLetter(about: About): { subject: string; body: string } {
	const { customerName, vehicle, mountName, chemistry, before, after, workshop, by } = about;
	const reach = sayReach(workshop);
	const paragraphs = [
		`Hello ${customerName},`,
		`when we worked out how the battery in your ${vehicle} (${mountName}) stands a hot day, we said that it ${sayVerdict(before, chemistry)}. Since then we know some of the numbers behind it better. With them the same day comes out differently: it ${sayVerdict(after, chemistry)}.`,
		sayWhatNext(about),
		'It is an estimate, not a certificate: the makers’ instructions, local rules and licensed practice come first.',
		reach === '' ? `${by}, ${workshop.name}` : `${by}, ${workshop.name}. ${reach}`
	];
	return {
		subject: `Your battery on a hot day: what we know better now, ${workshop.name}`,
		body: paragraphs.join('\n\n')
	};
}

/** The letter as somebody has written it: a blank line ends a paragraph. */
export function writeVerdictLetter(
	from: string,
	{ subject, body }: { subject: string; body: string }
): LaidOutLetter {
	const parts = body
		.split(/\r?\n\s*\r?\n/)
		.map((paragraph) => paragraph.trim())
		.filter((paragraph) => paragraph !== '');
	return layOutLetter({ subject, from, parts });
}
