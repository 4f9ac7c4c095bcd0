import type { AssessmentInputs } from '$lib/schemas/assessments';
import type { OutlookReport } from '$lib/schemas/outlook-reports';
import type { Outlook } from '$lib/schemas/outlooks';
import { presentCable } from './outlook/cable';
import { presentChance } from './outlook/chance';
import { presentEnvelope } from './outlook/envelope';
import { presentLife, type LifeElsewhere } from './outlook/life';
import { presentMeasure } from './outlook/measure';
import { presentRemedies } from './outlook/remedies';
import { eventWordsOf } from '$lib/format/outlook-words';
import { presentYear, type CountedYear } from './outlook/year';

/** What stands beside an outlook: the assessment that it belongs to, its year, and the battery's life elsewhere. */
export interface OutlookSource {
	inputs: AssessmentInputs;
	outlook: Outlook;
	year: CountedYear;
	elsewhere?: readonly LifeElsewhere[];
}

/** What an estimate says beside its number, in words: for the screen, for paper and for the customer's page. */
export function presentOutlook({ inputs, outlook, year, elsewhere = [] }: OutlookSource): OutlookReport {
	const words = eventWordsOf(inputs.battery.chemistry);
	const chance = presentChance(outlook.day, words);
	const days = presentYear(outlook.year, year, words, inputs.place.name);
	const life = presentLife(outlook.life, outlook.lifeProblem, elsewhere);
	return {
		...{ chance, life },
		year: days,
		measure: presentMeasure(outlook.influences, outlook.day),
		remedies: presentRemedies(outlook.remedies, words),
		envelope: presentEnvelope(outlook.envelope),
		cable: presentCable(outlook, inputs.cable),
		figures: [
			{
				label: `${words.adjective.charAt(0).toUpperCase()}${words.adjective.slice(1)} on days like this`,
				value: chance.value
			},
			{ label: words.days, value: days.value },
			...(life.value ? [{ label: '80 % of its capacity after', value: life.value }] : [])
		]
	};
}
