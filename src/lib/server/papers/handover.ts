import { DEFERENCE } from '$lib/format/deference';
import { formatDate } from '$lib/format/dates';
import { hasBms } from '$lib/schemas/batteries';
import type { Paper, PaperBlock } from '$lib/schemas/papers';
import {
	tellBattery,
	tellDay,
	tellFitted,
	tellFollowUps,
	tellVehicle,
	warnOtherwise,
	type MountRecord
} from './mount-record';

/** What to do, for somebody at camp with a warm fridge: engineering judgement, no source. */
const WHEN_DARK = [
	'If the battery switches off after a hot day, it is most likely protecting its cells. They cool over hours, not minutes; in the shade, with the engine off and the bonnet up, sooner.',
	'It comes back by itself when the cells have cooled. Never bridge its protection, never open it, and do not force it with a charger.',
	'Write down when it went dark, when it came back and how hot the day was: with that the workshop can tell whether it was heat.',
	'If it went dark on a cool day, or does not come back within a day, have it looked at.'
];

/** The same of a battery that nothing switches off: engineering judgement, no source. */
const WHEN_TOO_HOT = [
	'Nothing switches this battery off when it gets too hot: it goes on being charged, gives off more gas and wears out sooner.',
	'On a hot day stop charging it where you can, stand in the shade with the engine off and the bonnet up, and give it hours to cool before it is charged again.',
	'Write down the day, how hot it was, and what the heat label on the case shows: with that the workshop can tell how hot it got.',
	'A smell of bad eggs, a case that is wet or swollen, or terminals too hot to touch: stop charging, keep flames and sparks away, and have it looked at before it is used again.'
];

const tellHeat = ({ paper }: MountRecord): PaperBlock => {
	const kind = 'words';
	return hasBms(paper.chemistry)
		? { kind, title: 'When it goes dark', sentences: WHEN_DARK }
		: { kind, title: 'When it gets too hot', sentences: WHEN_TOO_HOT };
};

const tellEstimate = (record: MountRecord): PaperBlock => {
	const { chance, year, envelope, life } = record.paper.outlook;
	const told = [chance, year, envelope, life].map(({ sentence }) => sentence);
	return { ...{ kind: 'words', title: 'What to expect' }, sentences: [...warnOtherwise(record), ...told] };
};

/** What goes to the customer with the vehicle. */
export function layHandover(record: MountRecord): Paper {
	const { paper, fitting, photos } = record;
	const { jobNumber } = paper.recommendation;
	return {
		title: 'Handover',
		under: `Job ${jobNumber}, fitted ${formatDate(fitting.installation.fittedOn)}`,
		shop: paper.workshop,
		logo: paper.logo,
		madeAt: `${fitting.installation.fittedOn}T00:00:00.000Z`,
		blocks: [
			tellVehicle(record),
			tellBattery(record),
			...tellFitted(fitting),
			...(photos.length > 0
				? [{ kind: 'photos' as const, title: 'The mount', photos: photos.slice(0, 1) }]
				: []),
			tellEstimate(record),
			tellDay(record),
			tellHeat(record),
			tellFollowUps(record),
			{ kind: 'cautions', cautions: paper.cautions },
			{ kind: 'words', sentences: [DEFERENCE.replace('recommendation', 'handover')] },
			{ kind: 'signatures', who: ['Fitted by', 'Received by'] }
		]
	};
}
